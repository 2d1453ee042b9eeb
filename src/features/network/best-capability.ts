import { Decimal, decimalText } from '#shared/decimal.ts';
import type { ScopeLine } from '#shared/contracts/network.ts';
import type { z } from 'zod';

export type Line = z.infer<typeof ScopeLine>;

/**
 * The best measurement capability of a scope line at a nominal.
 * @param nominal grams
 * @returns expanded uncertainty, grams as text, at the k of the line
 */
export function bestU(line: Pick<Line, 'bestUConstant' | 'bestURelative'>, nominal: string): string {
  return decimalText(new Decimal(line.bestUConstant).plus(new Decimal(line.bestURelative).times(nominal)));
}

/** The two parts of U = constant + relative times m; a part that is zero is left out. */
export function partsOfBestU(line: Pick<Line, 'bestUConstant' | 'bestURelative'>): {
  constant: string | null;
  relative: string | null;
} {
  const isConstant = !new Decimal(line.bestUConstant).isZero();
  const isRelative = line.bestURelative !== 0;
  return {
    constant: isConstant || !isRelative ? line.bestUConstant : null,
    relative: isRelative ? decimalText(new Decimal(line.bestURelative)) : null,
  };
}
