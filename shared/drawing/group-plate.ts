import type { ChainValue } from '#shared/contracts/chains.ts';
import type { State } from '#shared/states.ts';
import { worstState } from './counting-checks.ts';
import type { DrawnChain, DrawnLink, PlateGroup } from './drawn-chain.ts';
import type { DrawingQuestion } from './drawing-question.ts';
import { commonOf, laboratoryOf, type FoldBy } from './fold-kind.ts';
import { sumOfShares } from './folded-links.ts';

interface Around {
  chain: DrawnChain;
  /** Which group each folded node went into. */
  homeOf: ReadonlyMap<string, string>;
  /** The links that are left. */
  links: readonly DrawnLink[];
  /** How each value stands by itself. */
  own: ReadonlyMap<string, State>;
  fold: { by: FoldBy; verdict: DrawingQuestion['verdict'] };
}

/** One plate for several values, with what it holds, how the worst of it stands, and what it adds of its own. */
export function groupPlate(key: string, members: readonly ChainValue[], around: Around): PlateGroup {
  const { chain, homeOf, links, fold, own } = around;
  const isInside = (uid: string) => homeOf.get(uid) === key;
  const inner = chain.links.filter((link) => isInside(link.childUid) && isInside(link.parentUid));
  const absorbed = inner.filter((link) => link.role === 'source');
  const states = [
    ...members.map((node) => own.get(node.uid)!),
    ...inner.filter((link) => link.role === 'reference').map((link) => link[fold.verdict]),
  ];
  const days = members.map((node) => node.performedEnd).toSorted();
  return {
    type: 'group',
    uid: key,
    tier: 0,
    laboratory: laboratoryOf(members[0]!),
    common: commonOf(members, fold.by),
    members: members.map((node) => node.uid),
    innerLinks: inner.flatMap((link) => link.of),
    from: days[0]!,
    to: days.at(-1)!,
    state: worstState(states),
    failing: {
      broken: states.filter((state) => state === 'broken').length,
      caution: states.filter((state) => state === 'caution').length,
      notJudged: states.filter((state) => state === 'not judged').length,
    },
    isRoot: members[0]!.rootKind !== null,
    localShare: sumOfShares([
      ...members.map((node) => node.localShare),
      ...absorbed.map((link) => link.flow),
    ]),
    share: sumOfShares(
      links.filter((link) => link.parentUid === key && link.role !== 'informs').map((link) => link.flow),
    ),
  };
}
