import type { ChainFacts, ValueFacts } from './facts.ts';
import { issued } from './days.ts';
import { recognitionOver } from './in-force.ts';
import { certificateText } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ChainRuleOf } from './rule.ts';

/**
 * Every branch ends at a stated reference: a realization, a consensus value, the earlier definition, a recognized
 * certificate or a stop accepted with evidence. A recognized stop is never a gap.
 */
export const unbrokenToReference: ChainRuleOf = {
  id: 'B-43',
  title: 'Unbroken to a stated reference',
  scope: 'chain',
  severity: 'critical',
  verdicts: ['today'],
  sentences: {
    unbroken: 'Every branch ends at a stated reference: {ends}.',
    root: '{focus} is itself a stated reference ({rootKind}).',
    broken:
      'The chain ends without a stated reference at {gaps}; link the reference there, or record the recognition of its issuer.',
    'not in the register': 'The chain ends at {gaps}: the reference it names is not in the register.',
    undecided:
      'The chain ends at {gaps}; whether its issuer was recognized then depends on the exact day of issue.',
  },
  judge(chain) {
    const focus = chain.values.find((value) => value.uid === chain.focusUid);
    if (focus?.rootKind)
      return doesNotApply('root', { focus: certificateText(focus), rootKind: focus.rootKind });
    if (chain.missingReferences.length > 0) return fails('not in the register', { gaps: missingText(chain) });
    const leaves = chain.values.filter((value) => value.references === 0 && value.rootKind === null);
    const gaps = leaves.filter((value) => isStop(value) === false);
    if (gaps.length > 0) return fails('broken', { gaps: namesOf(gaps) });
    const undecided = leaves.filter((value) => isStop(value) === null);
    if (undecided.length > 0) return cannotBeJudged('undecided', { gaps: namesOf(undecided) });
    const roots = chain.values.filter((value) => value.rootKind !== null || value.references === 0);
    return holds('unbroken', { ends: namesOf(roots) });
  },
};

/** Whether a value without references is a recognized stop: of another laboratory, recognized when it was issued. */
function isStop(value: ValueFacts): boolean | null {
  if (value.registeredByIssuer) return false;
  const recognition = recognitionOver(value.recognitions, issued(value));
  return recognition === null ? null : recognition.state === 'granted';
}

function namesOf(values: readonly ValueFacts[]): string {
  return values.map((value) => `${value.registryNo}, certificate ${certificateText(value)}`).join('; ');
}

function missingText(chain: ChainFacts): string {
  return chain.missingReferences
    .map(({ childUid, named }) => {
      const child = chain.values.find((value) => value.uid === childUid);
      return child ? `${child.registryNo}, certificate ${certificateText(child)} (names ${named})` : named;
    })
    .join('; ');
}
