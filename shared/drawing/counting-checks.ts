import type { ChainResponse } from '#shared/contracts/chains.ts';
import type { State } from '#shared/states.ts';
import type { DrawingQuestion } from './drawing-question.ts';

type Check = ChainResponse['checks'][number];

/** As much of a chain as counting needs. */
export interface CountedChain extends Pick<ChainResponse, 'focusUid' | 'rules' | 'checks'> {
  links: readonly Pick<ChainResponse['links'][number], 'childUid' | 'parentUid' | 'role'>[];
}

/**
 * The checks of values and links that count under a verdict, as the links' standings count them: for today also a
 * flaw of the result itself that was found for the conduct; nothing of a value that only informs.
 */
export function countingChecks(chain: CountedChain, verdict: DrawingQuestion['verdict']): Check[] {
  const lasting = new Set(chain.rules.filter((rule) => rule.isLasting).map((rule) => rule.id));
  const leaning = new Set([
    chain.focusUid,
    ...chain.links
      .filter((link) => link.role === 'reference')
      .flatMap((link) => [link.childUid, link.parentUid]),
  ]);
  return chain.checks.filter(
    ({ subject, rule, verdict: spokenFor }) =>
      (spokenFor === verdict || (verdict === 'today' && lasting.has(rule))) &&
      (subject.type === 'link' || (subject.type === 'value' && leaning.has(subject.uid))),
  );
}

const GRAVE = ['block', 'critical', 'major'];
const WORST_FIRST: State[] = ['broken', 'not judged', 'caution', 'sound'];

/** The worst of a value's own checks and its standing, for the mark on its plate. */
export function worstOf(checks: readonly Check[], standing: State): State {
  const states = checks.map((check): State => {
    const isGrave = GRAVE.includes(check.severity);
    if (check.outcome === 'fails') return isGrave ? 'broken' : 'caution';
    return check.outcome === 'cannot be judged' && isGrave ? 'not judged' : 'sound';
  });
  return worstState([standing, ...states]);
}

/** The worst of some states; sound where there is none. */
export function worstState<Some extends State>(states: readonly Some[]): Some {
  const worst = WORST_FIRST.find((state) => (states as readonly State[]).includes(state));
  return (worst ?? 'sound') as Some;
}
