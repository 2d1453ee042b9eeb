import { Decimal, decimalText } from '#shared/decimal.ts';
import type { Shape } from '#shared/contracts/standards.ts';
import { nominalMarking, usualShape } from './nominal.ts';

/** How a decade of a set is divided: with two weights of 2, or with one. */
export type Division = '1-2-2-5' | '1-2-5';

const MEMBERS: Record<Division, readonly number[]> = { '1-2-2-5': [5, 2, 2, 1], '1-2-5': [5, 2, 1] };

/** A stretch of nominals, grams as text, both ends included, largest first. */
export interface Stretch {
  from: string;
  to: string;
}

/** A series that a manufacturer sells as one box. Common practice, no source. */
export interface Series extends Stretch {
  id: string;
  label: string;
}

/** The series offered; anything else is set by its ends. */
export const SERIES: readonly Series[] = [
  { id: '1 mg to 1 kg', label: '1 mg to 1 kg', from: '0.001', to: '1000' },
  { id: '1 mg to 100 g', label: '1 mg to 100 g', from: '0.001', to: '100' },
  { id: '1 mg to 500 mg', label: '1 mg to 500 mg', from: '0.001', to: '0.5' },
  { id: '1 g to 500 g', label: '1 g to 500 g', from: '1', to: '500' },
];

/** One weight of a set, before anything is said about its class and material. */
export interface SeriesMember {
  nominal: string;
  marking: string;
  shape: Shape;
}

/**
 * The nominals of a stretch, grams as text, largest first as they lie in the box. The greatest nominal of a
 * series stands once, since it closes the decade below it.
 */
export function nominalsOf({ from, to }: Stretch, division: Division): string[] {
  const [lowest, highest] = [new Decimal(from), new Decimal(to)];
  if (!lowest.gt(0) || highest.lt(lowest)) return [];
  const nominals: string[] = [];
  for (let power = highest.e; power >= lowest.e; power -= 1) {
    for (const digit of MEMBERS[division]) {
      const nominal = new Decimal(10).pow(power).times(digit);
      if (nominal.gte(lowest) && nominal.lte(highest)) nominals.push(decimalText(nominal));
    }
  }
  return nominals;
}

/**
 * The weights of a stretch with their markings: the second of two equal nominals wears a star or a dot (OIML
 * R 111-1:2004, 13), and shapes follow the nominal.
 */
export function seriesMembers(
  stretch: Stretch,
  choices: { division: Division; sign: '*' | '·'; below1g: Extract<Shape, 'wire' | 'sheet'> },
): SeriesMember[] {
  const seen = new Set<string>();
  return nominalsOf(stretch, choices.division).map((nominal) => {
    const isSecond = seen.has(nominal);
    seen.add(nominal);
    return {
      nominal,
      marking: nominalMarking(nominal) + (isSecond ? choices.sign : ''),
      shape: usualShape(nominal, choices.below1g),
    };
  });
}

/** Number of the weight at a place of a set, as the register gives it out. */
export function memberNo(setNo: string, index: number): string {
  return `${setNo}-${String(index + 1).padStart(2, '0')}`;
}
