import { Button } from '#src/components/ui/button.tsx';
import { Notice } from '#src/components/ui/notice.tsx';

/** Stands in the place of an answer while what is written cannot be asked: the former one is not this one's. */
export function NotAsked({ onFormer }: { onFormer: () => void }) {
  return (
    <Notice
      role="status"
      tone="caution"
      title="Not worked out"
      answers={
        <Button weight="text" onClick={onFormer}>
          Show the former answer
        </Button>
      }
    >
      What is written in the form cannot be read; it says there what belongs in its place.
    </Notice>
  );
}
