import {
  type EstimateShare,
  truncateDegreesOfFreedom,
  welchSatterthwaite,
} from '../uncertainty/effective-degrees-of-freedom.ts';

/** One independent contribution to a variance. Equal `estimate` names rest on one variance estimate. */
export type VarianceTerm = { variance: number; degreesOfFreedom: number; estimate?: string };

/**
 * Effective degrees of freedom after Welch and Satterthwaite (JCGM 100:2008, G.4.1, G.2b) over distinct variance
 * estimates: a pooled standard deviation that enters at several places of a chain counts once. Truncated to an
 * integer; infinite where no finite estimate contributes. Where terms of one estimate state different degrees of
 * freedom the smallest counts.
 */
export function chainDegreesOfFreedom(terms: readonly VarianceTerm[]): number {
  const estimates = new Map<string | VarianceTerm, EstimateShare>();
  for (const term of terms) {
    const key = term.estimate ?? term;
    const known = estimates.get(key) ?? { variance: 0, degreesOfFreedom: Infinity };
    estimates.set(key, {
      variance: known.variance + term.variance,
      degreesOfFreedom: Math.min(known.degreesOfFreedom, term.degreesOfFreedom),
    });
  }
  return truncateDegreesOfFreedom(welchSatterthwaite([...estimates.values()]));
}
