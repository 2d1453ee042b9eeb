import { readsInFull, type User } from '#server/policy/user.ts';
import { valueView, type Relation } from '#server/policy/value-view.ts';
import type { Below } from './below.ts';
import type { GraphArrays } from './graph-arrays.ts';

/**
 * What is seen of a value, as a number that fits an array, more being higher. `issued`: seen in full because one's
 * own laboratory issued the certificate, while another holds the weight. A statement does not occur downstream.
 */
export const SIGHT = { none: 0, warning: 1, issued: 2, full: 3 } as const;

/**
 * How much of each value this person sees, by place. A value is downstream of the person's own where it leans,
 * through any number of steps, on one that they see in full.
 */
export function sightOf(graph: GraphArrays, { nodes, placeOf }: Below, user: User): Uint8Array {
  const view = viewOfLaboratories(graph, user);
  const sight = new Uint8Array(nodes.length);
  const isBelowOwn = new Uint8Array(nodes.length);
  nodes.forEach((node, place) => {
    for (let link = graph.firstUp[node]!; link >= 0; link = graph.nextUp[link]!) {
      const parent = placeOf(graph.linkParent[link]!);
      if (parent >= 0 && (isBelowOwn[parent] || sight[parent]! >= SIGHT.issued)) isBelowOwn[place] = 1;
    }
    sight[place] = view(
      graph.holder[node]!,
      graph.issuer[node]!,
      isBelowOwn[place] ? 'downstream' : 'unrelated',
    );
  });
  return sight;
}

/** `valueView` by pairs of laboratories: a country has few of them and many values. */
function viewOfLaboratories(
  graph: GraphArrays,
  user: User,
): (holder: number, issuer: number, relation: Relation) => number {
  const known = new Map<number, number>();
  return (holder, issuer, relation) => {
    const key = (holder * 65_536 + issuer) * 2 + (relation === 'downstream' ? 1 : 0);
    const before = known.get(key);
    if (before !== undefined) return before;
    const value = { holderId: graph.laboratories.at(holder), issuerId: graph.laboratories.at(issuer) };
    const seen = sightOfValue(user, value, relation);
    known.set(key, seen);
    return seen;
  };
}

function sightOfValue(user: User, value: { holderId: string; issuerId: string }, relation: Relation): number {
  const view = valueView(user, value, relation);
  if (view === 'full') return readsInFull(user, value.holderId) ? SIGHT.full : SIGHT.issued;
  return view === 'warning' ? SIGHT.warning : SIGHT.none;
}
