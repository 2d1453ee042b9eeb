import { Button } from '#src/components/ui/button.tsx';
import { DateText } from '#src/components/ui/date-text.tsx';
import { Notice } from '#src/components/ui/notice.tsx';

interface RestoredNoticeProps {
  /** When the entries were typed; null for a fresh form. */
  restoredFrom: number | null;
  onDiscard: () => void;
}

/** Says that the form was filled again with what a closed tab left behind. */
export function RestoredNotice({ restoredFrom, onDiscard }: RestoredNoticeProps) {
  if (restoredFrom === null) return null;
  return (
    <Notice
      role="status"
      tone="brass"
      answers={
        <Button weight="text" onClick={onDiscard}>
          Discard it and begin anew
        </Button>
      }
    >
      Filled again with what you typed here on <DateText value={new Date(restoredFrom).toISOString()} />.
      Nothing of it is in the register yet.
    </Notice>
  );
}
