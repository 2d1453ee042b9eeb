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

function describeBounds({ min, max, above, below }: NumberBounds): string {
  const lower = min !== undefined ? `at least ${min}` : above !== undefined ? `more than ${above}` : '';
  const upper = max !== undefined ? `at most ${max}` : below !== undefined ? `less than ${below}` : '';
  return [lower, upper].filter((part) => part !== '').join(' and ');
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
    throw new EngineError(
      'not-finite',
      field,
      `${field} is to be a finite number; received ${String(value)}.`,
    );
  }
  const { min, max, above, below, unit } = bounds;
  const outside =
    (min !== undefined && value < min) ||
    (max !== undefined && value > max) ||
    (above !== undefined && value <= above) ||
    (below !== undefined && value >= below);
  if (outside) {
    const inUnit = unit === undefined ? '' : ` ${unit}`;
    throw new EngineError(
      'out-of-range',
      field,
      `${field} is to be ${describeBounds(bounds)}${inUnit}; received ${value}.`,
    );
  }
  return value;
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
    throw new EngineError(
      'not-finite',
      field,
      `${field} is to be a finite Decimal; received ${String(value)}.`,
    );
  }
  // A decimal made by another constructor would carry another precision into the arithmetic.
  const decimal = new Decimal(value as Decimal);
  if (sign === 'positive' && decimal.lte(0)) {
    throw new EngineError(
      'out-of-range',
      field,
      `${field} is to be more than 0; received ${decimal.toFixed()}.`,
    );
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
    throw new EngineError(
      'unknown-choice',
      field,
      `${field} is to be one of ${allowed.join(', ')}; received ${String(value)}.`,
    );
  }
  return found;
}
