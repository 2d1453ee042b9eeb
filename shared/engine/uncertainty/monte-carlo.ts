import { EngineError } from '../errors.ts';
import { item } from '../linear/entries.ts';
import { requireChoice, requireNumber, requireWhole } from '../quantity/domain.ts';
import { coverageInterval, INTERVAL_KINDS, type IntervalKind } from './coverage-interval.ts';
import { samplerOf, type Distribution } from './input-distribution.ts';
import { randomSource } from './random.ts';

/** How a Monte Carlo evaluation is run. */
export interface MonteCarloOptions {
  /** Seed of the generator, an integer; the same seed gives the same result. */
  seed: number;
  /** Significant digits of the standard uncertainty that are to be settled, 1 or 2; 2 when left out. */
  digits?: number;
  /** Most trials to be made; 5 million when left out. */
  maximumTrials?: number;
  /** Coverage probability of the interval; 0.95 when left out. */
  probability?: number;
  /** Which interval; `symmetric` (equal tails) when left out. */
  interval?: IntervalKind;
}

/** Result of a Monte Carlo evaluation. */
export interface MonteCarloResult {
  /** Mean of the model values. */
  mean: number;
  /** Their standard deviation. */
  standardUncertainty: number;
  /** Coverage interval. */
  interval: [number, number];
  /** Trials made. */
  trials: number;
  /** Whether the digits asked for were settled before the trials ran out. */
  stable: boolean;
}

/** Mean, standard deviation and interval of one block of trials. */
type BlockResult = [mean: number, deviation: number, low: number, high: number];

/** Options with every default filled in, and the blocks they lead to. */
interface Settings {
  digits: number;
  probability: number;
  interval: IntervalKind;
  blockSize: number;
  blocks: number;
}

const SMALLEST_BLOCK = 10_000;

/** Fewer blocks than this may look settled by luck; the document asks for two. */
const FEWEST_BLOCKS = 10;

/**
 * Numerical tolerance of a standard uncertainty: half a unit in its last significant digit.
 *
 * Source: JCGM 101:2008, 7.9.2.
 *
 * @param standardUncertainty any unit, not negative
 * @param digits its significant digits that count, 1 to 15
 * @throws EngineError `not-finite`, `not-whole` or `out-of-range`
 */
export function numericalTolerance(standardUncertainty: number, digits: number): number {
  requireNumber(standardUncertainty, 'standardUncertainty', { min: 0 });
  requireWhole(digits, 'digits', { min: 1, max: 15 });
  if (standardUncertainty === 0) return 0;
  const exponent = Number(standardUncertainty.toExponential(digits - 1).split('e')[1]);
  return 0.5 * 10 ** (exponent - (digits - 1));
}

/** Mean and standard deviation in two passes, so that small spreads on large values keep their digits. */
function moments(values: Float64Array | number[]): { mean: number; deviation: number } {
  const size = values.length;
  const origin = item(values, 0);
  let sum = 0;
  for (const value of values) sum += value - origin;
  const offset = sum / size;
  let squares = 0;
  for (const value of values) squares += (value - origin - offset) ** 2;
  return { mean: origin + offset, deviation: Math.sqrt(squares / (size - 1)) };
}

/** Mean and standard deviation of all trials from those of their two or more blocks, which are of one size. */
function pooled(blocks: BlockResult[], blockSize: number): { mean: number; deviation: number } {
  const count = blocks.length;
  const between = moments(blocks.map(([mean]) => mean));
  const within = blocks.reduce((sum, [, deviation]) => sum + deviation * deviation, 0) * (blockSize - 1);
  const squares = within + between.deviation ** 2 * (count - 1) * blockSize;
  return { mean: between.mean, deviation: Math.sqrt(squares / (count * blockSize - 1)) };
}

