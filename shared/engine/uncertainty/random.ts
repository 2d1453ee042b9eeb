import { item } from '../linear/entries.ts';
import { requireNumber } from '../quantity/domain.ts';

/** A source of pseudo-random numbers; the same seed gives the same numbers on every machine. */
export interface RandomSource {
  /** The next number, uniform between 0 and 1, both ends excluded. */
  uniform(): number;
  /** The next number of the standard normal distribution. */
  normal(): number;
}

/** One of the four multiplicative congruential generators: state <- multiplier * state mod modulus. */
interface Component {
  multiplier: number;
  modulus: number;
  quotient: number;
  remainder: number;
}

/**
 * The four components, quotient and remainder of modulus by multiplier beside them (Schrage's way of keeping the
 * products small). Each line obeys modulus = multiplier * quotient + remainder, which the tests check.
 */
export const COMPONENTS: readonly Component[] = [
  { multiplier: 11600, modulus: 2147483579, quotient: 185127, remainder: 10379 },
  { multiplier: 47003, modulus: 2147483543, quotient: 45688, remainder: 10479 },
  { multiplier: 23000, modulus: 2147483423, quotient: 93368, remainder: 19423 },
  { multiplier: 33000, modulus: 2147483123, quotient: 65075, remainder: 8123 },
];

/** The next state of one component: multiplier times state, modulo modulus. */
export function advance({ multiplier, modulus, quotient, remainder }: Component, state: number): number {
  const whole = Math.floor(state / quotient);
  const next = multiplier * (state - whole * quotient) - remainder * whole;
  return next < 0 ? next + modulus : next;
}

/** Scrambles 32 bits, so that neighbouring seeds start far apart (two rounds of multiply and shift). */
function scramble(bits: number): number {
  let mixed = bits | 0;
  mixed = Math.imul(mixed ^ (mixed >>> 16), 0x45d9f3b5);
  mixed = Math.imul(mixed ^ (mixed >>> 15), 0x2c1b3c6d);
  return (mixed ^ (mixed >>> 16)) >>> 0;
}

function startStates(seed: number): Float64Array {
  const low = seed >>> 0;
  const high = Math.floor(seed / 2 ** 32) >>> 0;
  return Float64Array.from(COMPONENTS, ({ modulus }, i) => {
    const bits = scramble(scramble(low + Math.imul(i + 1, 0x9e3779b9)) ^ high);
    return 1 + (bits % (modulus - 1));
  });
}

/**
 * The pseudo-random generator of the engine: the enhanced Wichmann-Hill generator, period about 2^121, with normal
 * numbers by the Box-Muller transformation.
 *
 * Source: JCGM 101:2008, annex C.3.2 (uniform) and C.4 (normal); the constants are from memory.
 *
 * @param seed an integer from 0 to 2^53 - 1
 * @throws EngineError `not-finite` or `out-of-range` (field `seed`)
 */
export function randomSource(seed: number): RandomSource {
  const checked = requireNumber(seed, 'seed', { min: 0, max: Number.MAX_SAFE_INTEGER });
  const states = startStates(Math.floor(checked));
  let spare: number | null = null;

  const uniform = (): number => {
    let sum = 0;
    for (let i = 0; i < 4; i += 1) {
      const component = item(COMPONENTS, i);
      const next = advance(component, item(states, i));
      states[i] = next;
      sum += next / component.modulus;
    }
    const fraction = sum - Math.floor(sum);
    return fraction > 0 ? fraction : uniform();
  };

  const normal = (): number => {
    if (spare !== null) {
      const kept = spare;
      spare = null;
      return kept;
    }
    const radius = Math.sqrt(-2 * Math.log(uniform()));
    const angle = 2 * Math.PI * uniform();
    spare = radius * Math.sin(angle);
    return radius * Math.cos(angle);
  };

  return { uniform, normal };
}
