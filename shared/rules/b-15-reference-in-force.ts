import { endOfDay } from '#shared/state-at.ts';
import { dateText, periodOf } from './days.ts';
import type { EndFacts, LinkFacts, Question } from './facts.ts';
import { endingOf, knownBefore, type Ending } from './in-force.ts';
import { certificateText } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type Finding, type LinkRule } from './rule.ts';

/**
 * Conduct: the certificate's revision was in force at use, by what was made known by then. Today: it has not been
 * superseded or withdrawn since. A re-issue that leaves value, U, kind and scale as they were is only said.
 */
export const referenceInForce: LinkRule = {
  id: 'B-15',
  title: 'Reference certificate in force',
  scope: 'link',
  severity: 'critical',
  verdicts: ['conduct', 'today'],
  sentences: {
    'in force': 'Certificate {certificate} of {registryNo} was in force when it was used, until {used}.',
    'still in force': 'Certificate {certificate} of {registryNo} stands on {day}.',
    unchanged:
      'Certificate {certificate} was re-issued on {since} as {replacement}; value, U, kind and scale are the same.',
    superseded:
      'Certificate {certificate} was superseded on {since} by {replacement}, which changed the value, and used until {used}; recompute with {replacement}.',
    withdrawn:
      'Certificate {certificate} was withdrawn on {since} and used until {used}; a reference that stands would mend it.',
    'superseded since':
      'Certificate {certificate} has been superseded since {since} by {replacement}, which changed the value (made known on {madeKnown}); judge the effect.',
    'withdrawn since':
      'Certificate {certificate} has been withdrawn since {since} (made known on {madeKnown}); the result has lost this reference.',
    undecided:
      'Certificate {certificate} ended on {since}; the use is dated {used} only, and the exact day would decide.',
    definition: 'The earlier definition has no certificate.',
  },
  judge(link, question, verdict) {
    if (link.parent.rootKind === 'earlier definition') return doesNotApply('definition');
    return verdict === 'conduct' ? judgeConduct(link) : judgeToday(link, question);
  },
};

function judgeConduct(link: LinkFacts): Finding {
  const use = periodOf(link.usedEnd, link.child.datePrecision);
  const surely = endingOf(link.parent.ends, knownBefore(use.first));
  const possibly = endingOf(link.parent.ends, knownBefore(use.last));
  if (surely?.how !== possibly?.how) return cannotBeJudged('undecided', textsOf(link, possibly));
  if (surely === null) return holds('in force', textsOf(link, null));
  if (surely.how === 'unchanged') return holds('unchanged', textsOf(link, surely), 'information');
  return fails(surely.how === 'withdrawn' ? 'withdrawn' : 'superseded', textsOf(link, surely));
}

function judgeToday(link: LinkFacts, { day, known }: Question): Finding {
  const horizon = endOfDay(known);
  const counts = (end: EndFacts) => end.effectiveOn <= day && end.recordedAt <= horizon;
  const ending = endingOf(link.parent.ends, counts);
  const parameters = { ...textsOf(link, ending), day };
  if (ending === null) return holds('still in force', parameters);
  if (ending.how === 'unchanged') return holds('unchanged', parameters, 'information');
  return fails(ending.how === 'withdrawn' ? 'withdrawn since' : 'superseded since', parameters);
}

function textsOf({ child, parent, usedEnd }: LinkFacts, ending: Ending | null): Record<string, string> {
  return {
    certificate: certificateText(parent),
    registryNo: parent.registryNo,
    used: dateText(usedEnd, child.datePrecision),
    since: ending?.end.effectiveOn ?? '',
    madeKnown: ending?.end.madeKnownOn ?? '',
    replacement: ending?.end.replacedBy ? certificateText(ending.end.replacedBy) : 'no other',
  };
}
