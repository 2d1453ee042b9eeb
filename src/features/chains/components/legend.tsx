import type { DisplayList } from '#shared/drawing/display-list.ts';
import { legendOf } from '#shared/drawing/legend.ts';
import { legendSample, SAMPLE } from '#shared/drawing/legend-shapes.ts';
import { ShapesView } from '../graph/shapes-view.tsx';
import type { ChainQuestion } from '../question.ts';

/** How to read the drawing: a sample of each sign in it and its words. */
export function Legend({ list, question }: { list: DisplayList; question: ChainQuestion }) {
  return (
    <div className="pt-2 text-sm text-ink-2">
      <ul aria-label="How to read the drawing" className="grid gap-x-6 gap-y-1 sm:grid-cols-2">
        {legendOf(list).map(({ sign, says }) => (
          <li key={sign} className="flex items-start gap-2.5">
            <svg
              width={SAMPLE.width}
              height={SAMPLE.height}
              aria-hidden="true"
              className="mt-0.5 shrink-0 overflow-visible"
            >
              <ShapesView shapes={legendSample(sign)} />
            </svg>
            {says}
          </li>
        ))}
      </ul>
      <p className="pt-1 print:hidden">
        Arrow keys walk from plate to plate, Enter opens one.
        {question.effects === 'main' && ' Shared effects below 1 % are shown when asked for.'}
      </p>
    </div>
  );
}
