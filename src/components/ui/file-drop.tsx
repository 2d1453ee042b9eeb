import { useId, useState, type DragEvent, type ReactNode } from 'react';

interface FileDropProps {
  label: ReactNode;
  /** Which files are taken, in words: "PDF or XML certificate, up to 20 MB". */
  hint?: ReactNode;
  error?: string;
  /** As the `accept` attribute; the server judges the content, not the name. */
  accept?: string;
  isMultiple?: boolean;
  /** What is chosen already, by name. */
  chosen?: readonly string[];
  onFiles: (files: File[]) => void;
}

/** A place to drop files, which is also an ordinary file control for the keyboard. */
export function FileDrop({ label, hint, error, accept, isMultiple, chosen = [], onFiles }: FileDropProps) {
  const id = useId();
  const [isOver, setOver] = useState(false);
  const described = [error ? `${id}-error` : '', hint ? `${id}-hint` : ''].filter(Boolean).join(' ');

  function onDrop(event: DragEvent): void {
    event.preventDefault();
    setOver(false);
    const files = Array.from(event.dataTransfer.files);
    if (files.length > 0) onFiles(isMultiple ? files : files.slice(0, 1));
  }

  return (
    <div className="flex flex-col gap-1">
      <label
        onDragOver={(event) => {
          event.preventDefault();
          setOver(true);
        }}
        onDragLeave={() => setOver(false)}
        onDrop={onDrop}
        className={`flex cursor-pointer flex-col gap-1 border border-dashed px-4 py-4 has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-brass ${
          isOver ? 'border-brass bg-raised' : 'border-ink-3 hover:border-ink'
        }`}
      >
        <span>
          {label}: <span className="underline underline-offset-3">choose</span> or drop{' '}
          {isMultiple ? 'files' : 'a file'} here
        </span>
        {chosen.map((name) => (
          <span key={name} className="font-mono text-sm break-all">
            {name}
          </span>
        ))}
        <input
          type="file"
          className="sr-only"
          accept={accept}
          multiple={isMultiple}
          aria-invalid={error ? true : undefined}
          aria-describedby={described || undefined}
          onChange={(event) => {
            const files = Array.from(event.target.files ?? []);
            // Emptied so that choosing the same file again, once mended, counts as a choice.
            event.target.value = '';
            if (files.length > 0) onFiles(files);
          }}
        />
      </label>
      {hint && (
        <p id={`${id}-hint`} className="text-sm text-ink-3">
          {hint}
        </p>
      )}
      {error && (
        <p id={`${id}-error`} className="text-sm text-broken">
          {error}
        </p>
      )}
    </div>
  );
}
