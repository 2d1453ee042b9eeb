import type { WeightClass } from '#shared/contracts/common.ts';
import { drawsFor, between, cutNormal } from './draws.ts';
import { makeWeight, markingOf, type DemoDensity, type Weight } from './weight.ts';
import type { World } from './world.ts';

const DECADES = ['100', '10', '1', '0.1', '0.01', '0.001'];
const DECADE = (one: string): string[] =>
  [5, 2, 2, 1].map((factor) => String(Number((factor * Number(one)).toPrecision(6))));

/** 1 kg and six decades of 5-2-2*-1, down to 1 mg: 25 pieces. */
export const FULL_SET = ['1000', ...DECADES.flatMap(DECADE)];
/** 500 g to 1 g, 12 pieces, and 1 kg. */
export const GRAM_SET = ['1000', ...DECADES.slice(0, 3).flatMap(DECADE)];
/** The heavy weights of a laboratory. */
export const HEAVY_SET = ['2000', '2000', '5000', '10000', '20000'];

/** A set before its weights are drawn. */
export interface SetDescription {
  owner: string;
  registryNo: string;
  name: string;
  class: WeightClass;
  nominals: readonly string[];
  inServiceFrom: string;
  intervalMonths: number;
}

/** Makes a set and registers it; the second of two equal pieces is marked with a star. */
export function addSet(world: World, set: SetDescription): Weight[] {
  const weights = set.nominals.map((nominal, at) => {
    const isSecond = set.nominals.indexOf(nominal) < at;
    return makeWeight({
      owner: set.owner,
      registryNo: `${set.registryNo}-${String(at + 1).padStart(2, '0')}`,
      nominal,
      marking: isSecond ? `${markingOf(nominal)} *` : markingOf(nominal),
      class: set.class,
      density: densityOf(set.class, nominal, set.registryNo),
      inServiceFrom: set.inServiceFrom,
      intervalMonths: set.intervalMonths,
      ...startOfPair(set, nominal, isSecond),
    });
  });
  for (const weight of weights) world.weights.set(weight.registryNo, weight);
  world.steps.push({
    day: set.inServiceFrom,
    does: 'register set',
    registryNo: set.registryNo,
    name: set.name,
    weights,
  });
  return weights;
}

/** Makes a single weight and registers it. */
export function addWeight(world: World, description: Parameters<typeof makeWeight>[0]): Weight {
  const weight = makeWeight({ serial: serialOf(description), ...description });
  world.weights.set(weight.registryNo, weight);
  world.steps.push({ day: weight.inServiceFrom, does: 'register weight', weight });
  return weight;
}

/** A single weight that is marked with its nominal value alone has a serial number. */
function serialOf({ kind = 'weight', marking, registryNo }: Parameters<typeof makeWeight>[0]): string | null {
  return kind === 'weight' && marking === undefined ? registryNo.replace(' ', '') : null;
}

/** The two 2s of a decade are seldom alike; some lie so far apart that an exchange would show. */
function startOfPair(set: SetDescription, nominal: string, isSecond: boolean): { startShare?: number } {
  const isPair = set.nominals.filter((other) => other === nominal).length > 1;
  if (!isPair) return {};
  const draws = drawsFor(`${set.registryNo} pair ${nominal}`);
  const first = between(draws, 0.1, 0.66);
  return { startShare: isSecond ? -0.15 * first : first };
}

/** Density as known for a weight of a class: measured where it matters, from the maker, or assumed. kg/m3. */
export function densityOf(weightClass: WeightClass, nominal: string, subject: string): DemoDensity {
  const grams = Number(nominal);
  if (weightClass.startsWith('M')) return { value: '7950', expandedU: '140', origin: 'assumed' };
  const melt = between(drawsFor(`${subject} melt`), 7930, 8010);
  // Class E1 allows 7934 to 8067 kg/m3 from 100 g up (OIML R 111-1:2004, Table 5, from memory).
  const makers = weightClass === 'E1' ? Math.max(melt, 7942) : melt;
  if (weightClass === 'E1' && grams >= 1) {
    const expandedU = grams >= 100 ? '1.5' : grams >= 10 ? '4' : '12';
    const own = makers + 3 * cutNormal(drawsFor(`${subject} ${nominal} density`), 2);
    return { value: own.toFixed(1), expandedU, origin: 'measured' };
  }
  const expandedU = { E1: '60', E2: '30', F1: '70' }[weightClass as string] ?? '140';
  return { value: makers.toFixed(0), expandedU, origin: 'manufacturer' };
}
