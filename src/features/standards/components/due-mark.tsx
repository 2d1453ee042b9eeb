import { DateText } from '#src/components/ui/date-text.tsx';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { dueDistance, dueState } from '../due-state.ts';

/** When the next calibration is due: marked once it is near or past, a plain date before. */
export function DueMark({ dueOn, isShort = false }: { dueOn: string; isShort?: boolean }) {
  const state = dueState(dueOn);
  if (state === null) return <DateText value={dueOn} />;
  const distance = `, ${dueDistance(dueOn)}`;
  return (
    <StateMark state={state} className="whitespace-nowrap">
      <DateText value={dueOn} />
      {isShort ? <span className="sr-only">{distance}</span> : distance}
    </StateMark>
  );
}