/** Whether twice the standard deviation of each averaged result is within the tolerance (7.9.4, steps e to h). */
function isSettled(blocks: BlockResult[], settings: Settings): boolean {
  if (blocks.length < FEWEST_BLOCKS) return false;
  const tolerance = numericalTolerance(pooled(blocks, settings.blockSize).deviation, settings.digits);
  return [0, 1, 2, 3].every((k) => {
    const { deviation } = moments(blocks.map((block) => item(block, k)));
    return (2 * deviation) / Math.sqrt(blocks.length) <= tolerance;
  });
}

/** Fills part of `values` with model values. */
function runBlock(values: Float64Array, draw: () => number[], model: (x: number[]) => number): void {
  for (let i = 0; i < values.length; i += 1) {
    const value = model(draw());
    if (!Number.isFinite(value)) {
      throw new EngineError(
        'model-not-finite',
        'model',
        `${value} from some values of its inputs`,
        'Restrict the inputs to where the model holds.',
      );
    }
    values[i] = value;
  }
}

/**
 * Propagates distributions through a model by the adaptive Monte Carlo procedure: blocks of trials are added until
 * the mean, the standard uncertainty and both ends of the interval are settled to the digits asked for.
 *
 * Source: JCGM 101:2008, 7.9.4; blocks as in 7.9.4 b, intervals as in 7.7. Inputs are independent.
 *
 * @param model the measurement model; it is given one value per input and must not keep the array
 * @param inputs distribution of each input, at least one
 * @param options seed, digits, most trials, probability, interval
 * @throws EngineError `too-few-values`, `unknown-choice`, `not-finite`, `out-of-range`, or `model-not-finite`
 */
export function monteCarlo(
  model: (x: number[]) => number,
  inputs: readonly Distribution[],
  options: MonteCarloOptions,
): MonteCarloResult {
  if (inputs.length === 0)
    throw new EngineError('too-few-values', 'inputs', 'no input quantity', 'At least one is needed.');
  const samplers = inputs.map((input, i) => samplerOf(input, `inputs[${i}]`));
  const random = randomSource(options.seed);
  const settings = settle(options);
  const x = samplers.map(() => 0);
  const draw = (): number[] => {
    for (let i = 0; i < samplers.length; i += 1) x[i] = item(samplers, i)(random);
    return x;
  };

  const blocks: Float64Array[] = [];
  const results: BlockResult[] = [];
  let stable = false;
  while (blocks.length < settings.blocks && !stable) {
    const block = new Float64Array(settings.blockSize);
    runBlock(block, draw, model);
    const { mean, deviation } = moments(block);
    results.push([
      mean,
      deviation,
      ...coverageInterval(block.sort(), settings.probability, settings.interval),
    ]);
    blocks.push(block);
    stable = isSettled(results, settings);
  }
  const sorted = joined(blocks).sort();
  const { mean, deviation } = pooled(results, settings.blockSize);
  return {
    mean,
    standardUncertainty: deviation,
    interval: coverageInterval(sorted, settings.probability, settings.interval),
    trials: sorted.length,
    stable,
  };
}

/** All model values in one array; the blocks are of one size. */
function joined(blocks: Float64Array[]): Float64Array {
  const size = item(blocks, 0).length;
  const all = new Float64Array(size * blocks.length);
  blocks.forEach((block, i) => all.set(block, i * size));
  return all;
}

function settle(options: MonteCarloOptions): Settings {
  const probability = requireNumber(options.probability ?? 0.95, 'options.probability', {
    above: 0,
    max: 0.9999,
  });
  const digits = Math.floor(requireNumber(options.digits ?? 2, 'options.digits', { min: 1, max: 2 }));
  const blockSize = Math.max(SMALLEST_BLOCK, Math.ceil(100 / (1 - probability)));
  const maximum = requireNumber(options.maximumTrials ?? 5_000_000, 'options.maximumTrials', {
    min: 2 * blockSize,
    max: 1e8,
  });
  const interval = requireChoice(options.interval ?? 'symmetric', 'options.interval', INTERVAL_KINDS);
  return { digits, probability, interval, blockSize, blocks: Math.floor(maximum / blockSize) };
}
