import type { AuditSummary } from '#shared/contracts/audits.ts';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { Word } from '#src/components/ui/word.tsx';
import { failingCount, failingText } from '../words.ts';

/** Where an audit stands; once it is done, what fails. */
export function AuditState({ audit }: { audit: AuditSummary }) {
  const { state, done, total, figures } = audit;
  if (state === 'running') return <Word tone="brass">{`${done} of ${total ?? '…'} chains`}</Word>;
  if (state !== 'done' || !figures) return <Word>{state}</Word>;
  if (failingCount(figures) === 0) return <StateMark state="sound">nothing fails</StateMark>;
  const isGrave = figures.block + figures.critical + figures.major > 0;
  return <StateMark state={isGrave ? 'broken' : 'caution'}>{failingText(figures)}</StateMark>;
}
