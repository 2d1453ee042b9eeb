import type { DraftCheck } from '#shared/contracts/drafts.ts';

/** A check that came out alike for several lines, said once. */
export interface GatheredCheck {
  check: DraftCheck;
  lines: number[];
}

const WEIGHT = { block: 0, critical: 1, major: 2, minor: 3, information: 4 };
const LOUDNESS = { fails: 0, 'cannot be judged': 1, holds: 2, 'does not apply': 3 };

/** Gathers what is said alike of several lines; what fails stands first, and the heaviest of it at the top. */
export function gatherChecks(checks: readonly DraftCheck[]): GatheredCheck[] {
  const groups = new Map<string, GatheredCheck>();
  for (const check of checks) {
    const key = [check.rule, check.outcome, check.verdict, check.sentence].join('|');
    const group = groups.get(key) ?? { check, lines: [] };
    if (!group.lines.includes(check.line)) group.lines.push(check.line);
    groups.set(key, group);
  }
  return [...groups.values()].toSorted(
    ({ check: a }, { check: b }) =>
      LOUDNESS[a.outcome] - LOUDNESS[b.outcome] || WEIGHT[a.severity] - WEIGHT[b.severity],
  );
}
