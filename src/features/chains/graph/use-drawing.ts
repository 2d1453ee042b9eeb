import { useMemo, useState } from 'react';
import type { ChainResponse } from '#shared/contracts/chains.ts';
import { asDrawn, type AsDrawn } from '#shared/drawing/as-drawn.ts';
import { displayList, type DisplayList, type Marks } from '#shared/drawing/display-list.ts';
import { layoutInput } from '#shared/drawing/layout-of.ts';
import { usePreferences } from '#src/lib/preferences.ts';
import type { ChainQuestion } from '../question.ts';
import { useLayout } from './use-layout.ts';

/** What is drawn, and the places of it. */
export interface Drawn extends AsDrawn {
  list: DisplayList;
  /** Time of the layout in the worker, ms. */
  layoutMs: number;
}

/**
 * The drawing of a chain. While a changed one is laid out, the former stays on screen: null only before the first.
 */
export function useDrawing(
  answer: ChainResponse,
  question: ChainQuestion,
  second: ChainResponse | null,
  marks: Marks | undefined,
): Drawn | null {
  const { decimalMark, uncertainty } = usePreferences();
  const { draw, verdict, effects, only, fold, open } = question;
  const asked = useMemo(
    () => ({ draw, verdict, effects, only, fold, open }),
    [draw, verdict, effects, only, fold, open],
  );
  const part = useMemo(() => asDrawn(answer, asked, second), [answer, asked, second]);
  const input = useMemo(() => layoutInput(part.chain, draw), [part.chain, draw]);
  const laidOut = useLayout(input);
  const drawn = useMemo(
    () =>
      laidOut && {
        ...part,
        list: displayList(part.chain, laidOut.placement, asked, marks, { decimalMark, uncertainty }),
        layoutMs: laidOut.milliseconds,
      },
    [part, laidOut, asked, marks, decimalMark, uncertainty],
  );
  const [former, setFormer] = useState<Drawn | null>(null);
  if (drawn && drawn !== former) setFormer(drawn);
  return drawn ?? former;
}
