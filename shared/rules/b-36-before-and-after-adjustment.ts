import { dateText, isNotAfter, performed, periodOf } from './days.ts';
import type { ValueFacts } from './facts.ts';
import { certificateText } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ValueRule } from './rule.ts';

/** An intervention that begins a new epoch. */
interface Intervention {
  reason: string;
  beginsOn: string;
}

/**
 * Where a weight was adjusted in the course of a calibration, its certificate gives the result before and the result
 * after. Before a repair or after damage there may be none.
 */
export const beforeAndAfterAdjustment: ValueRule = {
  id: 'B-36',
  title: 'Results before and after an adjustment',
  scope: 'value',
  severity: 'major',
  verdicts: ['conduct'],
  isLasting: true,
  sentences: {
    both: '{registryNo} was {reason} on {day}, and certificate {certificate} gives both results, as found and as left.',
    'not before':
      '{registryNo} was {reason} on {day}, in the course of certificate {certificate}, which gives no result as found; add it, or say why there is none.',
    'not after':
      '{registryNo} was {reason} on {day}, in the course of certificate {certificate}, which gives no result as left.',
    'not available':
      '{registryNo} was {reason} on {day}, in the course of certificate {certificate}, which does not give both results; whether there was one before is not on record.',
    undecided:
      '{registryNo} was {reason} on {day}; the exact days of certificate {certificate} would decide whether that was in the course of it.',
    'not adjusted': '{registryNo} was not adjusted in the course of certificate {certificate}.',
  },
  judge(value) {
    const known = { registryNo: value.registryNo, certificate: certificateText(value) };
    const met = interventionsOf(value)
      .map((intervention) => ({ intervention, isWithin: isWithin(intervention, value) }))
      .find(({ isWithin: within }) => within !== false);
    if (!met) return doesNotApply('not adjusted', known);
    const { reason, beginsOn } = met.intervention;
    const parameters = { ...known, reason, day: dateText(beginsOn, 'day') };
    const { stages } = value.sheet;
    if (stages.includes('as found') && stages.includes('as left')) return holds('both', parameters);
    if (met.isWithin === null) return cannotBeJudged('undecided', parameters, 'minor');
    if (reason !== 'adjusted') return cannotBeJudged('not available', parameters, 'minor');
    return fails(value.stage === 'as found' ? 'not after' : 'not before', parameters);
  },
};

/** The one that opened the value's own epoch, and the next; a new weight has had none. */
function interventionsOf({ sheet, nextEpoch }: ValueFacts): Intervention[] {
  return [...(sheet.epoch.n > 1 ? [sheet.epoch] : []), ...(nextEpoch ? [nextEpoch] : [])];
}

function isWithin({ beginsOn }: Intervention, value: ValueFacts): boolean | null {
  const day = periodOf(beginsOn, 'day');
  const afterBegin = isNotAfter(periodOf(value.performedBegin, value.datePrecision), day);
  const beforeEnd = isNotAfter(day, performed(value));
  if (afterBegin === false || beforeEnd === false) return false;
  return afterBegin && beforeEnd ? true : null;
}
