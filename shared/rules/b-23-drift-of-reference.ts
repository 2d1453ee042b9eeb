import type { ValueFacts } from './facts.ts';
import { certificateText } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ValueRule } from './rule.ts';
import type { LeaningFacts } from './weight-facts.ts';

/** How a component that stands for a reference's change is called; the names are free text. */
const CHANGE = /drift|stab|since (its|their|the|last)|long.?term|ag(e?)ing|wear/i;
/** One component alone breaks nothing down. */
const FEWEST_COMPONENTS = 2;
/** A component that speaks of the reference in some way. */
const REFERENCE = /reference|standard/i;

/**
 * The budget counts what a reference may have changed since its calibration: by a component, or by a drift source of
 * the reference. A budget is judged by the names of its components, so that one which speaks of the reference
 * without saying more is left open.
 */
export const driftOfReference: ValueRule = {
  id: 'B-23',
  title: 'Change of the reference since its calibration counted',
  scope: 'value',
  severity: 'major',
  verdicts: ['conduct'],
  isLasting: true,
  sentences: {
    counted: 'Certificate {certificate} counts what {references} may have changed since calibration.',
    'left out':
      'The budget of certificate {certificate} for {registryNo} has no term for what {references} may have changed since calibration; add one, or say why there is none.',
    unnamed:
      'The budget of certificate {certificate} speaks of the reference; whether its change since calibration is meant, the name does not say.',
    'no budget':
      'Certificate {certificate} is on record without a budget that is broken down; whether the change of {references} since calibration is counted cannot be seen.',
    received: 'Certificate {certificate} was entered by its recipient: its budget stays with {issuer}.',
    'no reference': 'Certificate {certificate} leans on no weight that could have changed.',
    'counted otherwise':
      '{references} was used by its class limit, a fit or bracketing, which count its change already.',
  },
  judge(value) {
    const { components, effects, references } = value.budget;
    const leaning = references.filter(canDrift);
    const known = textsOf(value, leaning.length > 0 ? leaning : references);
    if (references.length === 0) return doesNotApply('no reference', known);
    if (leaning.length === 0)
      return doesNotApply(references.every(isNoWeight) ? 'no reference' : 'counted otherwise', known);
    if (components.some((name) => CHANGE.test(name))) return holds('counted', known);
    const open = leaning.filter(
      ({ standardId }) =>
        !effects.some((effect) => effect.kind === 'drift' && effect.standardId === standardId),
    );
    if (open.length === 0) return holds('counted', known);
    if (components.length < FEWEST_COMPONENTS) {
      return value.registeredByIssuer
        ? cannotBeJudged('no budget', known, 'information')
        : doesNotApply('received', known);
    }
    if (components.some((name) => REFERENCE.test(name))) return cannotBeJudged('unnamed', known, 'minor');
    return fails('left out', textsOf(value, open));
  },
};

function isNoWeight({ kind, rootKind }: LeaningFacts): boolean {
  return kind === 'realization' || kind === 'consensus value' || rootKind === 'earlier definition';
}

function canDrift(reference: LeaningFacts): boolean {
  return !isNoWeight(reference) && (reference.usedAs === 'certificate' || reference.usedAs === 'by notice');
}

function textsOf(value: ValueFacts, references: readonly LeaningFacts[]): Record<string, string> {
  return {
    certificate: certificateText(value),
    registryNo: value.registryNo,
    issuer: value.issuer.name,
    references: [...new Set(references.map((reference) => reference.registryNo))].join(', '),
  };
}
