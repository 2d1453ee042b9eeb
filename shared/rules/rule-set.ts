import type { z } from 'zod';
import type { ChainRule } from '#shared/contracts/chains.ts';
import { weightIdentified } from './b-01-weight-identified.ts';
import { nominalInSeries } from './b-02-nominal-in-series.ts';
import { densityIsOnRecord } from './b-03-density-on-record.ts';
import { densityWithinClass } from './b-04-density-within-class.ts';
import { magnetismWithinClass } from './b-06-magnetism-within-class.ts';
import { referenceWithinEpoch } from './b-08-epoch-of-reference.ts';
import { shapeOfClass } from './b-09-shape-of-class.ts';
import { referenceNamed } from './b-10-reference-named.ts';
import { referencePerResult } from './b-11-reference-per-result.ts';
import { referenceDeterminedFirst } from './b-12-reference-determined-first.ts';
import { referenceIssuedFirst } from './b-13-reference-issued-first.ts';
import { referenceInDate } from './b-14-reference-in-date.ts';
import { referenceInForce } from './b-15-reference-in-force.ts';
import { quantityKind } from './b-16-quantity-kind.ts';
import { signOfCorrection } from './b-17-sign-of-correction.ts';
import { unitOfValue } from './b-18-unit.ts';
import { changeSinceLast } from './b-19-change-since-last.ts';
import { massAndConventional } from './b-20-mass-and-conventional.ts';
import { uCoversWhatIsCarried } from './b-21-u-covers-what-is-carried.ts';
import { uOfReference } from './b-22-u-of-reference.ts';
import { driftOfReference } from './b-23-drift-of-reference.ts';
import { noticesIncluded } from './b-24-notices-included.ts';
import { buoyancyCounted } from './b-25-buoyancy-counted.ts';
import { uNotBelowBestCapability } from './b-26-best-capability.ts';
import { withinScope } from './b-27-within-scope.ts';
import { statementOfU } from './b-28-statement-of-u.ts';
import { uWithinThirdOfMpe } from './b-29-u-within-third-of-mpe.ts';
import { classByDeclaredRule } from './b-30-class-by-declared-rule.ts';
import { decisionRuleStated } from './b-31-decision-rule-stated.ts';
import { factorForFewDegrees } from './b-32-factor-for-few-degrees.ts';
import { beforeAndAfterAdjustment } from './b-36-before-and-after-adjustment.ts';
import { signatoryAuthorised } from './b-38-signatory-authorised.ts';
import { amendmentSaysWhy } from './b-40-amendment-says-why.ts';
import { contentsForClassE } from './b-42-contents-for-class-e.ts';
import { unbrokenToReference } from './b-43-unbroken-to-reference.ts';
import { noCircle } from './b-44-no-circle.ts';
import { providerAccepted } from './b-45-provider-accepted.ts';
import { chainVariance } from './b-46-chain-variance.ts';
import { criticalParameter } from './b-47-critical-parameter.ts';
import { sharedAncestor } from './b-48-shared-ancestor.ts';
import { agesAlongChain } from './b-49-ages.ts';
import { scaleVersionConstant } from './b-50-scale-version.ts';
import { secondaryBranches } from './b-52-secondary-branches.ts';
import { programmeJustified } from './b-53-programme-justified.ts';
import { intervalWithinReason } from './b-54-interval-within-reason.ts';
import { newestValueUsed } from './b-81-newest-value-used.ts';
import { clauseOn } from './clauses.ts';
import type { Rule } from './rule.ts';
import { duplicatesExchanged } from './x-01-duplicates-exchanged.ts';

/** Part of every question and stored with every audit: changes with any rule, sentence or clause. */
export const RULE_SET_VERSION = '2026-12-01.2';

/** Every rule, in the order of the list. */
export const RULES: readonly Rule[] = [
  weightIdentified,
  nominalInSeries,
  densityIsOnRecord,
  densityWithinClass,
  magnetismWithinClass,
  referenceWithinEpoch,
  shapeOfClass,
  referenceNamed,
  referencePerResult,
  referenceDeterminedFirst,
  referenceIssuedFirst,
  referenceInDate,
  referenceInForce,
  quantityKind,
  signOfCorrection,
  unitOfValue,
  changeSinceLast,
  massAndConventional,
  uCoversWhatIsCarried,
  uOfReference,
  driftOfReference,
  noticesIncluded,
  buoyancyCounted,
  uNotBelowBestCapability,
  withinScope,
  statementOfU,
  uWithinThirdOfMpe,
  classByDeclaredRule,
  decisionRuleStated,
  factorForFewDegrees,
  beforeAndAfterAdjustment,
  signatoryAuthorised,
  amendmentSaysWhy,
  contentsForClassE,
  unbrokenToReference,
  noCircle,
  providerAccepted,
  chainVariance,
  criticalParameter,
  sharedAncestor,
  agesAlongChain,
  scaleVersionConstant,
  secondaryBranches,
  programmeJustified,
  intervalWithinReason,
  newestValueUsed,
  duplicatesExchanged,
];

/**
 * The rules as a reply tells them: once each, with clause and sentences.
 * @param day the day whose editions apply
 */
export function rulesInWords(day: string): z.infer<typeof ChainRule>[] {
  return RULES.map(({ id, title, severity, scope, isLasting = false, sentences }) => {
    const { clause, edition } = clauseOn(id, day);
    return { id, title, clause, edition, severity, scope, isLasting, sentences: { ...sentences } };
  });
}
