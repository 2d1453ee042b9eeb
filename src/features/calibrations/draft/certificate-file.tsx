import { useController } from 'react-hook-form';
import { Button } from '#src/components/ui/button.tsx';
import { FileDrop } from '#src/components/ui/file-drop.tsx';
import { ApiProblem } from '#src/lib/api-problem.ts';
import { useAddDocument } from '../api.ts';
import { useDraft } from './draft-context.ts';
import type { DraftValues } from './draft-values.ts';

/** The certificate itself, kept beside what was copied from it. */
export function CertificateFile({ laboratoryId }: { laboratoryId: string }) {
  const { field } = useController<DraftValues, 'documentId'>({ name: 'documentId' });
  const { draft, isLocked } = useDraft();
  const add = useAddDocument(laboratoryId);
  const kept = draft?.document?.id === field.value ? draft?.document?.name : undefined;
  const name = add.data?.id === field.value ? add.data?.name : kept;
  const error = add.error instanceof ApiProblem ? (add.error.detail ?? add.error.title) : undefined;
  // A file can be dropped on a field that is disabled; who only reads gets none.
  if (isLocked) return <p className="text-ink-2">Certificate as PDF: {name ?? 'none attached'}</p>;
  return (
    <div className="flex flex-col items-start gap-1 [&>:first-child]:w-full">
      <FileDrop
        label="Certificate as PDF"
        hint={add.isPending ? 'Sending…' : 'PDF, up to 20 MB'}
        accept="application/pdf,.pdf"
        chosen={field.value && name ? [name] : []}
        error={add.isPending ? undefined : error}
        onFiles={([file]) => file && add.mutate(file, { onSuccess: ({ id }) => field.onChange(id) })}
      />
      {field.value && (
        <Button weight="text" onClick={() => field.onChange(null)}>
          Take the file off
        </Button>
      )}
    </div>
  );
}
