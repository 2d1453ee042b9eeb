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

/** Squares of the contributions that rest on one variance estimate, with its degrees of freedom. */
interface EstimateShare {
  square: number;
  degreesOfFreedom: number;
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
  known.square += one.square;
}

/**
 * Welch-Satterthwaite over distinct variance estimates: a pooled standard deviation used several times counts once.
 * Not truncated. Contributions are taken as uncorrelated otherwise.
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
    const square = (item(contributions, i) / largest) ** 2;
    // A name cannot begin with a colon and a number of its own: unnamed estimates stay apart.
    addTo(shares, one.estimate ?? `:${i}`, { square, degreesOfFreedom }, field);
  });
  const all = [...shares.values()];
  const variance = all.reduce((sum, { square }) => sum + square, 0);
  const spread = all.reduce((sum, share) => sum + (share.square * share.square) / share.degreesOfFreedom, 0);
  return spread === 0 ? Infinity : (variance * variance) / spread;
}
