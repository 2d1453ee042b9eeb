import type { User } from '#server/policy/user.ts';
import type { Below } from './below.ts';
import { judgeClassOf, type JudgeClass } from './class-verdict.ts';
import { effectsOf, type Effects, type GraphChange } from './effects.ts';
import type { GraphArrays } from './graph-arrays.ts';
import { SIGHT, sightOf } from './sight.ts';
import { wordOf, type Consequence } from './what-if-word.ts';
import { bandOf, wordOfOthers } from './word-of-others.ts';

/** A dry run worked out on arrays, by place. */
export interface DryRun {
  graph: GraphArrays;
  found: Below;
  sight: Uint8Array;
  effects: Effects;
  /** Places in `WORDS`. */
  word: Uint8Array;
}

/**
 * Works out what changes bring to the values found, who sees what of it, and the word for each.
 * @param threshold part of U beyond which it is material for one's own
 */
export function dryRun(
  graph: GraphArrays,
  found: Below,
  { changes, user, threshold }: { changes: readonly GraphChange[]; user: User; threshold: number },
): DryRun {
  const sight = sightOf(graph, found, user);
  const effects = effectsOf(graph, found, changes, (place, shift) =>
    sight[place] === SIGHT.full ? shift : bandOf(shift).to,
  );
  const judge = judgeClassOf(graph);
  const parts = { graph, found, effects };
  const word = Uint8Array.from(found.nodes, (node, place) => {
    if (sight[place] === SIGHT.full) return wordOf(consequenceOf(parts, place, judge), threshold);
    const change = {
      shift: effects.shift[place]!,
      addedU: Math.sqrt(effects.addedVariance[place]!),
      deviation: graph.deviation[node]!,
    };
    return wordOfOthers(change, (shift, added) => consequenceAt(parts, place, judge, { shift, added }));
  });
  return { ...parts, sight, word };
}

/** What the changes mean for one value: its U and its class, before and after. */
export function consequenceOf(parts: Worked, place: number, judge: JudgeClass): Consequence {
  const { shift, addedVariance } = parts.effects;
  return consequenceAt(parts, place, judge, { shift: shift[place]!, added: addedVariance[place]! });
}

type Worked = Pick<DryRun, 'graph' | 'found' | 'effects'>;

/** The same for another shift and added variance than the changes bring. */
function consequenceAt(
  { graph, found, effects }: Worked,
  place: number,
  judge: JudgeClass,
  { shift, added }: { shift: number; added: number },
): Consequence {
  const node = found.nodes[place]!;
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
