import type { DisplayList } from '#shared/drawing/display-list.ts';
import { legendOf, type LegendSign } from '#shared/drawing/legend.ts';

/** How each sign of a drawing looks, in words. */
const LOOKS: Readonly<Record<LegendSign, string>> = {
  flow: 'band',
  hairline: 'hairline',
  negative: 'dashed',
  informing: 'dotted',
  beside: 'dashed hairline',
  broken: 'parted, with a cross',
  caution: 'hatched, with a triangle',
  'own part': 'grey stub',
  'unknown part': 'hatched stub with a question mark',
  root: 'double rule',
  group: 'pile',
  shared: 'ring of brass',
};

/** How to read a drawing, in a sentence: only the signs that occur in it. */
export function legendWords(list: DisplayList): string {
  const entries = legendOf(list).map(({ sign, says }) => `${LOOKS[sign]}, ${says}`);
  return `How to read it: ${entries.join('; ')}.`;
}
