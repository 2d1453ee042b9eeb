import { STATED_AT_REGISTRATION } from './b-53-programme-justified.ts';
import { isNotAfter, performed, periodOf } from './days.ts';
import type { LinkFacts, ProgrammeFacts } from './facts.ts';
import { rowInForce } from './in-force.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type Finding, type LinkRule } from './rule.ts';

/** Never longer without an analysis of its own (NIST GMP 11, from memory), months. */
const LONGEST = 120;
/** Two calibrations show one change: with fewer nothing speaks for a longer interval (common practice, no source). */
const FEWEST_CALIBRATIONS = 2;

/**
 * An interval is longer than ten years only by an analysis of its own, and is lengthened only after calibrations that
 * speak for it. Calibrations that the register does not hold cannot speak.
 */
export const intervalWithinReason: LinkRule = {
  id: 'B-54',
  title: 'Interval of the programme within reason',
  scope: 'link',
  severity: 'minor',
  verdicts: ['conduct'],
  sentences: {
    usual: 'The programme of {laboratory} for {registryNo} relies on it for {interval} months.',
    'too long':
      'The programme of {laboratory} for {registryNo} relies on it for {interval} months, more than ten years, and gives no reason for it; shorten it, or state the analysis that allows it.',
    'long with reason':
      'The programme of {laboratory} for {registryNo} relies on it for {interval} months, more than ten years; whether its reason is an analysis that allows it, people have to say.',
    lengthened:
      '{laboratory} lengthened its programme for {registryNo} from {before} to {interval} months after {count} calibrations on record.',
    'too early':
      '{laboratory} lengthened its programme for {registryNo} from {before} to {interval} months with {count} on record; earlier calibrations would decide whether anything spoke for it.',
    'no programme': 'No calibration programme of {laboratory} for {registryNo} is on record.',
  },
  judge(link) {
    const { last } = periodOf(link.usedEnd, link.child.datePrecision);
    const programme = rowInForce(link.programmes, last, last);
    const known = { laboratory: link.child.issuer.name, registryNo: link.parent.registryNo };
    if (programme === null) return doesNotApply('no programme', known);
    const parameters = { ...known, interval: String(programme.intervalMonths) };
    if (programme.intervalMonths > LONGEST) {
      const hasReason = !['', STATED_AT_REGISTRATION].includes(programme.justification.trim());
      return hasReason ? cannotBeJudged('long with reason', parameters) : fails('too long', parameters);
    }
    const before = programmeBefore(link, programme);
    return before && before.intervalMonths < programme.intervalMonths
      ? judgeLengthened(link, programme, { ...parameters, before: String(before.intervalMonths) })
      : holds('usual', parameters);
  },
};

/** What held on the day before the programme began; null: nothing. */
function programmeBefore({ programmes }: LinkFacts, programme: ProgrammeFacts): ProgrammeFacts | null {
  const others = programmes.filter((row) => row !== programme && row.recordedAt < programme.recordedAt);
  const { validFrom } = programme;
  const day = new Date(Date.parse(validFrom) - 86_400_000).toISOString().slice(0, 10);
  return rowInForce(others, day, validFrom);
}

function judgeLengthened(
  { parent, otherValues }: LinkFacts,
  { validFrom }: ProgrammeFacts,
  parameters: Record<string, string>,
): Finding {
  const day = periodOf(validFrom, 'day');
  const calibrations = [parent, ...otherValues.filter((value) => value.sameEpoch)];
  const days = new Set(
    calibrations
      .filter((value) => isNotAfter(performed(value), day) === true)
      .map((value) => value.performedEnd),
  );
  const count = days.size === 0 ? 'none' : days.size === 1 ? 'one calibration' : String(days.size);
  return days.size >= FEWEST_CALIBRATIONS
    ? holds('lengthened', { ...parameters, count })
    : cannotBeJudged('too early', { ...parameters, count });
}
