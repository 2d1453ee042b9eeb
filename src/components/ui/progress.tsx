import { countText } from '#shared/numbers/count-text.ts';

interface WaitingProps {
  /** What is being fetched or worked out, as a phrase: "Reading the chain". */
  children: string;
}

/** Says that something is on its way; it appears only after a moment, so that quick answers do not flicker. */
export function Waiting({ children }: WaitingProps) {
  return (
    <p role="status" className="animate-[late_0s_400ms_both] py-2 text-ink-3">
      {children}…
    </p>
  );
}

interface ProgressProps {
  /** What is being done: "Checking rows". */
  label: string;
  done: number;
  total: number;
  /** How far it is, in words of its own. */
  says?: string;
}

/** How far long work has come, in numbers and as a line. */
export function Progress({ label, done, total, says }: ProgressProps) {
  const share = total > 0 ? Math.min(1, done / total) : 0;
  return (
    <div
      role="progressbar"
      aria-label={label}
      aria-valuemin={0}
      aria-valuemax={total}
      aria-valuenow={done}
      aria-valuetext={says}
      className="flex flex-col gap-1"
    >
      <p className="text-ink-2">
        {label}: {says ?? `${countText(done)} of ${countText(total)}`}
      </p>
      <div className="h-0.5 bg-rule">
        <div className="h-full bg-brass" style={{ width: `${share * 100}%` }} />
      </div>
    </div>
  );
}
