import type { ChainResponse } from '#shared/contracts/chains.ts';

export type Check = ChainResponse['checks'][number];

/** Checks that are told behind one count. */
export interface QuietGroup {
  outcome: Check['outcome'];
  /** Beside the outcome, where it does not say all. */
  because: string | null;
  checks: Check[];
}

const ORDER = ['fails', 'cannot be judged', 'holds'];
const BY_WEIGHT = ['block', 'critical', 'major', 'minor', 'information'];

/**
 * Checks as a list is read: what failed, what is open and holds with a note stand in it, the gravest first; what holds,
 * what does not apply and what is open for want of a datum of little weight stand behind a count.
 */
export function groupChecks(
  chain: ChainResponse,
  checks: readonly Check[],
): { loud: Check[]; quiet: QuietGroup[] } {
  const own = new Map(chain.rules.map((rule) => [rule.id, rule.severity]));
  const isNote = ({ outcome, severity, rule }: Check) =>
    outcome === 'holds' && severity === 'information' && own.get(rule) !== 'information';
  const isSlight = ({ outcome, severity }: Check) =>
    outcome === 'cannot be judged' && severity === 'information';
  const isLoud = (check: Check) =>
    check.outcome === 'fails' || isNote(check) || (check.outcome === 'cannot be judged' && !isSlight(check));
  const groups: QuietGroup[] = [
    {
      outcome: 'holds',
      because: null,
      checks: checks.filter((check) => check.outcome === 'holds' && !isNote(check)),
    },
    {
      outcome: 'cannot be judged',
      because: 'a datum of little weight is missing',
      checks: checks.filter(isSlight),
    },
    {
      outcome: 'does not apply',
      because: null,
      checks: checks.filter(({ outcome }) => outcome === 'does not apply'),
    },
  ];
  return {
    loud: checks.filter(isLoud).sort(gravestFirst),
    quiet: groups.filter((group) => group.checks.length > 0),
  };
}

function gravestFirst(a: Check, b: Check): number {
  return (
    ORDER.indexOf(a.outcome) - ORDER.indexOf(b.outcome) ||
    BY_WEIGHT.indexOf(a.severity) - BY_WEIGHT.indexOf(b.severity)
  );
}
