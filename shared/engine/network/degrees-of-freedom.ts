/** One independent contribution to a variance. Equal `estimate` names rest on one variance estimate. */
export type VarianceTerm = { variance: number; degreesOfFreedom: number; estimate?: string };

/**
 * Effective degrees of freedom after Welch and Satterthwaite (JCGM 100 G.4.1, G.2b) over distinct variance
 * estimates: a pooled standard deviation that enters at several places of a chain counts once. Truncated to an
 * integer; infinite where no finite estimate contributes. Where terms of one estimate state different degrees of
 * freedom the smallest counts.
 */
export function welchSatterthwaite(terms: readonly VarianceTerm[]): number {
  const estimates = new Map<string | VarianceTerm, { variance: number; degreesOfFreedom: number }>();
  let total = 0;
  for (const term of terms) {
    total += term.variance;
    const key = term.estimate ?? term;
    const known = estimates.get(key) ?? { variance: 0, degreesOfFreedom: Infinity };
    estimates.set(key, {
      variance: known.variance + term.variance,
      degreesOfFreedom: Math.min(known.degreesOfFreedom, term.degreesOfFreedom),
    });
  }
  if (total <= 0) return Infinity;
  let denominator = 0;
  for (const { variance, degreesOfFreedom } of estimates.values()) {
    denominator += (variance / total) ** 2 / degreesOfFreedom;
  }
  // A quotient that is an integer on paper may come out a last bit below it.
  return denominator === 0 ? Infinity : Math.floor((1 / denominator) * (1 + 1e-12));
}
