import type { User } from '#server/policy/user.ts';
import type { Below } from './below.ts';
import { judgeClassOf, type JudgeClass } from './class-verdict.ts';
import { effectsOf, type Effects, type GraphChange } from './effects.ts';
import type { GraphArrays } from './graph-arrays.ts';
import { sightOf } from './sight.ts';
import { wordOf, type Consequence } from './what-if-word.ts';

/** A dry run worked out on arrays, by place. */
export interface DryRun {
  graph: GraphArrays;
  found: Below;
  sight: Uint8Array;
  effects: Effects;
  /** Places in `WORDS`. */
  word: Uint8Array;
}

/** Works out what changes bring to the values found, who sees what of it, and the word for each. */
export function dryRun(
  graph: GraphArrays,
  found: Below,
  { changes, user, threshold }: { changes: readonly GraphChange[]; user: User; threshold: number },
): DryRun {
  const effects = effectsOf(graph, found, changes);
  const judge = judgeClassOf(graph);
  const parts = { graph, found, effects };
  return {
    ...parts,
    sight: sightOf(graph, found, user),
    word: Uint8Array.from(found.nodes, (_, place) => wordOf(consequenceOf(parts, place, judge), threshold)),
  };
}

/** What the changes mean for one value: its U and its class, before and after. */
export function consequenceOf(
  { graph, found, effects }: Pick<DryRun, 'graph' | 'found' | 'effects'>,
  place: number,
  judge: JudgeClass,
): Consequence {
  const node = found.nodes[place]!;
  const shift = effects.shift[place]!;
  const added = effects.addedVariance[place]!;
  const before = judge(node, 0, 0);
  const u = graph.u[node]!;
  const expandedU = graph.expandedU[node]!;
  return {
    shift,
    expandedU,
    expandedUAfter: added === 0 ? expandedU : (expandedU / u) * Math.sqrt(u * u + added),
    isRaised: added > 0,
    isLost: effects.isLost[place] === 1,
    isBeyondLimit: effects.isBeyondLimit[place] === 1,
    before,
    after: shift === 0 && added === 0 ? before : judge(node, shift, added),
  };
}
