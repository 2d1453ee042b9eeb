import { useId, useLayoutEffect, useRef, type ReactNode, type Ref } from 'react';
import { Button } from './button.tsx';

interface DialogProps {
  title: ReactNode;
  children: ReactNode;
  /** Called for Escape, the close button and a click beside the dialog. The owner then stops rendering it. */
  onClose: () => void;
  /** The actions at the foot; the primary one first. */
  actions?: ReactNode;
}

/** A question or a short form above the screen. Rendered means open; focus goes back to where it came from. */
export function Dialog({ title, children, onClose, actions }: DialogProps) {
  const titleId = useId();
  const ref = useModal(onClose);
  return (
    <dialog
      ref={ref}
      aria-labelledby={titleId}
      className="m-auto max-h-[90dvh] w-[min(34rem,calc(100vw-2rem))] overflow-auto border border-ink bg-raised p-0 [--table-ground:var(--raised)] backdrop:bg-paper/75"
    >
      <div className="flex flex-col gap-4 p-5">
        <h2 id={titleId} className="font-serif text-lg">
          {title}
        </h2>
        {children}
        {actions && <div className="flex flex-wrap gap-2">{actions}</div>}
      </div>
    </dialog>
  );
}

interface SideSheetProps {
  title: ReactNode;
  children: ReactNode;
  onClose: () => void;
  /** @default 'normal' */
  width?: 'normal' | 'wide';
  /** Below 1600 px it opens at the left: where the table that it was opened from fills the right half. */
  isLeftWhereNarrow?: boolean;
}

const LEFT_WHERE_NARROW =
  'max-[100rem]:mr-auto max-[100rem]:ml-0 max-[100rem]:border-r max-[100rem]:border-l-0';

/** One thing of a list, opened at the right while the list stays in sight. */
export function SideSheet({
  title,
  children,
  onClose,
  width = 'normal',
  isLeftWhereNarrow = false,
}: SideSheetProps) {
  const titleId = useId();
  const ref = useModal(onClose);
  const size = width === 'wide' ? 'w-[min(52rem,100vw)]' : 'w-[min(30rem,100vw)]';
  return (
    <dialog
      ref={ref}
      aria-labelledby={titleId}
      className={`m-0 ml-auto h-dvh max-h-none max-w-none overflow-auto border-l border-ink bg-raised p-0 [--table-ground:var(--raised)] backdrop:bg-transparent ${size} ${isLeftWhereNarrow ? LEFT_WHERE_NARROW : ''}`}
    >
      <div className="flex min-h-full flex-col gap-4 p-5">
        <div className="flex items-baseline justify-between gap-4">
          <h2 id={titleId} className="font-serif text-lg">
            {title}
          </h2>
          <Button weight="text" onClick={onClose}>
            Close
          </Button>
        </div>
        {children}
      </div>
    </dialog>
  );
}

/** Opens the dialog while it is rendered, closes it as it leaves, and gives the focus back. */
function useModal(onClose: () => void): Ref<HTMLDialogElement> {
  const ref = useRef<HTMLDialogElement>(null);
  const latest = useRef(onClose);
  useLayoutEffect(() => {
    latest.current = onClose;
  });
  useLayoutEffect(() => {
    const dialog = ref.current;
    if (!dialog) return undefined;
    const before = document.activeElement;
    // The native cancel is stopped: whether the dialog is open is the owner's to say.
    const cancel = (event: Event): void => {
      if (event.target !== dialog) return;
      event.preventDefault();
      latest.current();
    };
    const beside = (event: MouseEvent): void => {
      if (event.target === dialog && isOutside(dialog, event)) latest.current();
    };
    dialog.addEventListener('cancel', cancel);
    dialog.addEventListener('mousedown', beside);
    dialog.showModal();
    return () => {
      dialog.removeEventListener('cancel', cancel);
      dialog.removeEventListener('mousedown', beside);
      dialog.close();
      if (before instanceof HTMLElement && before.isConnected) before.focus();
    };
  }, []);
  return ref;
}

function isOutside(dialog: HTMLDialogElement, event: MouseEvent): boolean {
  const box = dialog.getBoundingClientRect();
  return (
    event.clientX < box.left ||
    event.clientX > box.right ||
    event.clientY < box.top ||
    event.clientY > box.bottom
  );
}
