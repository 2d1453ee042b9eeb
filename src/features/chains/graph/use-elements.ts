import { useMemo } from 'react';
import type { Edge, Node } from 'reactflow';
import type { DisplayList } from '#shared/drawing/display-list.ts';
import { edgesOf, nodesOf, pictureOf } from './flow-elements.ts';

/** The list's plates and ribbons as the drawing's elements; what has not changed keeps its identity. */
export function useElements(
  list: DisplayList,
  at: string | undefined,
  walked: string | null,
): { nodes: Node[]; edges: Edge[] } {
  const plain = useMemo(
    () => nodesOf(list, { at: undefined, tabStop: undefined, takesFocus: false }),
    [list],
  );
  const picture = useMemo(() => pictureOf(list, at), [list, at]);
  const buttons = useMemo(() => {
    const isThere = (id: string | null | undefined) => list.plates.some((plate) => plate.id === id);
    const focus = list.plates.find((plate) => plate.isFocus)?.id;
    const tabStop = (isThere(walked) ? walked : isThere(at) ? at : focus) ?? undefined;
    const standing = nodesOf(list, { at, tabStop, takesFocus: tabStop === walked });
    return plain.map((node, index) => {
      const now = standing[index]!;
      const isTouched = node.type === 'plate' && (now.data.isSelected || now.data.isTabStop);
      return isTouched ? now : node;
    });
  }, [list, plain, at, walked]);
  const edges = useMemo(() => edgesOf(list), [list]);
  const nodes = useMemo(() => [picture, ...buttons], [picture, buttons]);
  return { nodes, edges };
}
