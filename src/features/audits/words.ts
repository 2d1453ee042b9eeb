import type { AuditFigures, AuditSummary } from '#shared/contracts/audits.ts';
import { countText } from '#shared/numbers/count-text.ts';
import { SEVERITIES, severityWord } from '#shared/severity-words.ts';

/** What an audit is of. */
export function subjectText({ subject }: Pick<AuditSummary, 'subject'>): string {
  if (subject.scope === 'network') return 'The whole network';
  if (subject.scope === 'laboratory') return subject.laboratory.name;
  return `Chain of ${subject.registryNo}`;
}

/** How many findings fail in all. */
export function failingCount(figures: AuditFigures): number {
  return SEVERITIES.reduce((sum, severity) => sum + figures[severity], 0);
}

/** Failing findings in words, the gravest first: "2 critical, 1 minor". */
export function failingText(figures: AuditFigures): string {
  const parts = SEVERITIES.filter((severity) => figures[severity] > 0);
  return parts.map((severity) => `${countText(figures[severity])} ${severityWord(severity)}`).join(', ');
}

/** How far a running audit is: what comes before the first chain and after the last has its own words. */
export function progressText({ done, total }: Pick<AuditSummary, 'done' | 'total'>): string {
  if (!total) return 'reading the register';
  if (done === 0) return `judging the first of ${countText(total)} chains`;
  if (done >= total) return 'recording what was found';
  return `${countText(done)} of ${countText(total)} chains judged`;
}
