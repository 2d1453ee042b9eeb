import type { z } from 'zod';
import type { ChainRule } from '#shared/contracts/chains.ts';
import { referenceWithinEpoch } from './b-08-epoch-of-reference.ts';
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
import { noticesIncluded } from './b-24-notices-included.ts';
import { uNotBelowBestCapability } from './b-26-best-capability.ts';
import { withinScope } from './b-27-within-scope.ts';
import { statementOfU } from './b-28-statement-of-u.ts';
import { uWithinThirdOfMpe } from './b-29-u-within-third-of-mpe.ts';
import { classByDeclaredRule } from './b-30-class-by-declared-rule.ts';
import { unbrokenToReference } from './b-43-unbroken-to-reference.ts';
import { noCircle } from './b-44-no-circle.ts';
import { providerAccepted } from './b-45-provider-accepted.ts';
import { chainVariance } from './b-46-chain-variance.ts';
import { criticalParameter } from './b-47-critical-parameter.ts';
import { sharedAncestor } from './b-48-shared-ancestor.ts';
import { scaleVersionConstant } from './b-50-scale-version.ts';
import { newestValueUsed } from './b-81-newest-value-used.ts';
import { clauseOn } from './clauses.ts';
import type { Rule } from './rule.ts';
import { duplicatesExchanged } from './x-01-duplicates-exchanged.ts';

/** Part of every question and stored with every audit: changes with any rule, sentence or clause. */
export const RULE_SET_VERSION = '2026-12-01.2';

/** Every rule, in the order of the list. */
export const RULES: readonly Rule[] = [
  referenceWithinEpoch,
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
  noticesIncluded,
  uNotBelowBestCapability,
  withinScope,
  statementOfU,
  uWithinThirdOfMpe,
  classByDeclaredRule,
  unbrokenToReference,
  noCircle,
  providerAccepted,
  chainVariance,
  criticalParameter,
  sharedAncestor,
  scaleVersionConstant,
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
