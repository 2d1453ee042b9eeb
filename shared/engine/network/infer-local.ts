import { Decimal } from '#shared/decimal.ts';
import { EngineError } from '../errors.ts';
import { requireNumber } from '../quantity/domain.ts';

const PLAIN_DECIMAL = /^\d+(\.\d+)?$/;

/**
 * The local part of a value whose certificate states only U and k: `l^2 = (U/k)^2 - carried variance`, taken once
 * at issue. U is rounded, so it stands for the interval (U +/- half a last digit)/k:
 * `deficit` (l = 0): even the upper end is below what the parents carry; `within rounding` (l = 0): the carried
 * uncertainty lies in the interval, so l cannot be told from 0; `holds`: l is told from 0.
 * Source: JCGM 100:2008, 4.3.3 for U/k; the interval of a rounded number is a definition of our own.
 * @param a.expandedUncertainty text as printed, since its last digit matters, in the network's unit
 * @param a.carriedVariance variance the parents bring, each with its uncertainty as used
 * @throws EngineError `not-a-number`, `not-finite`, `out-of-range`
 */
export function inferLocal(a: {
  expandedUncertainty: string;
  coverageFactor: number;
  carriedVariance: number;
}): {
  local: number;
  verdict: 'holds' | 'within rounding' | 'deficit';
} {
  const text = a.expandedUncertainty.trim();
  if (!PLAIN_DECIMAL.test(text)) {
    throw new EngineError(
      'not-a-number',
      'expandedUncertainty',
      `"${a.expandedUncertainty}"`,
      'Write U as printed, a plain decimal such as 0.030 without exponent or unit.',
    );
  }
  requireNumber(a.coverageFactor, 'coverageFactor', { above: 0 });
  requireNumber(a.carriedVariance, 'carriedVariance', { min: 0 });
  const decimals = text.split('.')[1]?.length ?? 0;
  const half = new Decimal(`5e${-decimals - 1}`);
  const varianceOf = (expanded: Decimal) => {
    const u = expanded.div(a.coverageFactor);
    return u.times(u);
  };
  const carried = new Decimal(a.carriedVariance);
  const stated = new Decimal(text);
  if (carried.gt(varianceOf(stated.plus(half)))) return { local: 0, verdict: 'deficit' };
  if (carried.gte(varianceOf(Decimal.max(0, stated.minus(half)))))
    return { local: 0, verdict: 'within rounding' };
  return { local: Math.sqrt(varianceOf(stated).minus(carried).toNumber()), verdict: 'holds' };
}
