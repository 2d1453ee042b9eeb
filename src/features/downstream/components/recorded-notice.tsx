import { Notice } from '#src/components/ui/notice.tsx';

/** Says that the real act was done; what stands below it is the register as it now is. */
export function RecordedNotice({ actSeq }: { actSeq: number }) {
  return (
    <Notice role="status" tone="sound" title={`Recorded as act ${actSeq}`}>
      Below is who leans on it as the register now stands.
    </Notice>
  );
}
