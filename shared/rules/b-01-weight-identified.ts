import type { ValueFacts } from './facts.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ValueRule } from './rule.ts';
import { isArtefact, nominalText } from './weight-class.ts';

/** A marking that says the nominal value and nothing else, such as "1 kg". */
const NOMINAL_ONLY = /^\d+([.,]\d+)?\s*(kg|g|mg)$/i;

/**
 * The weight can be told from any other: by its serial number, its own marking, or as the only one of its nominal
 * value in its set. Two weights of one set that share all of it could be taken for each other.
 */
export const weightIdentified: ValueRule = {
  id: 'B-01',
  title: 'Weight identified',
  scope: 'value',
  severity: 'block',
  verdicts: ['today'],
  sentences: {
    serial: '{registryNo}, marked "{marking}", has the serial number {serial}.',
    marking: '{registryNo} has a marking of its own, "{marking}".',
    'only one': '{registryNo}, marked "{marking}", is the only weight of {nominal} in its set.',
    alike:
      '{registryNo} and {others} of the same set are both marked "{marking}", and no serial number tells them apart; enter what does.',
    'nominal only':
      '{registryNo} is marked "{marking}" and has no serial number on record; one would tell it from other weights of {nominal}.',
    'no artefact': 'A {kind} is no weight that could be taken for another.',
  },
  judge(value) {
    const { weight, registryNo, marking } = value;
    const parameters = {
      registryNo,
      marking,
      serial: weight.serial ?? '',
      nominal: nominalText(value.nominal),
      kind: weight.kind,
    };
    if (!isArtefact(value)) return doesNotApply('no artefact', parameters);
    const twins = weight.alike.filter((other) => !isToldApart(value, other));
    if (twins.length > 0) {
      const others = twins.map((other) => other.registryNo).join(', ');
      return fails('alike', { ...parameters, others });
    }
    if (weight.serial) return holds('serial', parameters);
    if (!NOMINAL_ONLY.test(marking.trim())) return holds('marking', parameters);
    if (weight.isInSet) return holds(weight.alike.length > 0 ? 'marking' : 'only one', parameters);
    return cannotBeJudged('nominal only', parameters, 'minor');
  },
};

function isToldApart({ marking, weight }: ValueFacts, other: ValueFacts['weight']['alike'][number]): boolean {
  if (marking.trim() !== other.marking.trim()) return true;
  return weight.serial !== other.serial;
}
