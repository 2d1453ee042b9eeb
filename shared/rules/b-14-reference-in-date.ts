import { addMonths, dateText, isNotAfter, performed, periodOf } from './days.ts';
import type { LinkFacts, ProgrammeFacts, Question } from './facts.ts';
import { rowInForce } from './in-force.ts';
import { certificateText } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type Finding, type LinkRule } from './rule.ts';

const ROOTS_WITHOUT_INTERVAL = ['realization run', 'consensus value', 'earlier definition'];

/**
 * Begin and end of the use lie inside the user's own programme for the reference; a certificate itself has no expiry.
 * Today: whether that programme has ended since, which the network's policy only says (default) or counts as a break.
 */
export const referenceInDate: LinkRule = {
  id: 'B-14',
  title: "Reference in date by the user's programme",
  scope: 'link',
  severity: 'critical',
  verdicts: ['conduct', 'today'],
  sentences: {
    'in date':
      'By the programme of {laboratory} ({interval} months) {registryNo} was due on {due}; it was used until {usedEnd}.',
    late: 'By the programme of {laboratory} ({interval} months) {registryNo}, certificate {certificate}, was due on {due}; it was used from {usedBegin}. A calibration made by then would mend it.',
    'ran over':
      'By the programme of {laboratory} ({interval} months) {registryNo}, certificate {certificate}, was due on {due}; the work began on {usedBegin} and ended on {usedEnd}.',
    'no programme':
      'No calibration programme of {laboratory} for {registryNo} is on record for {usedEnd}; its interval would decide.',
    undecided:
      '{registryNo} was due on {due} and used from {usedBegin} to {usedEnd}; the exact days would decide.',
    'no interval': 'A {rootKind} stands until the next one is adopted; no programme limits it.',
    'still in date': 'By the programme of {laboratory} certificate {certificate} is in date until {due}.',
    'ended since':
      'By the programme of {laboratory} certificate {certificate} was in date until {due}; later work needs a newer one.',
    'not relied on': 'No programme of {laboratory} for {registryNo} is on record for {day}.',
  },
  judge(link, question, verdict) {
    const { parent } = link;
    if (parent.rootKind !== null && ROOTS_WITHOUT_INTERVAL.includes(parent.rootKind))
      return doesNotApply('no interval', { rootKind: parent.rootKind });
    return verdict === 'conduct' ? judgeUse(link) : judgeSince(link, question);
  },
};

function judgeUse(link: LinkFacts): Finding {
  const { child, usedBegin, usedEnd } = link;
  const begin = periodOf(usedBegin, child.datePrecision);
  const end = periodOf(usedEnd, child.datePrecision);
  const programme = rowInForce(link.programmes, end.last, end.last);
  if (programme === null) return cannotBeJudged('no programme', textsOf(link, null));
  const due = addMonths(performed(link.parent), programme.intervalMonths);
  const parameters = textsOf(link, programme);
  const endsInDate = isNotAfter(end, due);
  if (endsInDate) return holds('in date', parameters);
  if (isNotAfter(begin, due) === false) return fails('late', parameters);
  return endsInDate === false ? fails('ran over', parameters) : cannotBeJudged('undecided', parameters);
}

function judgeSince(link: LinkFacts, { day, known, programmeEndedAfterUse }: Question): Finding {
  const programme = rowInForce(link.programmes, day, known);
  const parameters = { ...textsOf(link, programme), day };
  if (programme === null) return doesNotApply('not relied on', parameters);
  const due = addMonths(performed(link.parent), programme.intervalMonths);
  if (isNotAfter(periodOf(day, 'day'), due) !== false) return holds('still in date', parameters);
  return programmeEndedAfterUse === 'breaks'
    ? fails('ended since', parameters, 'major')
    : holds('ended since', parameters, 'information');
}

function textsOf(link: LinkFacts, programme: ProgrammeFacts | null): Record<string, string> {
  const { child, parent } = link;
  const months = programme?.intervalMonths ?? 0;
  return {
    laboratory: child.issuer.name,
    registryNo: parent.registryNo,
    certificate: certificateText(parent),
    interval: String(months),
    due: dateText(addMonths(performed(parent), months).last, parent.datePrecision),
    usedBegin: dateText(link.usedBegin, child.datePrecision),
    usedEnd: dateText(link.usedEnd, child.datePrecision),
  };
}
