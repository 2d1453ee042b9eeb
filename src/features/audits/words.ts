import type { AuditFigures, AuditSummary } from '#shared/contracts/audits.ts';
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
  return parts.map((severity) => `${figures[severity]} ${severityWord(severity)}`).join(', ');
}
