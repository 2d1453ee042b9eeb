import { coverageFactor } from '#shared/engine/uncertainty/coverage-factor.ts';
import type { ValueFacts } from './facts.ts';
import { certificateText, percentText, roundedText, statedU } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ValueRule } from './rule.ts';

/** From here on k = 2 gives about 95 % well enough (JCGM 100:2008, G.6.6, from memory). */
const ENOUGH = 10;
const MANY = 1000;
/** A k that is smaller by this part of it is the right one, rounded or at a probability of 95 %. */
const ROUNDING = 0.03;
/** Where the certificate states none: that of k = 2 for a normal distribution. */
const USUAL_COVERAGE = 0.9545;

/**
 * Where few degrees of freedom stand behind U, k is Student's factor for its coverage probability. Stated degrees of
 * freedom count; without them those of the laboratory's own part, with everything else taken as perfectly known,
 * which gives the most there can be.
 */
export const factorForFewDegrees: ValueRule = {
  id: 'B-32',
  title: 'Coverage factor fits the degrees of freedom',
  scope: 'value',
  severity: 'minor',
  verdicts: ['conduct'],
  isLasting: true,
  sentences: {
    enough: 'With {degrees} degrees of freedom k = {k} of certificate {certificate} fits.',
    fits: 'Certificate {certificate} uses k = {k} for {degrees} degrees of freedom; {needed} is needed for {coverage}.',
    'too small':
      'Certificate {certificate} uses k = {k} for {registryNo} with {degrees} degrees of freedom; {needed} is needed for {coverage}.',
    'not on record':
      'The degrees of freedom behind U of certificate {certificate} are neither stated nor to be worked out.',
    'no uncertainty': 'Certificate {certificate} states no U with its k.',
  },
  judge(value) {
    const known = { certificate: certificateText(value), registryNo: value.registryNo, k: value.k ?? '' };
    const u = statedU(value);
    if (u === null || u === 0) return doesNotApply('no uncertainty', known);
    const degrees = degreesOf(value, u);
    if (degrees === null) return cannotBeJudged('not on record', known, 'information');
    const coverage = Number(value.coverage ?? USUAL_COVERAGE);
    const parameters = { ...known, degrees: degreesText(degrees), coverage: percentText(coverage, 4) };
    if (degrees >= ENOUGH) return holds('enough', parameters);
    const needed = coverageFactor(coverage, degrees);
    const withNeeded = { ...parameters, needed: roundedText(needed, 3) };
    const fits = Number(value.k) >= needed * (1 - ROUNDING);
    return fits ? holds('fits', withNeeded) : fails('too small', withNeeded);
  },
};

/** Beyond some the number says nothing more. */
function degreesText(degrees: number): string {
  return degrees > MANY ? `more than ${MANY}` : String(degrees);
}

/** Truncated to an integer, but never to nothing (JCGM 100:2008, G.4.1); null: not known. */
function degreesOf({ budget }: ValueFacts, u: number): number | null {
  const { nuEff, ownU, ownDegreesOfFreedom } = budget;
  if (nuEff !== null) return truncated(nuEff);
  if (ownU === null || ownU === 0 || ownDegreesOfFreedom === null) return null;
  return truncated((u ** 4 / ownU ** 4) * ownDegreesOfFreedom);
}

function truncated(degrees: number): number {
  return Math.max(1, Math.floor(degrees));
}
