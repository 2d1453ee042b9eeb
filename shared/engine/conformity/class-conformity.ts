import { Decimal } from '#shared/decimal.ts';
import { requireChoice, requireDecimal, requireNumber } from '../quantity/domain.ts';
import { maximumPermissibleError } from './maximum-permissible-error.ts';
import type { WeightClass } from './r111-2004.ts';

/** Decision rules a laboratory may declare. */
export const DECISION_RULES = ['guarded', 'simple'] as const;

/** The declared decision rule: the two disagree between MPE - U and MPE. */
export type DecisionRule = (typeof DECISION_RULES)[number];

/** Each rule in words, as a report states it. */
const RULE_TEXTS: Readonly<Record<DecisionRule, string>> = {
  guarded: 'OIML R 111-1:2004, 5.3.1: |deviation| <= MPE - U, with U at k = 2',
  simple: 'JCGM 106:2012, 8.2.3: |deviation| <= MPE and U <= MPE/3, with U at k = 2',
};

/** Relative noise of a double that was computed as MPE/3. */
const DOUBLE_NOISE = '1e-12';

/** Whether a reported uncertainty is within its limit, and whether rounding alone makes the difference. */
export type UncertaintyAllowed = boolean | 'within rounding';

/** What the declared rule gives for one weight. */
export interface ClassConformity {
  /** Whether U <= MPE/3; `within rounding` when U is above it by less than half its last digit. */
  uncertaintyAllowed: UncertaintyAllowed;
  /** Whether the declared rule accepts; null where the class is not defined at this nominal value. */
  conforms: boolean | null;
  /** Maximum permissible error in mg, or null. */
  mpe: Decimal | null;
  /** The rule that was applied. */
  rule: string;
}

/** Whether an expanded uncertainty is at most a third of a maximum permissible error, the noise of a double allowed. */
export function isWithinThird(expandedUncertainty: Decimal, mpe: Decimal): boolean {
  return expandedUncertainty.lte(mpe.div(3).times(new Decimal(1).plus(DOUBLE_NOISE)));
}

/**
 * Whether an expanded uncertainty is at most a third of a maximum permissible error. The third is exact: a printed
 * 0.17 mg may be 0.166 mg rounded, so it straddles 0.5 mg / 3 and is no finding.
 *
 * @param expandedUncertainty in mg, k = 2
 * @param mpe in mg
 * @param decimals decimals as reported; those of the shortest text of the number when left out
 */
function judgeUncertainty(
  expandedUncertainty: number,
  mpe: Decimal,
  decimals: number | undefined,
): UncertaintyAllowed {
  const held = new Decimal(expandedUncertainty);
  const limit = mpe.div(3);
  if (isWithinThird(held, mpe)) return true;
  const halfDigit = new Decimal(10).pow(-(decimals ?? held.decimalPlaces())).div(2);
  return held.minus(halfDigit).lte(limit) ? 'within rounding' : false;
}

/**
 * What the declared decision rule gives for the conventional mass of one weight in one class. It applies the rule
 * as written and pronounces nothing else: a weight it does not accept is not shown to be outside its class.
 *
 * Sources: OIML R 111-1:2004, 5.2 (second-hand) and 5.3.1 (from memory); JCGM 106:2012, 8.2.3.
 *
 * @param a.class accuracy class
 * @param a.nominal in g
 * @param a.deviation conventional mass minus nominal, in mg
 * @param a.expandedUncertainty in mg, k = 2
 * @param a.decisionRule `guarded` unless the laboratory declares the other
 * @param a.uncertaintyDecimals decimals of the uncertainty as reported, where trailing zeros matter
 * @throws EngineError `unknown-choice`, `not-finite` or `out-of-range`, naming the argument
 */
export function classConformity(a: {
  class: WeightClass;
  nominal: Decimal;
  deviation: Decimal;
  expandedUncertainty: number;
  decisionRule?: DecisionRule;
  uncertaintyDecimals?: number;
}): ClassConformity {
  const decisionRule = requireChoice(a.decisionRule ?? 'guarded', 'decisionRule', DECISION_RULES);
  const deviation = requireDecimal(a.deviation, 'deviation').abs();
  const expanded = requireNumber(a.expandedUncertainty, 'expandedUncertainty', { min: 0, unit: 'mg' });
  const decimals =
    a.uncertaintyDecimals === undefined
      ? undefined
      : requireNumber(a.uncertaintyDecimals, 'uncertaintyDecimals', { min: 0, max: 40 });
  const mpe = maximumPermissibleError(a.class, a.nominal);
  const rule = RULE_TEXTS[decisionRule];
  if (mpe === null) return { uncertaintyAllowed: false, conforms: null, mpe, rule };
  const uncertaintyAllowed = judgeUncertainty(expanded, mpe, decimals);
  const conforms =
    decisionRule === 'guarded'
      ? deviation.lte(mpe.minus(expanded))
      : deviation.lte(mpe) && uncertaintyAllowed !== false;
  return { uncertaintyAllowed, conforms, mpe, rule };
}
