import type { ChainResponse } from '#shared/contracts/chains.ts';
import type { StatementQuery } from '#shared/contracts/statements.ts';
import { asDrawn } from '#shared/drawing/as-drawn.ts';
import { displayList } from '#shared/drawing/display-list.ts';
import { layoutInput } from '#shared/drawing/layout-of.ts';
import { layoutChain } from '#shared/drawing/layout.ts';
import { pictureOf } from '#shared/drawing/picture.ts';
import type { Picture } from '#shared/drawing/shapes.ts';
import { AppError } from '#server/http/app-error.ts';
import { focusOf } from './statement.ts';
import { askedWords, quantityWords, weightWords } from './words.ts';

/** Beyond this a drawing takes seconds to lay out and nobody reads it on paper. */
const MOST_PLATES = 700;

/** How to read the drawing, under one that leaves its page. */
const LEGEND =
  'A line is as wide as the share of the weight\u2019s variance that flows through it; grey stubs are what a value adds of its own. Dashed: a negative flow, where correlations cancel. Dotted: informs, nothing flows. A hairline is too thin for the scale. Hatched: a check warns. Parted in its middle: a check fails.';

/**
 * The chain as the question wants it drawn.
 * @param isAlone whether it leaves its page: then it says under itself what was asked and how to read it
 * @throws AppError `unprocessable` for a chain of more plates than a drawing can hold
 */
export function pictureOfChain(chain: ChainResponse, query: StatementQuery, isAlone: boolean): Picture {
  const drawn = asDrawn(chain, query);
  refuseUnlessDrawable(drawn.chain.nodes.length);
  const placement = layoutChain(layoutInput(drawn.chain, query.draw));
  const focus = focusOf(chain);
  const judged = query.verdict === 'today' ? 'known now' : 'known at use';
  return pictureOf(displayList(drawn.chain, placement, query), {
    title: `Chain of ${weightWords(focus)}`,
    description: descriptionOf(chain, query),
    caption: isAlone
      ? [
          `${weightWords(focus)}: ${quantityWords(focus.deviation, focus.expandedU, focus.k)}; certificate ${focus.certificateNo}. ${askedWords(chain.question)} Judged by what was ${judged}.`,
          LEGEND,
        ]
      : [],
  });
}

function refuseUnlessDrawable(plates: number): void {
  if (plates <= MOST_PLATES) return;
  const message = `This drawing would hold ${plates} plates, more than ${MOST_PLATES}. Fold them by laboratory, or ask for what fails only.`;
  throw new AppError('unprocessable', message, {
    fields: { fold: { message, received: String(plates), expected: 'fold=laboratory or only=fails' } },
  });
}

/** The drawing in words, for those who do not see it. */
function descriptionOf(chain: ChainResponse, { verdict }: StatementQuery): string {
  const counts = chain.summary[verdict];
  return `A conserved flow of variance from the definition of the kilogram down to the weight. Of ${chain.summary.links} links ${counts.sound} hold their checks, ${counts.broken} fail one, ${counts.caution} call for caution, ${counts.notJudged} cannot be judged. ${askedWords(chain.question)}`;
}
