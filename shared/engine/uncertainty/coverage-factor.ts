import { EngineError } from '../errors.ts';
import { requireDegreesOfFreedom, requireNumber } from '../quantity/domain.ts';
import { normalQuantile } from './normal-distribution.ts';
import { studentAreas } from './student-t.ts';

/** From here on three terms of the expansion in 1/nu are exact to the last digit of a double. */
const LARGE_DEGREES_OF_FREEDOM = 1e5;

/** Student's quantile from the normal one (Abramowitz and Stegun, 26.7.5, from memory). */
function nearlyNormal(z: number, degreesOfFreedom: number): number {
  const first = (z ** 3 + z) / (4 * degreesOfFreedom);
  const second = (5 * z ** 5 + 16 * z ** 3 + 3 * z) / (96 * degreesOfFreedom ** 2);
  const third = (3 * z ** 7 + 19 * z ** 5 + 17 * z ** 3 - 15 * z) / (384 * degreesOfFreedom ** 3);
  return z + first + second + third;
}

/**
 * The factor k for which a quantity with Student's distribution lies within +-k with the given probability. Real
 * numbers of degrees of freedom are taken as they are: whoever truncates them to an integer (JCGM 100:2008, G.4.1)
 * does so before.
 *
 * Source: JCGM 100:2008, annex G.3, Table G.2; solved from the distribution, not read from a table.
 *
 * @param probability coverage probability, more than 0 and less than 1
 * @param degreesOfFreedom more than zero; Infinity gives the normal distribution
 * @throws EngineError `not-finite` or `out-of-range`; also where the factor itself is beyond 1e150
 */
export function coverageFactor(probability: number, degreesOfFreedom: number): number {
  requireNumber(probability, 'probability', { above: 0, below: 1 });
  requireDegreesOfFreedom(degreesOfFreedom, 'degreesOfFreedom');
  const z = -normalQuantile((1 - probability) / 2);
  if (degreesOfFreedom === Infinity) return z;
  if (degreesOfFreedom > LARGE_DEGREES_OF_FREEDOM) return nearlyNormal(z, degreesOfFreedom);
  return solve(probability, degreesOfFreedom, z);
}

const LARGEST_LOG = 150 * Math.LN10;

/**
 * Newton's method on logarithms, where the tail is nearly a straight line, kept between two bounds that close in.
 * Works on the smaller of the two areas.
 */
function solve(probability: number, degreesOfFreedom: number, start: number): number {
  let low = -LARGEST_LOG;
  let high = LARGEST_LOG;
  let log = Math.log(start);
  for (let step = 0; step < 200; step += 1) {
    const t = Math.exp(log);
    const { inside, outside, density } = studentAreas(t, degreesOfFreedom);
    const isUpper = probability > 0.5;
    const miss = isUpper ? Math.log((1 - probability) / outside) : Math.log(inside / probability);
    if (miss > 0) high = log;
    else low = log;
    const newton = log - (miss * (isUpper ? outside : inside)) / (t * density);
    const next = newton > low && newton < high ? newton : (low + high) / 2;
    const change = Math.abs(next - log);
    log = next;
    if (change <= 1e-15 * (1 + Math.abs(log))) break;
  }
  if (log > LARGEST_LOG - 1) refuseFactor(probability, degreesOfFreedom);
  return Math.exp(log);
}

function refuseFactor(probability: number, degreesOfFreedom: number): never {
  throw new EngineError(
    'out-of-range',
    'degreesOfFreedom',
    degreesOfFreedom,
    `More is expected: the factor for probability ${probability} would be beyond 1e150.`,
  );
}
