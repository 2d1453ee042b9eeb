import { useMemo } from 'react';
import ReactFlow, { Controls, type Edge, type EdgeTypes, type Node, type NodeTypes } from 'reactflow';
import 'reactflow/dist/style.css';
import './chain-graph.css';
import type { ChainResponse } from '#shared/contracts/chains.ts';
import { Waiting } from '#src/components/ui/progress.tsx';
import { linkKey } from '#shared/drawing/drawing-question.ts';
import type { ChainQuestion } from '../question.ts';
import { BandNode } from './band-node.tsx';
import { drawnPart } from '#shared/drawing/drawn-part.ts';
import { displayList, layoutInput, type DisplayList, type Marks } from '#shared/drawing/display-list.ts';
import { Frame } from './frame.tsx';
import { PLATE } from '#shared/drawing/geometry.ts';
import { PlateNode } from './plate-node.tsx';
import { RibbonEdge } from './ribbon-edge.tsx';
import { useLayout } from './use-layout.ts';
import type { Drawing } from './view-of.ts';

const nodeTypes: NodeTypes = { plate: PlateNode, band: BandNode };
const edgeTypes: EdgeTypes = { ribbon: RibbonEdge };
/** All of it, however small: what the button of the drawing shows. */
const WHOLE = { padding: 0.04, maxZoom: 1 };

interface ChainGraphProps {
  chain: ChainResponse;
  question: ChainQuestion;
  /** A node's uid, or a link's key. */
  onSelect: (at: string) => void;
  /** What is to be noticed: a plate's id or a link's key, and one short word. */
  marks?: Marks | undefined;
}

/** The chain drawn as a conserved flow from the definition down to the weight. The table beside it says the same. */
export function ChainGraph({ chain: whole, question, onSelect, marks }: ChainGraphProps) {
  const { chain } = useMemo(() => drawnPart(whole, question.effects), [whole, question.effects]);
  const input = useMemo(() => layoutInput(chain, question.draw), [chain, question.draw]);
  const placement = useLayout(input);
  const list = useMemo(
    () => placement && displayList(chain, placement, question, marks),
    [chain, placement, question, marks],
  );
  const drawn = useMemo(
    () => list && { nodes: nodesOf(list, question.at), edges: edgesOf(list, question.at) },
    [list, question.at],
  );
  return (
    <Frame drawing={list && drawingOf(list)}>
      {(show) =>
        drawn ? (
          <ReactFlow
            key={`${chain.focusUid} ${question.draw} ${question.effects}`}
            nodes={drawn.nodes}
            edges={drawn.edges}
            nodeTypes={nodeTypes}
            edgeTypes={edgeTypes}
            onNodeClick={(_event, node) => node.type === 'plate' && onSelect(node.id)}
            onEdgeClick={(_event, edge) => onSelect(edge.id)}
            nodesDraggable={false}
            nodesConnectable={false}
            edgesUpdatable={false}
            edgesFocusable={false}
            deleteKeyCode={null}
            onInit={show}
            minZoom={0.1}
            maxZoom={2}
            preventScrolling={false}
            zoomOnScroll={false}
            proOptions={{ hideAttribution: true }}
            aria-label="The chain, drawn. The table of links holds the same facts."
          >
            <Controls showInteractive={false} position="top-right" fitViewOptions={WHOLE} />
          </ReactFlow>
        ) : (
          <Waiting>Laying the chain out</Waiting>
        )
      }
    </Frame>
  );
}

/** Bounds of the drawing, the band's included; the weight itself stays in sight. */
function drawingOf(list: DisplayList): Drawing {
  const left = Math.min(0, list.band.x);
  const width = Math.max(list.width, list.band.width);
  const focus = list.plates.find((plate) => plate.isFocus)!;
  return { left, width, height: list.height, focusX: focus.x + PLATE.width / 2 };
}

function nodesOf(list: DisplayList, at: string | undefined): Node[] {
  const band: Node = {
    id: 'definition',
    type: 'band',
    position: { x: list.band.x, y: 0 },
    data: list.band,
    selectable: false,
    focusable: false,
  };
  const plates = list.plates.map((plate) => ({
    id: plate.id,
    type: 'plate',
    position: { x: plate.x, y: plate.y },
    data: { plate, isSelected: plate.id === at },
  }));
  return [band, ...plates];
}

function edgesOf(list: DisplayList, at: string | undefined): Edge[] {
  // The widest first: what is drawn later lies above, and a thin line's label stays readable.
  const widestFirst = list.ribbons.toSorted((a, b) => b.width - a.width);
  return widestFirst.map((ribbon) => ({
    id: ribbon.id,
    type: 'ribbon',
    source: ribbon.link.parentUid,
    target: ribbon.link.childUid,
    data: { ribbon, isSelected: linkKey(ribbon.link) === at },
  }));
}
