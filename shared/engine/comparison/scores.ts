import { requireNumber } from '../quantity/domain.ts';

/**
 * Normalised error `(x - x_pt) / sqrt(U^2(x) + U^2(x_pt))` (ISO 13528:2015 9.7): both U at the same coverage factor,
 * and the reference value independent of the result. For members use the degree of equivalence.
 * @throws EngineError `not-finite`, `out-of-range`
 */
export function enScore(a: {
  value: number;
  expandedUncertainty: number;
  reference: number;
  referenceExpandedUncertainty: number;
}): number {
  return ratio(a.value, a.reference, [
    ['expandedUncertainty', a.expandedUncertainty],
    ['referenceExpandedUncertainty', a.referenceExpandedUncertainty],
  ]);
}

/**
 * Zeta score `(x - x_pt) / sqrt(u^2(x) + u^2(x_pt))` (ISO 13528:2015 9.6), with standard uncertainties.
 * @throws EngineError `not-finite`, `out-of-range`
 */
export function zetaScore(a: {
  value: number;
  standardUncertainty: number;
  reference: number;
  referenceStandardUncertainty: number;
}): number {
  return ratio(a.value, a.reference, [
    ['standardUncertainty', a.standardUncertainty],
    ['referenceStandardUncertainty', a.referenceStandardUncertainty],
  ]);
}

/**
 * z score `(x - x_pt) / sigma_pt` (ISO 13528:2015 9.4). See `zScoreAllowed` for when it may be used.
 * @throws EngineError `not-finite`, `out-of-range`
 */
export function zScore(a: { value: number; reference: number; standardDeviation: number }): number {
  return ratio(a.value, a.reference, [['standardDeviation', a.standardDeviation]]);
}

/**
 * z' score `(x - x_pt) / sqrt(sigma_pt^2 + u^2(x_pt))` (ISO 13528:2015 9.5), for an uncertain reference value.
 * @throws EngineError `not-finite`, `out-of-range`
 */
export function zPrimeScore(a: {
  value: number;
  reference: number;
  standardDeviation: number;
  referenceStandardUncertainty: number;
}): number {
  return ratio(a.value, a.reference, [
    ['standardDeviation', a.standardDeviation],
    ['referenceStandardUncertainty', a.referenceStandardUncertainty],
  ]);
}

/**
 * Whether the reference value is certain enough for a z score: `u(x_pt) < 0.3 sigma_pt` (ISO 13528:2015 9.2.1).
 * @throws EngineError `not-finite`, `out-of-range`
 */
export function zScoreAllowed(a: {
  referenceStandardUncertainty: number;
  standardDeviation: number;
}): boolean {
  requireNumber(a.referenceStandardUncertainty, 'referenceStandardUncertainty', { min: 0 });
  requireNumber(a.standardDeviation, 'standardDeviation', { above: 0 });
  return a.referenceStandardUncertainty < 0.3 * a.standardDeviation;
}

/**
 * What a z, z' or zeta score signals: above 2 a warning, from 3 on an action (ISO 13528:2015 9.4.2).
 * @throws EngineError `not-finite`
 */
export function scoreSignal(score: number): 'none' | 'warning' | 'action' {
  const size = Math.abs(requireNumber(score, 'score'));
  if (size >= 3) return 'action';
  return size > 2 ? 'warning' : 'none';
}

function ratio(value: number, reference: number, parts: [string, number][]): number {
  requireNumber(value, 'value');
  requireNumber(reference, 'reference');
  parts.forEach(([field, part]) => requireNumber(part, field, { min: 0 }));
  const scale = Math.hypot(...parts.map(([, part]) => part));
  requireNumber(scale, parts[0]![0], { above: 0 });
  return (value - reference) / scale;
}
