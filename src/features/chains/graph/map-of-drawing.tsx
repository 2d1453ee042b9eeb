import { MiniMap, type Node } from 'reactflow';
import type { PlateData } from './plate-node.tsx';

/** Where the frame stands in a drawing larger than itself; for the pointer only. */
export function MapOfDrawing() {
  return (
    <div aria-hidden="true" className="max-sm:hidden">
      <MiniMap
        pannable
        ariaLabel={null}
        position="bottom-right"
        nodeClassName={inkOf}
        nodeStrokeWidth={0}
        nodeBorderRadius={0}
      />
    </div>
  );
}

/** Broken plates and the weight itself can be found in the map. */
function inkOf(node: Node<PlateData>): string {
  if (node.type !== 'plate') return 'fill-rule';
  const { state, isFocus } = node.data.plate;
  if (isFocus) return 'fill-brass';
  return state === 'broken' ? 'fill-broken' : 'fill-ink-3';
}
