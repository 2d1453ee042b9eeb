import type { ChainResponse } from '#shared/contracts/chains.ts';
import type { StatementQuery } from '#shared/contracts/statements.ts';
import { asDrawn } from '#shared/drawing/as-drawn.ts';
import { displayList } from '#shared/drawing/display-list.ts';
import type { LayoutInput, Placement } from '#shared/drawing/layout-input.ts';
import { layoutInput } from '#shared/drawing/layout-of.ts';
import { layoutChain } from '#shared/drawing/layout.ts';
import { pictureOf } from '#shared/drawing/picture.ts';
import type { Picture } from '#shared/drawing/shapes.ts';
import { AppError } from '#server/http/app-error.ts';
import { sha256Of } from './content.ts';
import { legendWords } from './legend-words.ts';
import { focusOf } from './statement.ts';
import { askedWords, quantityWords, weightWords } from './words.ts';

/** Beyond this a drawing takes a second to lay out, and nobody reads it on paper. */
const MOST_PLATES = 400;
/** Placements remembered: whoever takes one document of a chain along often takes a second. */
const MOST_REMEMBERED = 16;
const placements = new Map<string, Placement>();

/** A chain drawn, and how to read it in a sentence. */
export interface DrawnDocument {
  picture: Picture;
  legend: string;
}

/** What a drawing is for. */
interface Purpose {
  /** It leaves its page: then it says under itself what was asked and how to read it. */
  isAlone?: boolean;
  /** The chain of a second value, drawn beside it. */
  second?: ChainResponse | null;
}

/**
 * The chain as the question wants it drawn.
 * @throws AppError `unprocessable` for a chain of more plates than a drawing can hold
 */
export function pictureOfChain(
  chain: ChainResponse,
  query: StatementQuery,
  { isAlone = false, second = null }: Purpose = {},
): DrawnDocument {
  const drawn = asDrawn(chain, query, second);
  refuseUnlessDrawable(drawn.chain.nodes.length);
  const placement = placementOf(layoutInput(drawn.chain, query.draw));
  const list = displayList(drawn.chain, placement, query);
  const legend = legendWords(list);
  const picture = pictureOf(list, {
    title: `Chain of ${weightWords(focusOf(chain))}`,
    description: descriptionOf(chain, query),
    caption: isAlone ? [captionOf(chain, query, second), legend] : [],
  });
  return { picture, legend };
}

/** What was asked, under a drawing that leaves its page. */
function captionOf(chain: ChainResponse, { verdict }: StatementQuery, second: ChainResponse | null): string {
  const focus = focusOf(chain);
  const value = quantityWords(focus.deviation, focus.expandedU, focus.k);
  const beside = second === null ? '' : ` Beside it ${weightWords(focusOf(second))}.`;
  const judged = verdict === 'today' ? 'known now' : 'known at use';
  return `${weightWords(focus)}: ${value}; certificate ${focus.certificateNo}.${beside} ${askedWords(chain.question)} Judged by what was ${judged}.`;
}

/** The same chain is laid out once. */
function placementOf(input: LayoutInput): Placement {
  const key = sha256Of(JSON.stringify(input));
  const known = placements.get(key);
  if (known) return known;
  const placement = layoutChain(input);
  if (placements.size >= MOST_REMEMBERED) placements.delete(placements.keys().next().value!);
  placements.set(key, placement);
  return placement;
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
