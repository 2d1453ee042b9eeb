import { Decimal } from '#shared/decimal.ts';
import type { ValueFacts } from './facts.ts';
import { mpeOf } from './mpe.ts';
import { certificateText, expandedUText, valueText } from './numbers.ts';
import { cannotBeJudged, doesNotApply, type Finding } from './rule.ts';

/** What the rules about a class statement need, or the finding that ends them. */
export type ClassStatement =
  | { finding: Finding }
  | { finding: null; parameters: Record<string, string>; mpe: Decimal; expandedU: Decimal; factor: Decimal };

/** Sentences of `classStatement`, for every rule that uses it. */
export const CLASS_SENTENCES = {
  'no class': 'Certificate {certificate} states no class.',
  mass: 'The classes limit conventional mass; {certificate} states mass.',
  'no limit': 'Class {class} has no maximum permissible error at this nominal value.',
  'no uncertainty': 'Certificate {certificate} states class {class} and no U with its k.',
} as const;

/**
 * The class statement of a value with its limit (g), U at k = 2 (g) and the factor 2/k. OIML R 111-1, 5.2 and 5.3
 * speak of U at k = 2.
 */
export function classStatement(value: ValueFacts): ClassStatement {
  const known = { certificate: certificateText(value), class: value.class ?? '' };
  if (value.class === null) return { finding: doesNotApply('no class', known) };
  if (value.quantity === 'mass') return { finding: doesNotApply('mass', known) };
  const mpe = mpeOf(value);
  if (mpe === null) return { finding: doesNotApply('no limit', known) };
  if (value.expandedU === null || value.k === null)
    return { finding: cannotBeJudged('no uncertainty', known) };
  const factor = new Decimal(2).div(value.k);
  const parameters = {
    ...known,
    registryNo: value.registryNo,
    value: valueText(value),
    expandedU: expandedUText(value),
    mpe: `${mpe.times(1000).toFixed()} mg`,
    limit: `${mpe.times(1000).div(3).toSignificantDigits(4).toFixed()} mg`,
  };
  return { finding: null, parameters, mpe, expandedU: new Decimal(value.expandedU).times(factor), factor };
}
