import type { ChainResponse } from '#shared/contracts/chains.ts';
import type { DrawingQuery } from '#shared/contracts/statements.ts';
import { LAMP, PAPER, PRINT } from '#shared/drawing/inks.ts';
import { toSvg } from '#shared/drawing/to-svg.ts';
import { pictureOfChain } from './drawing.ts';
import { fontRules } from './font-rules.ts';

/** The inks that a drawing may be asked for. */
export const GROUNDS = { paper: PAPER, lamp: LAMP, print: PRINT } as const;

/** The chain as an SVG that stands alone, its fonts and its ground in it. */
export function drawingSvg(
  chain: ChainResponse,
  query: DrawingQuery,
  second: ChainResponse | null = null,
): string {
  const { picture } = pictureOfChain(chain, query, { isAlone: true, second });
  return toSvg(picture, { inks: GROUNDS[query.theme], fontRules: fontRules(), hasGround: true });
}
