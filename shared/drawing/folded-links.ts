import { groupBy } from '#shared/group-by.ts';
import type { DrawnLink } from './drawn-chain.ts';
import type { DrawingQuestion } from './drawing-question.ts';
import { worstState } from './counting-checks.ts';

/** Links between the same two plates become one; what lies within one plate is no longer drawn. */
export function foldedLinks(
  links: readonly DrawnLink[],
  home: (uid: string) => string,
  verdict: DrawingQuestion['verdict'],
): DrawnLink[] {
  const crossing = links
    .map((link) => ({ ...link, childUid: home(link.childUid), parentUid: home(link.parentUid) }))
    .filter((link) => link.childUid !== link.parentUid);
  return [...groupBy(crossing, (link) => `${link.childUid}.${link.parentUid}`).values()].map((same) =>
    oneOf(same, verdict),
  );
}

function oneOf(same: DrawnLink[], verdict: DrawingQuestion['verdict']): DrawnLink {
  const [first] = same as [DrawnLink];
  if (same.length === 1) return first;
  const carrying = same.filter((link) => link.role !== 'informs');
  const days = same.flatMap((link) => link.usedEnd ?? []).toSorted();
  const begins = same.flatMap((link) => link.usedBegin ?? []).toSorted();
  const used = new Set(same.map((link) => link.usedAs));
  return {
    childUid: first.childUid,
    parentUid: first.parentUid,
    role: carrying[0]?.role ?? 'informs',
    sensitivity: null,
    usedAs: used.size === 1 ? first.usedAs : null,
    usedBegin: begins[0] ?? null,
    usedEnd: days.at(-1) ?? null,
    flow: carrying.length === 0 ? null : sumOfShares(carrying.map((link) => link.flow)),
    conduct: worstState(same.map((link) => link.conduct)),
    today: worstState(same.map((link) => link.today)),
    of: worstFirst(same, verdict).flatMap((link) => link.of),
  };
}

/** The one that is opened when the whole is chosen stands first: the worst, and of equals the widest. */
function worstFirst(same: DrawnLink[], verdict: DrawingQuestion['verdict']): DrawnLink[] {
  const order = ['broken', 'not judged', 'caution', 'sound'];
  return same.toSorted(
    (a, b) =>
      order.indexOf(a[verdict]) - order.indexOf(b[verdict]) || Math.abs(b.flow ?? 0) - Math.abs(a.flow ?? 0),
  );
}

/** Sum of shares of one variance; unknown as soon as one of them is. */
export function sumOfShares(shares: readonly (number | null)[]): number | null {
  let sum = 0;
  for (const share of shares) {
    if (share === null) return null;
    sum += share;
  }
  return sum;
}
