import { bestCapability } from './best-capability.ts';
import type { ValueFacts } from './facts.ts';
import { mpeOf } from './mpe.ts';
import { certificateText, deviationOf, expandedUText, statedU, valueText } from './numbers.ts';
import { isUnitOdd, splitHistory } from './odd-one-out.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ValueRule } from './rule.ts';

/** U of a value in multiples of its issuer's best capability from which it may be a unit too large, or too small. */
const FAR_ABOVE = 10 ** 2.5;
const FAR_BELOW = 0.01;

/** U of ordinary work at the best of the scope, in multiples of the best capability. */
const USUAL = [0.5, 10] as const;

/**
 * Is the unit right? Asked of conventional mass where deviation and U together stand a factor of 1000 from the
 * weight's history, or, without history, from the class limit and the issuer's best capability.
 * Common practice, no source.
 */
export const unitOfValue: ValueRule = {
  id: 'B-18',
  title: 'Magnitude of deviation and U is plausible',
  scope: 'value',
  severity: 'block',
  verdicts: ['today'],
  isLasting: true,
  sentences: {
    plausible: 'Deviation {value} and U {expandedU} on certificate {certificate} are of the usual size.',
    history:
      'Certificate {certificate} states {value} with U {expandedU}, both a factor of about 1000 from the other values of {registryNo} ({others}). Is the unit right?',
    capability:
      'Certificate {certificate} states {value} with U {expandedU}, both about a factor of 1000 from what class and best capability of {issuer} let expect. Is the unit right?',
    'ten limits':
      'The deviation {value} is more than ten times the maximum permissible error of class {class}; U ({expandedU}) is of the usual size.',
    mass: 'The question of the unit is asked of conventional mass only.',
    'no uncertainty': 'Certificate {certificate} states no U; the unit can only be asked about with both.',
    nothing: 'There is no other value, class or best capability to compare {registryNo} with.',
  },
  judge(value) {
    const parameters = {
      certificate: certificateText(value),
      registryNo: value.registryNo,
      value: valueText(value),
      expandedU: expandedUText(value),
      issuer: value.issuer.name,
      class: value.class ?? '',
      others: value.history.map(certificateText).join('; '),
    };
    if (value.quantity === 'mass') return doesNotApply('mass');
    if (statedU(value) === null) return cannotBeJudged('no uncertainty', parameters);
    // Confirming the unit lets a certificate be issued; the question stays on record.
    const severity = value.unitConfirmed ? 'major' : 'block';
    if (isUnitQuestioned(value)) {
      return fails(value.history.length > 0 ? 'history' : 'capability', parameters, severity);
    }
    const mpe = mpeOf(value);
    if (value.history.length === 0 && mpe === null && timesBest(value) === null)
      return doesNotApply('nothing', parameters);
    const isBeyond = mpe !== null && mpe.times(10).lt(Math.abs(deviationOf(value)));
    return isBeyond ? holds('ten limits', parameters, 'information') : holds('plausible', parameters);
  },
};

/** Whether the unit of a value is in question, by its history where it has one, else by class and capability. */
export function isUnitQuestioned(value: ValueFacts): boolean {
  if (value.quantity === 'mass' || statedU(value) === null) return false;
  const { earlier, later } = splitHistory(value);
  if (value.history.length > 0) {
    if (!isUnitOdd(value, earlier, later)) return false;
    const times = timesBest(value);
    // A slip upwards leaves at least 1000 times the best capability, and hardly one downwards about that capability:
    // what is between them is another laboratory's larger U, or the value after a slip.
    const isRise = value.history.every((other) => (statedU(other) ?? 0) < statedU(value)!);
    const isOrdinary = times !== null && (isRise ? times < FAR_ABOVE : times > USUAL[0] && times < USUAL[1]);
    return !isOrdinary;
  }
  const times = timesBest(value);
  const mpe = mpeOf(value)?.toNumber() ?? null;
  if (times === null || mpe === null) return false;
  const size = Math.abs(deviationOf(value));
  return (times >= FAR_ABOVE && size > 10 * mpe) || (times <= FAR_BELOW && size < FAR_BELOW * mpe);
}

/** U in multiples of the best capability of the issuer; null where either is not on record. */
function timesBest(value: ValueFacts): number | null {
  if (value.expandedU === null || value.k === null) return null;
  const best = bestCapability(value, value.k);
  return best === null || best.expandedU.isZero()
    ? null
    : Number(value.expandedU) / best.expandedU.toNumber();
}
