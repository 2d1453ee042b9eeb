import { Decimal } from '#shared/decimal.ts';
import { EngineError } from '../errors.ts';

/** Bounds of a real argument; a bound left out is no bound. */
export interface NumberBounds {
  /** Smallest value allowed. */
  min?: number;
  /** Largest value allowed. */
  max?: number;
  /** Every value has to be greater than this. */
  above?: number;
  /** Every value has to be less than this. */
  below?: number;
  /** Unit named in the message. */
  unit?: string;
}

function describeBounds({ min, max, above, below, unit }: NumberBounds): string {
  if (min !== undefined && min === max) return `equal to ${min}`;
  const lower = min !== undefined ? `of at least ${min}` : above !== undefined ? `above ${above}` : '';
  const upper = max !== undefined ? `of at most ${max}` : below !== undefined ? `below ${below}` : '';
  const both = [lower, upper].filter((part) => part !== '').join(' and ');
  return unit === undefined ? both : `${both} ${unit}`;
}

/** A word as received, in quotation marks; anything else as it prints. */
function shown(value: unknown): string {
  return typeof value === 'string' ? `"${value}"` : String(value);
}

/**
 * Checks a real argument and returns it, so that no function of the engine lets a NaN through.
 *
 * @param value what was received
 * @param field path of the argument
 * @param bounds the domain, ends included unless `above` or `below` say otherwise
 * @throws EngineError `not-finite` when it is no finite number; `out-of-range` when it is outside the domain
 */
export function requireNumber(value: unknown, field: string, bounds: NumberBounds = {}): number {
  if (typeof value !== 'number' || !Number.isFinite(value)) {
    throw new EngineError('not-finite', field, shown(value), 'A finite number is expected.');
  }
  const { min, max, above, below } = bounds;
  const outside =
    (min !== undefined && value < min) ||
    (max !== undefined && value > max) ||
    (above !== undefined && value <= above) ||
    (below !== undefined && value >= below);
  if (outside) {
    throw new EngineError('out-of-range', field, value, `A number ${describeBounds(bounds)} is expected.`);
  }
  return value;
}

/**
 * Checks a count, a place or another whole number and returns it.
 *
 * @param value what was received
 * @param field path of the argument
 * @param bounds smallest and largest value allowed
 * @throws EngineError `not-whole` when it is no integer; `out-of-range` when it is outside the bounds
 */
export function requireWhole(value: number, field: string, bounds: { min: number; max?: number }): number {
  const isInside = value >= bounds.min && value <= (bounds.max ?? Infinity);
  if (Number.isInteger(value) && isInside) return value;
  const code = Number.isInteger(value) ? 'out-of-range' : 'not-whole';
  throw new EngineError(code, field, shown(value), `A whole number ${describeBounds(bounds)} is expected.`);
}

/**
 * Checks a number of degrees of freedom: any real number above zero, or Infinity where the uncertainty is known
 * exactly.
 *
 * @throws EngineError `not-finite` or `out-of-range`
 */
export function requireDegreesOfFreedom(value: number, field: string): number {
  return value === Infinity ? value : requireNumber(value, field, { above: 0 });
}

/**
 * Checks a significance level: a probability, and not so small that its critical value outgrows a double.
 *
 * @throws EngineError `not-finite` or `out-of-range`
 */
export function requireLevel(level: number): number {
  return requireNumber(level, 'level', { min: 1e-100, below: 1 });
}

/**
 * Checks that a list has the length that another argument asks for.
 *
 * @param found its length
 * @param expected the length asked for
 * @param field path of the list
 * @param per what there is to be one entry for, in the plural: `values`, `isotopes`
 * @throws EngineError `size-mismatch`
 */
export function requireSize(found: number, expected: number, field: string, per: string): void {
  if (found === expected) return;
  throw new EngineError(
    'size-mismatch',
    field,
    `${found} entries`,
    `One for each of the ${expected} ${per} is expected.`,
  );
}

/**
 * Checks a decimal argument and returns it.
 *
 * @param value what was received
 * @param field path of the argument
 * @param sign `positive` also refuses zero and negative values
 * @throws EngineError `not-finite` when it is no finite Decimal; `out-of-range` when it is to be positive and is not
 */
export function requireDecimal(value: unknown, field: string, sign: 'any' | 'positive' = 'any'): Decimal {
  if (!Decimal.isDecimal(value) || !(value as Decimal).isFinite()) {
    throw new EngineError('not-finite', field, shown(value), 'A finite Decimal is expected.');
  }
  // A decimal made by another constructor would carry another precision into the arithmetic.
  const decimal = new Decimal(value as Decimal);
  if (sign === 'positive' && decimal.lte(0)) {
    throw new EngineError('out-of-range', field, decimal.toFixed(), 'A number above 0 is expected.');
  }
  return decimal;
}

/**
 * Checks that an argument is one of a fixed list of words and returns it.
 *
 * @param value what was received
 * @param field path of the argument
 * @param allowed the words of the list
 * @throws EngineError `unknown-choice`
 */
export function requireChoice<T extends string>(value: unknown, field: string, allowed: readonly T[]): T {
  const found = allowed.find((choice) => choice === value);
  if (found === undefined) {
    throw new EngineError('unknown-choice', field, shown(value), `One of ${allowed.join(', ')} is expected.`);
  }
  return found;
}
