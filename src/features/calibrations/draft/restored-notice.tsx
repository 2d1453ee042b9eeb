import { Button } from '#src/components/ui/button.tsx';
import { Notice } from '#src/components/ui/notice.tsx';

/** Says that entries which had not reached the server are here again. @param at when they were typed */
export function RestoredNotice({ at, onSeen }: { at: number; onSeen: () => void }) {
  return (
    <Notice
      role="status"
      tone="brass"
      title="Filled again from this browser"
      answers={
        <Button weight="text" onClick={onSeen}>
          Good
        </Button>
      }
    >
      What was typed until {new Date(at).toTimeString().slice(0, 8)} had not reached the server. It is here
      again.
    </Notice>
  );
}
