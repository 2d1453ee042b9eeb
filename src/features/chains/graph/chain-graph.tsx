import type { ChainResponse } from '#shared/contracts/chains.ts';
import type { Marks } from '#shared/drawing/display-list.ts';
import { Button } from '#src/components/ui/button.tsx';
import { Waiting } from '#src/components/ui/progress.tsx';
import { Legend } from '../components/legend.tsx';
import { PrintedDrawing } from '../export/printed-drawing.tsx';
import type { ChainQuestion } from '../question.ts';
import { BRIEF_BELOW } from './brief-plate.ts';
import { ChainDrawing } from './chain-drawing.tsx';
import { DrawingBar } from './drawing-bar.tsx';
import { drawnNames } from './drawn-names.ts';
import { Frame } from './frame.tsx';
import { openGroup } from './opened-groups.ts';
import { TogetherLine } from './together-line.tsx';
import { useDrawing } from './use-drawing.ts';
import { useSecondWeight } from './use-second-weight.ts';
import type { View } from './view-of.ts';

interface ChainGraphProps {
  chain: ChainResponse;
  question: ChainQuestion;
  /** A node's uid, or a link's key. */
  onSelect: (at: string) => void;
  /** Changes how the chain is drawn; without it the drawing has no controls of its own. */
  onChange?: ((change: Partial<ChainQuestion>) => void) | undefined;
  /** What is to be noticed: a plate's id or a link's key, and one short word. */
  marks?: Marks | undefined;
}

/** The chain drawn as a conserved flow from the definition down to the weight. The table beside it says the same. */
export function ChainGraph({ chain, question, onSelect, onChange, marks }: ChainGraphProps) {
  const second = useSecondWeight(chain.focusUid, question);
  const drawn = useDrawing(chain, question, second?.chain ?? null, marks);
  const list = drawn?.list ?? null;
  const nameOf = drawnNames(chain, second?.chain ?? null, list);
  return (
    <div data-layout-ms={drawn?.layoutMs}>
      {drawn && onChange && (
        <DrawingBar
          drawn={drawn}
          question={question}
          focusUid={chain.focusUid}
          second={second?.chain ?? null}
          onChange={onChange}
        />
      )}
      {second && (
        <TogetherLine
          chain={chain}
          second={second}
          shared={drawn?.chain.second?.shared.size ?? 0}
          isBeside={(drawn?.chain.second?.beside.size ?? 0) > 0}
        />
      )}
      <Frame
        key={chain.focusUid}
        list={list}
        note={(view) => <FrameNote {...{ view, question, onChange }} />}
      >
        {(frame) =>
          list ? (
            <ChainDrawing
              list={list}
              at={question.at}
              nameOf={nameOf}
              frame={frame}
              onSelect={onSelect}
              onOpen={(group) => onChange?.({ open: openGroup(question.open, group) })}
            />
          ) : (
            <Waiting>Laying the chain out</Waiting>
          )
        }
      </Frame>
      {drawn && <PrintedDrawing chain={chain} question={question} list={drawn.list} />}
      {drawn && <Legend list={drawn.list} question={question} />}
    </div>
  );
}

interface FrameNoteProps {
  view: View & { isWhole: boolean };
  question: ChainQuestion;
  onChange: ChainGraphProps['onChange'];
}

/** That the drawing does not show everything at once, and what to do. */
function FrameNote({ view, question, onChange }: FrameNoteProps) {
  if (view.isWhole && view.zoom >= BRIEF_BELOW) return null;
  return (
    <p className="pt-1 text-sm text-ink-2">
      {view.isWhole
        ? 'Drawn small: plates show number and state. Zoom in to read them, or point at one.'
        : 'The drawing is larger than its frame: drag it, or show all of it with the last of its buttons.'}{' '}
      {onChange && question.place !== 'wide' && (
        <Button weight="text" className="max-columns:hidden" onClick={() => onChange({ place: 'wide' })}>
          Draw it page-wide
        </Button>
      )}
    </p>
  );
}
