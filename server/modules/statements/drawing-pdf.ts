import type { ChainResponse } from '#shared/contracts/chains.ts';
import type { DrawingQuery } from '#shared/contracts/statements.ts';
import { picturePage } from '#server/print/picture-page.ts';
import { contentOf } from './content.ts';
import { pictureOfChain } from './drawing.ts';
import { GROUNDS } from './drawing-svg.ts';
import { createdOn } from './foot.ts';

/** The chain as vectors on one page as large as the drawing. */
export function drawingPdf(
  chain: ChainResponse,
  query: DrawingQuery,
  second: ChainResponse | null = null,
): Promise<Buffer> {
  const { picture } = pictureOfChain(chain, query, { isAlone: true, second });
  return picturePage(picture, GROUNDS[query.theme], {
    title: picture.title,
    subject: picture.description,
    keywords: `sha256 ${contentOf(chain).sha256}`,
    created: createdOn(chain),
  });
}
