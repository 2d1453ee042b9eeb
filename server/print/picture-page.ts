import type { Inks } from '#shared/drawing/inks.ts';
import type { Picture } from '#shared/drawing/shapes.ts';
import { finished, newPaper, type DocumentWords } from './document.ts';
import { drawPicture } from './draw-picture.ts';

/** A page is at most 200 inches wide or high (ISO 32000-1, annex C), 14 400 points. */
const LARGEST_PAGE = 14_400;

/** A picture alone on a page of its own size. */
export function picturePage(picture: Picture, inks: Inks, words: DocumentWords): Promise<Buffer> {
  const scale = Math.min(0.75, LARGEST_PAGE / Math.max(picture.width, picture.height));
  const paper = newPaper(words);
  const [width, height] = [picture.width * scale, picture.height * scale];
  paper.addPage({ size: [width, height], margin: 0 });
  paper.rect(0, 0, width, height).fill(inks.paper);
  drawPicture(paper, picture, { x: 0, y: 0, scale }, inks);
  return finished(paper);
}
