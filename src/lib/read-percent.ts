import { readDecimal } from './read-decimal.ts';

/**
 * Why an entry is no part of U in percent; undefined where it is one.
 * @param text plain decimal text, or what was typed where that cannot be read
 */
export function percentProblem(text: string, largest: number): string | undefined {
  const read = readDecimal(text, '.');
  const percent = read.kind === 'number' ? Number(read.value) : NaN;
  if (percent >= 0 && percent <= largest) return undefined;
  const received = text.trim() === '' ? 'nothing was written' : `received "${text.trim()}"`;
  return `Write a part of U from 0 to ${largest} %, such as 10; ${received}.`;
}
