import * as engine from '#shared/engine/index.ts';

/** A value as a golden file holds it: plain JSON, and objects with one key that begins with `$` for the rest. */
export type Coded = null | boolean | number | string | Coded[] | { [key: string]: Coded };

/** One call of a public function, with what came of it. */
export type GoldenCall = { function: string; arguments: Coded[]; then?: string[]; result: Coded };

/** What a golden file holds. */
export type GoldenFile = { engineVersion: string; calls: GoldenCall[] };

/** Models for the Monte Carlo procedure by name, since a file holds no functions. */
const MODELS: Record<string, (x: number[]) => number> = {
  product: (x) => x.reduce((product, value) => product * value, 1),
  sum: (x) => x.reduce((sum, value) => sum + value, 0),
};

const ARRAYS = { $float64: Float64Array, $int32: Int32Array };

/** Public functions by name. */
export function publicFunction(name: string): (...args: unknown[]) => unknown {
  const found = (engine as Record<string, unknown>)[name];
  if (typeof found !== 'function') throw new Error(`The engine has no public function ${name}.`);
  return found as (...args: unknown[]) => unknown;
}

/** The argument a coded value stands for. A `$call` is made, so that one call may take what another returns. */
export function decode(coded: Coded): unknown {
  if (Array.isArray(coded)) return coded.map(decode);
  if (coded === null || typeof coded !== 'object') return coded;
  const [[key, value] = ['', null]] = Object.entries(coded);
  if (key === '$decimal') return new engine.Decimal(value as string);
  if (key === '$number') return Number(value);
  if (key === '$model') return MODELS[value as string];
  if (key === '$float64' || key === '$int32') return ARRAYS[key].from(value as number[]);
  if (key === '$call') return run(value as unknown as GoldenCall);
  return Object.fromEntries(Object.entries(coded).map(([name, inner]) => [name, decode(inner)]));
}

/** A result as the file holds it; functions within it are left out. */
export function encode(value: unknown): Coded {
  if (engine.Decimal.isDecimal(value)) return { $decimal: (value as { toFixed(): string }).toFixed() };
  if (typeof value === 'number') return Number.isFinite(value) ? value : { $number: String(value) };
  if (value === null || typeof value === 'string' || typeof value === 'boolean') return value;
  if (value instanceof Float64Array || value instanceof Int32Array || value instanceof Uint8Array) {
    return Array.from(value, encode);
  }
  if (Array.isArray(value)) return value.map(encode);
  const entries = Object.entries(value as object).filter(
    ([, inner]) => inner !== undefined && typeof inner !== 'function',
  );
  return Object.fromEntries(entries.map(([name, inner]) => [name, encode(inner)]));
}

/** Makes a call. With `then` the result is an object, and its methods are called in that order. */
export function run(call: Pick<GoldenCall, 'function' | 'arguments' | 'then'>): unknown {
  const result = publicFunction(call.function)(...call.arguments.map(decode));
  if (!call.then) return result;
  return call.then.map((method) => (result as Record<string, () => unknown>)[method]!());
}

/**
 * Where two coded results differ: numbers by more than 1e-12 of the larger, all else at all. Numbers of one list are
 * held against the largest of them, since a covariance beside its variances, or one residual among others, is no more
 * certain than they are.
 * @param scale largest number of the list it stands in
 */
export function differences(expected: Coded, found: Coded, path = 'result', scale = 0): string[] {
  const numbers = [expected, found].map(asNumber);
  const [one, other] = numbers as [number | null, number | null];
  if (one !== null && other !== null) {
    const largest = Math.max(Math.abs(one), Math.abs(other), scale);
    return Math.abs(one - other) <= 1e-12 * largest ? [] : [`${path}: ${one} was expected, ${other} found`];
  }
  const isBranch = (coded: Coded) => coded !== null && typeof coded === 'object';
  if (!isBranch(expected) || !isBranch(found)) {
    return expected === found ? [] : [`${path}: ${text(expected)} was expected, ${text(found)} found`];
  }
  const left = expected as Record<string, Coded>;
  const right = found as Record<string, Coded>;
  const keys = [...new Set([...Object.keys(left), ...Object.keys(right)])];
  const inList = Array.isArray(expected) ? Object.values(left) : [];
  const beside = Math.max(0, ...inList.map((inner) => Math.abs(asNumber(inner) ?? 0)));
  return keys.flatMap((key) =>
    key in left && key in right
      ? differences(left[key]!, right[key]!, `${path}.${key}`, beside)
      : [`${path}.${key}: stands in one of the two only`],
  );
}

/** A finite number, or null for everything else. Decimals are held as text beyond a double, so they compare apart. */
function asNumber(coded: Coded): number | null {
  return typeof coded === 'number' ? coded : null;
}

function text(coded: Coded): string {
  return JSON.stringify(coded);
}
