import type { Severity } from './rules/rule.ts';

/** Severities from the gravest. */
export const SEVERITIES: readonly Severity[] = ['block', 'critical', 'major', 'minor', 'information'];

/** A severity as it stands in a sentence, for example "2 blocking". */
export function severityWord(severity: Severity): string {
  return severity === 'block' ? 'blocking' : severity === 'information' ? 'to be noted' : severity;
}
