import { dateText, periodOf } from './days.ts';
import { rowInForce } from './in-force.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type LinkRule } from './rule.ts';

/** Roots that no programme limits. */
const WITHOUT_PROGRAMME = ['realization run', 'consensus value', 'earlier definition'];
/** Fewer characters than this say nothing. */
const SHORTEST = 3;
/** What the register itself writes where a weight is registered with an interval and no more. */
export const STATED_AT_REGISTRATION = 'Stated by the holder at registration.';

/**
 * The programme by which a reference is relied on says how its interval was found and why. Whether there is one at
 * all is asked by B-14.
 */
export const programmeJustified: LinkRule = {
  id: 'B-53',
  title: 'Calibration programme says how and why',
  scope: 'link',
  severity: 'minor',
  verdicts: ['conduct'],
  sentences: {
    justified:
      'The programme of {laboratory} for {registryNo} ({interval} months) states its method and its reason.',
    'stated only':
      'The programme of {laboratory} for {registryNo} ({interval} months) was stated at registration; no further reason is on record.',
    'not justified':
      'The programme of {laboratory} for {registryNo} ({interval} months) does not say by which method and why; assert it anew with both.',
    'no programme':
      'No calibration programme of {laboratory} for {registryNo} is on record for {used}: B-14 asks for it.',
    'no interval': 'A {rootKind} stands until the next one is adopted; no programme limits it.',
  },
  judge({ child, parent, programmes, usedEnd }) {
    const { last } = periodOf(usedEnd, child.datePrecision);
    const programme = rowInForce(programmes, last, last);
    const parameters = {
      laboratory: child.issuer.name,
      registryNo: parent.registryNo,
      interval: String(programme?.intervalMonths ?? ''),
      used: dateText(usedEnd, child.datePrecision),
      rootKind: parent.rootKind ?? '',
    };
    if (parent.rootKind !== null && WITHOUT_PROGRAMME.includes(parent.rootKind))
      return doesNotApply('no interval', parameters);
    if (programme === null) return cannotBeJudged('no programme', parameters, 'information');
    const says = (text: string) => text.trim().length >= SHORTEST;
    if (!says(programme.method) || !says(programme.justification)) return fails('not justified', parameters);
    return programme.justification === STATED_AT_REGISTRATION
      ? holds('stated only', parameters)
      : holds('justified', parameters);
  },
};
