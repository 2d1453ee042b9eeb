import type { AuditSummary } from '#shared/contracts/audits.ts';
import { stateOfOutcome } from '#shared/states.ts';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { Word } from '#src/components/ui/word.tsx';
import { SEVERITIES } from '#shared/severity-words.ts';
import { failingCount, failingText, progressText } from '../words.ts';

/** Where an audit stands; once it is done, what fails. */
export function AuditState({ audit }: { audit: AuditSummary }) {
  const { state, figures } = audit;
  if (state === 'running') return <Word tone="brass">{progressText(audit)}</Word>;
  if (state !== 'done' || !figures) return <Word>{state}</Word>;
  if (failingCount(figures) === 0) return <StateMark state="sound">nothing fails</StateMark>;
  const worst = SEVERITIES.find((severity) => figures[severity] > 0)!;
  return <StateMark state={stateOfOutcome('fails', worst)}>{failingText(figures)}</StateMark>;
}
