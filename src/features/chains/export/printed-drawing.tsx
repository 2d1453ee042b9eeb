import { useEffect, useMemo, useState } from 'react';
import { flushSync } from 'react-dom';
import type { ChainResponse } from '#shared/contracts/chains.ts';
import type { DisplayList } from '#shared/drawing/display-list.ts';
import { pictureOf } from '#shared/drawing/picture.ts';
import { ShapesView } from '../graph/shapes-view.tsx';
import type { ChainQuestion } from '../question.ts';

interface PrintedDrawingProps {
  chain: ChainResponse;
  question: ChainQuestion;
  list: DisplayList;
}

/** The drawing as it goes to paper: built when the page is printed, from the list and not from the screen. */
export function PrintedDrawing(props: PrintedDrawingProps) {
  const [isPrinting, setPrinting] = useState(false);
  useEffect(() => {
    // The browser takes the page when the event returns: what is drawn later would be missing.
    const begin = () => flushSync(() => setPrinting(true));
    const end = () => setPrinting(false);
    window.addEventListener('beforeprint', begin);
    window.addEventListener('afterprint', end);
    return () => {
      window.removeEventListener('beforeprint', begin);
      window.removeEventListener('afterprint', end);
    };
  }, []);
  return isPrinting ? <Drawn {...props} /> : null;
}

function Drawn({ chain, question, list }: PrintedDrawingProps) {
  const picture = useMemo(() => pictureOf(list, { title: 'The chain, drawn', description: '' }), [list]);
  const { day, known, as, ruleSet, engine } = chain.question;
  const judged = question.verdict === 'today' ? 'now' : 'at use';
  return (
    <figure className="hidden print:block">
      <svg
        viewBox={[picture.x, picture.y, picture.width, picture.height].join(' ')}
        className="mx-auto block h-auto max-h-[185mm] max-w-full"
        width={picture.width}
        role="img"
        aria-label={picture.title}
      >
        {picture.figures.map((figure) => (
          <ShapesView key={`${figure.kind} ${figure.id}`} shapes={figure.shapes} />
        ))}
      </svg>
      <figcaption className="pt-2 text-sm text-ink-2">
        In force on {day}, as known on {known}; links as {as}; judged by what was known {judged}; rule set{' '}
        {ruleSet}, engine {engine}. A line is as wide as the share of the weight’s variance that flows through
        it.
      </figcaption>
    </figure>
  );
}
