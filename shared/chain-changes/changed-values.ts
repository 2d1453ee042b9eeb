import { namesOf } from '#shared/drawing/link-order.ts';
import type { Change, Wording } from './change.ts';
import { differs, massText, uText } from './numbers-in-words.ts';
import { certificateOf, type Node, type Pairs, type ValueNode } from './pairs.ts';

const STATE_WEIGHT: Record<ValueNode['state'], number> = {
  withdrawn: 3,
  superseded: 2,
  'not yet in force': 1,
  'in force': 0,
};

/** Values and shared effects that came, went, took another's place, or stand or measure differently. */
export function changedValues(pairs: Pairs, wording: Wording): Change[] {
  const names = new Map([...namesOf(pairs.before), ...namesOf(pairs.after)]);
  return [
    ...pairs.nodes.flatMap(({ before, after }) =>
      before.type === 'value' && after.type === 'value' ? changesOf(before, after, pairs, wording) : [],
    ),
    ...pairs.added.map((node) => ({ ...cameOrWent(node, names), at: node.uid, mark: 'new' })),
    ...pairs.gone.map((node) => cameOrWent(node, names, true)),
  ];
}

function cameOrWent(node: Node, names: Map<string, string>, isGone = false): Change {
  const name = names.get(node.uid) ?? '';
  const what =
    node.type === 'value' ? `${name}, certificate ${certificateOf(node)}` : `Shared effect ${name}`;
  return {
    group: 'What it rests on',
    says: `${what}: ${isGone ? 'no longer in the chain' : 'new in the chain'}.`,
    why: [],
    at: null,
    mark: null,
    weight: 2,
  };
}

function changesOf(before: ValueNode, after: ValueNode, pairs: Pairs, wording: Wording): Change[] {
  const isFocus = after.uid === pairs.after.focusUid;
  const about = {
    group: isFocus ? ('The weight itself' as const) : ('What it rests on' as const),
    why: [],
    at: after.uid,
  };
  const name = after.registryNo;
  const changes: Change[] = [];
  if (before.uid !== after.uid) {
    const deviation = differs(before.deviation, after.deviation)
      ? `; deviation ${massText(after, wording)}, was ${massText(before, wording)}`
      : '; its deviation is the same';
    const u =
      before.expandedU === after.expandedU
        ? ''
        : `; U ${uText(after.expandedU, wording)}, was ${uText(before.expandedU, wording)}`;
    const says = `${name}: certificate ${certificateOf(after)} stands in the place of ${certificateOf(before)}${deviation}${u}.`;
    changes.push({ ...about, says, mark: 'new', weight: 3 });
  }
  if (before.state !== after.state) {
    const since = after.stateSince === null ? '' : ` since ${after.stateSince}`;
    const says = `${name}, certificate ${certificateOf(after)}: ${after.state}${since}, was ${before.state}.`;
    const weight = 1 + Math.max(STATE_WEIGHT[after.state], STATE_WEIGHT[before.state]);
    changes.push({ ...about, says, mark: `was ${before.state}`, weight });
  }
  const [was, is] = [before.uNow, after.uNow];
  if (!isFocus && was !== null && is !== null && uText(was, wording) !== uText(is, wording)) {
    const says = `u of ${name} over its chain: ${uText(is, wording)}, was ${uText(was, wording)}.`;
    changes.push({ ...about, says, mark: 'u changed', weight: 0 });
  }
  return changes;
}
