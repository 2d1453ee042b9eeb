import { useRef, useState, type FocusEvent, type KeyboardEvent } from 'react';
import ReactFlow, {
  Controls,
  type EdgeTypes,
  type Node,
  type NodeTypes,
  type ReactFlowInstance,
} from 'reactflow';
import 'reactflow/dist/style.css';
import './chain-graph.css';
import type { DisplayList, Plate } from '#shared/drawing/display-list.ts';
import { BandNode } from './band-node.tsx';
import { DetailLevel, DetailLevelContext } from './detail-level.ts';
import { DetailCard } from './detail-card.tsx';
import type { FrameParts } from './frame.tsx';
import { MapOfDrawing } from './map-of-drawing.tsx';
import { PictureNode } from './picture-node.tsx';
import { PlateNode } from './plate-node.tsx';
import { RibbonEdge } from './ribbon-edge.tsx';
import { useDetail } from './use-detail.ts';
import { useMotion } from './use-motion.ts';
import { useElements } from './use-elements.ts';
import { bringIntoSight } from './view-of.ts';
import { plateFrom } from './walk-plates.ts';

const nodeTypes: NodeTypes = { picture: PictureNode, plate: PlateNode, band: BandNode };
const edgeTypes: EdgeTypes = { ribbon: RibbonEdge };
/** All of it, however small: what the button of the drawing shows. */
const WHOLE = { padding: 0.04, maxZoom: 1 };

interface ChainDrawingProps {
  list: DisplayList;
  /** What is selected: a node's uid or a link's key. */
  at: string | undefined;
  nameOf: (uid: string) => string;
  frame: FrameParts;
  onSelect: (at: string) => void;
  onOpen: (group: string) => void;
}

/** The drawing itself: plates to walk along by arrow keys, links and plates to press, a card for what is pointed at. */
export function ChainDrawing({ list, at, nameOf, frame, onSelect, onOpen }: ChainDrawingProps) {
  const [instance, setInstance] = useState<ReactFlowInstance | null>(null);
  const [walked, setWalked] = useState<string | null>(null);
  const [level] = useState(() => new DetailLevel());
  const box = useRef<HTMLDivElement>(null);
  const motion = useMotion(box, level);
  const detail = useDetail();
  const { nodes, edges } = useElements(list, at, walked);
  const plateOf = (id: string) => list.plates.find((plate) => plate.id === id);
  const press = (plate: Plate | undefined) => {
    if (!plate || plate.isBeside) return;
    detail.hide();
    if (plate.node.type === 'group') onOpen(plate.id);
    else onSelect(plate.id);
  };
  const tell = ({ target }: FocusEvent<HTMLDivElement>) => {
    const plate = target.matches(':focus-visible') && plateOf(target.dataset['plate'] ?? '');
    if (plate) detail.show({ plate });
  };
  const walk = (event: KeyboardEvent<HTMLDivElement>) => {
    const from = event.target instanceof HTMLElement ? event.target.dataset['plate'] : undefined;
    if (event.key === 'Escape') detail.hide();
    if (!from || event.altKey || event.ctrlKey || event.metaKey) return;
    if (event.key === 'Enter' || event.key === ' ') {
      event.preventDefault();
      press(plateOf(from));
      return;
    }
    const plate = plateOf(plateFrom(list, from, event.key) ?? '');
    if (!plate) return;
    event.preventDefault();
    const view = instance && bringIntoSight(plate, instance.getViewport(), frame);
    if (view) instance.setViewport(view);
    setWalked(plate.id);
  };
  return (
    <DetailLevelContext value={level}>
      <div ref={box} className="contents" onKeyDown={walk} onFocus={tell} onBlur={detail.leave}>
        <ReactFlow
          nodes={nodes}
          edges={edges}
          nodeTypes={nodeTypes}
          edgeTypes={edgeTypes}
          onNodeClick={(_event, node) => press(plateOf(node.id))}
          onEdgeClick={(_event, edge) => onSelect(edge.data.ribbon.link.of[0])}
          onNodeMouseEnter={(_event, node: Node) => {
            const plate = plateOf(node.id);
            if (plate) detail.show({ plate });
          }}
          onNodeMouseLeave={detail.leave}
          onEdgeMouseEnter={(_event, edge) => detail.show({ ribbon: edge.data.ribbon })}
          onEdgeMouseLeave={detail.leave}
          onMoveStart={detail.hide}
          onMove={(event, view) => motion.follow(view, event !== null)}
          nodesDraggable={false}
          nodesConnectable={false}
          nodesFocusable={false}
          edgesUpdatable={false}
          edgesFocusable={false}
          elementsSelectable={false}
          deleteKeyCode={null}
          onInit={(ready) => {
            setInstance(ready);
            frame.show(ready);
          }}
          minZoom={0.05}
          maxZoom={2}
          preventScrolling={false}
          zoomOnScroll={false}
          proOptions={{ hideAttribution: true }}
          aria-label="The chain, drawn. The table of links holds the same facts."
        >
          <Controls showInteractive={false} position="top-right" fitViewOptions={WHOLE} />
          {!frame.isWhole && instance && <MapOfDrawing list={list} frame={frame} instance={instance} />}
        </ReactFlow>
        {detail.pointed && instance && (
          <DetailCard
            pointed={detail.pointed}
            nameOf={nameOf}
            view={instance.getViewport()}
            box={frame}
            onEnter={detail.hold}
            onLeave={detail.leave}
          />
        )}
      </div>
    </DetailLevelContext>
  );
}
