import { EngineError } from '../errors.ts';
import { item } from '../linear/entries.ts';
import { requireDegreesOfFreedom, requireNumber } from '../quantity/domain.ts';

/** One contribution to a combined uncertainty, for its degrees of freedom. */
export interface EffectiveComponent {
  /** Sensitivity times standard uncertainty (not its square), any one unit. */
  contribution: number;
  /** Degrees of freedom, more than zero; Infinity where the uncertainty is known exactly. */
  degreesOfFreedom: number;
  /** Name of the variance estimate it comes from; equal names are one estimate. */
  estimate?: string;
}

/** The variance that rests on one variance estimate, any one unit, with the estimate's degrees of freedom. */
export interface EstimateShare {
  variance: number;
  degreesOfFreedom: number;
}

/**
 * The formula of Welch and Satterthwaite over distinct estimates, not truncated: `u^4 / sum(u_q^4 / nu_q)`.
 *
 * Source: JCGM 100:2008, annex G.4.1, equation (G.2b).
 *
 * @returns Infinity where no share has a finite number of degrees of freedom, or there is no variance
 */
export function welchSatterthwaite(shares: readonly EstimateShare[]): number {
  const total = shares.reduce((sum, { variance }) => sum + variance, 0);
  if (total <= 0) return Infinity;
  const spread = shares.reduce(
    (sum, { variance, degreesOfFreedom }) => sum + (variance / total) ** 2 / degreesOfFreedom,
    0,
  );
  return 1 / spread;
}

/**
 * Effective degrees of freedom as they are stated and as a table of Student's factors is entered: truncated to the
 * next lower integer. Infinity stays.
 *
 * Source: JCGM 100:2008, annex G.4.1, note 1 (from memory).
 * @throws EngineError `not-finite` or `out-of-range`
 */
export function truncateDegreesOfFreedom(degreesOfFreedom: number): number {
  // A quotient that is an integer on paper may come out a last bit below it.
  return Math.floor(requireDegreesOfFreedom(degreesOfFreedom, 'degreesOfFreedom') * (1 + 1e-12));
}

function addTo(shares: Map<string, EstimateShare>, key: string, one: EstimateShare, field: string): void {
  const known = shares.get(key);
  if (known === undefined) {
    shares.set(key, one);
    return;
  }
  if (known.degreesOfFreedom !== one.degreesOfFreedom) {
    throw new EngineError(
      'conflicting-degrees-of-freedom',
      field,
      one.degreesOfFreedom,
      `The estimate "${key}" has ${known.degreesOfFreedom} elsewhere, and one estimate has one number.`,
    );
  }
  known.variance += one.variance;
}

/**
 * Welch-Satterthwaite over distinct variance estimates: a pooled standard deviation used several times counts once.
 * Contributions are taken as uncorrelated otherwise. The number is the real one, 18.999 in the example of the
 * document; whoever states it, or a coverage factor with it, truncates it (`truncateDegreesOfFreedom`), as
 * `propagate` does.
 *
 * Source: JCGM 100:2008, annex G.4.1, equation (G.2b), with the squares that rest on one estimate added first.
 *
 * @returns Infinity where no contribution has a finite number of degrees of freedom
 * @throws EngineError `too-few-values`, `not-finite`, `out-of-range` or `conflicting-degrees-of-freedom`, naming the component
 */
export function effectiveDegreesOfFreedom(components: readonly EffectiveComponent[]): number {
  if (components.length === 0)
    throw new EngineError('too-few-values', 'components', 'no component', 'At least one is needed.');
  const contributions = components.map((one, i) =>
    requireNumber(one.contribution, `components[${i}].contribution`),
  );
  // Scaled by the largest, so that no square is too small or too large for a double.
  const largest = Math.max(...contributions.map(Math.abs)) || 1;
  const shares = new Map<string, EstimateShare>();
  components.forEach((one, i) => {
    const field = `components[${i}].degreesOfFreedom`;
    const degreesOfFreedom = requireDegreesOfFreedom(one.degreesOfFreedom, field);
    const variance = (item(contributions, i) / largest) ** 2;
    // A name cannot begin with a colon and a number of its own: unnamed estimates stay apart.
    addTo(shares, one.estimate ?? `:${i}`, { variance, degreesOfFreedom }, field);
  });
  return welchSatterthwaite([...shares.values()]);
}
