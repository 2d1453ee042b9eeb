import type { ChainResponse } from '#shared/contracts/chains.ts';
import { linkKey } from '#shared/drawing/drawing-question.ts';
import { namesOf } from '#shared/drawing/link-order.ts';
import { shareText } from '#shared/numbers/share-text.ts';
import { CHANGE_GROUPS, type Change, type Wording } from './change.ts';
import { changedLinks, sentencesOf } from './changed-links.ts';
import { changedResult } from './changed-result.ts';
import { changedValues } from './changed-values.ts';
import { pairsOf, type Pairs } from './pairs.ts';

type Check = ChainResponse['checks'][number];

/** A share that moves by less than this, as a fraction of the variance, is not worth a line. */
const SHARE_WORTH_SAYING = 0.01;

/**
 * What differs between two answers about one value, in plain statements: the graver first, each group by weight.
 * @param before the answer that is compared with
 * @param after the answer that is looked at: places and words for the drawing are its own
 */
export function whatChanged(
  before: ChainResponse,
  after: ChainResponse,
  wording: Wording = { decimalMark: '.', uncertainty: 'plus-minus' },
): Change[] {
  const pairs = pairsOf(before, after);
  const links = changedLinks(pairs);
  const told = new Set(links.flatMap(({ checks }) => checks));
  const changes = [
    ...changedResult(pairs, wording),
    ...links.map(({ change }) => change),
    ...changedValues(pairs, wording),
    ...changedChecks(pairs, told),
    ...changedShares(pairs, wording),
  ];
  const place = (change: Change) => CHANGE_GROUPS.indexOf(change.group);
  return changes.sort((a, b) => place(a) - place(b) || b.weight - a.weight);
}

/** Words for the drawing, by plate or link: the gravest statement about each gives the word. */
export function marksOf(changes: readonly Change[]): Map<string, string> {
  const marks = new Map<string, string>();
  for (const { at, mark } of changes) if (at !== null && mark !== null && !marks.has(at)) marks.set(at, mark);
  return marks;
}

/** Checks with another outcome that no link's change has told, where either outcome is a finding. */
function changedChecks({ before, after, laterUid }: Pairs, told: ReadonlySet<Check>): Change[] {
  const key = (check: Check, name: (uid: string) => string) =>
    `${check.rule} ${check.verdict} ${subjectsOf(check).map(name).join('.')}`;
  const earlier = new Map(before.checks.map((check) => [key(check, laterUid), check]));
  const names = namesOf(after);
  const isFinding = ({ outcome }: Check) => outcome === 'fails' || outcome === 'cannot be judged';
  return after.checks.flatMap((check): Change[] => {
    const was = earlier.get(key(check, (uid) => uid));
    if (!was || was.outcome === check.outcome || told.has(check) || told.has(was)) return [];
    if (!isFinding(was) && !isFinding(check)) return [];
    const rule = after.rules.find(({ id }) => id === check.rule)!;
    const about = subjectsOf(check).map((uid) => names.get(uid) ?? '');
    const subject = about.length === 0 ? 'The whole chain' : about.toReversed().join(' → ');
    const verdict = check.verdict === 'conduct' ? 'at use' : 'now';
    return [
      {
        group: 'Other checks',
        says: `${subject}: ${rule.title} (${rule.id}), ${verdict}: ${check.outcome}, was: ${was.outcome}.`,
        why: check.outcome === 'fails' ? sentencesOf(after, [check]) : [],
        at: placeOf(check),
        mark: 'check changed',
        weight: isFinding(check) ? 1 : 0,
      },
    ];
  });
}

function subjectsOf({ subject }: Check): string[] {
  if (subject.type === 'link') return [subject.childUid, subject.parentUid];
  return subject.type === 'value' ? [subject.uid] : [];
}

function placeOf({ subject }: Check): string | null {
  if (subject.type === 'link') return linkKey(subject);
  return subject.type === 'value' ? subject.uid : null;
}

function changedShares({ nodes, after }: Pairs, { decimalMark }: Wording): Change[] {
  const names = namesOf(after);
  return nodes.flatMap(({ before, after: node }): Change[] => {
    if (before.share === null || node.share === null) return [];
    const moved = Math.abs(node.share - before.share);
    if (moved <= SHARE_WORTH_SAYING) return [];
    const [is, was] = [shareText(node.share, decimalMark), shareText(before.share, decimalMark)];
    return [
      {
        group: 'Where the uncertainty comes from',
        says: `What flows through ${names.get(node.uid)}: ${is}, was ${was}.`,
        why: [],
        at: node.uid,
        mark: 'share moved',
        weight: moved,
      },
    ];
  });
}
