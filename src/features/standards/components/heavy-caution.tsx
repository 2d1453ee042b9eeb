import { Notice } from '#src/components/ui/notice.tsx';

/** Said once a weight of 10 kg or more is entered. */
export function HeavyCaution() {
  return (
    <Notice tone="caution" title="10 kg or more: plan the lift">
      Use lifting gear rated for the load, lower it slowly, keep hands and feet clear, and nobody below a
      suspended weight. Local safety codes decide how it is moved; the register decides nothing here.
    </Notice>
  );
}
