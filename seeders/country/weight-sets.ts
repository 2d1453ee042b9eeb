import { FIRST_DAY, LAST_DAY } from './days.ts';
import { PURPOSE, type Draw } from './draws.ts';
import { GRADES } from './grades.ts';
import type { CountryLaboratory } from './laboratories.ts';
import { KILOGRAM, PIECES, WHOLE_SET } from './pieces.ts';

/** Weights that are calibrated together: a run of pieces of one grade, one holder and one calibrating laboratory. */
export interface WeightSet {
  index: number;
  level: number;
  holder: number;
  issuer: number;
  from: number;
  count: number;
  /** Its references: sets one after the other, all of the issuer and one level above. */
  firstReference: number;
  referenceCount: number;
  /** Weighed as a subdivision from the references' kilograms. */
  isSubdivision: boolean;
  firstStandard: number;
  /** Day of its first calibration. */
  startDay: number;
  intervalMonths: number;
  /** Days on which it is calibrated. */
  days: number[];
}

/** Days that a calibration takes, and the most that issuing it takes afterwards. */
export const PERFORMANCE_DAYS = 2;
export const LONGEST_ISSUE_DAYS = 8;
/** How long before its first calibration a weight is registered. */
export const REGISTERED_BEFORE = 30;
/** Calibrated so long before the programme's end that its successor is issued in time. */
const MARGIN_DAYS = 45;
const SETTLING_DAYS = 45;
/** Laboratories began their work over about so many days of each other. */
const STAGGER_DAYS = 500;

interface Holding {
  first: number;
  count: number;
  /** When all of them have values. */
  readyDay: number;
}

/** Plans every set of the country: the laboratories' own first, then weights of customers until the values are enough. */
export class SetPlan {
  readonly sets: WeightSet[] = [];
  standardCount = 0;
  /** Values of first issues; re-issues come on top. */
  valueCount = 0;
  readonly #draw: Draw;

  constructor(draw: Draw) {
    this.#draw = draw;
  }

  /** Adds `count` alike sets and gives them as references for others. */
  add(
    count: number,
    level: number,
    parties: { holder: number; issuer: number },
    { from, count: pieces }: { from: number; count: number },
    references: Holding,
    options: { isSubdivision?: boolean; earliest?: number; mostCalibrations?: number; spread?: number } = {},
  ): Holding {
    const first = this.sets.length;
    let readyDay = 0;
    for (let n = 0; n < count; n += 1) {
      const index = this.sets.length;
      const earliest = Math.max(references.readyDay + SETTLING_DAYS, options.earliest ?? 0);
      const startDay = earliest + Math.floor((options.spread ?? 60) * this.#draw(PURPOSE.start, index));
      const { intervalMonths } = GRADES[level]!;
      const set: WeightSet = {
        index,
        level,
        ...parties,
        from,
        count: pieces,
        firstReference: references.first,
        referenceCount: references.count,
        isSubdivision: options.isSubdivision ?? false,
        firstStandard: this.standardCount,
        startDay,
        intervalMonths,
        days: this.#days(index, startDay, intervalMonths).slice(0, options.mostCalibrations ?? Infinity),
      };
      this.sets.push(set);
      this.standardCount += pieces;
      this.valueCount += pieces * set.days.length;
      readyDay = Math.max(readyDay, startDay + PERFORMANCE_DAYS + LONGEST_ISSUE_DAYS);
    }
    return { first, count, readyDay };
  }

  #days(index: number, startDay: number, intervalMonths: number): number[] {
    const days: number[] = [];
    const whole = Math.floor(intervalMonths * 30.4) - MARGIN_DAYS;
    for (let day = startDay, n = 0; day <= LAST_DAY - PERFORMANCE_DAYS - LONGEST_ISSUE_DAYS; n += 1) {
      days.push(day);
      day += whole - Math.floor(25 * this.#draw(PURPOSE.period, index * 64 + n));
    }
    return days;
  }
}

/**
 * The country's sets for a number of values.
 * @param wanted first issues to plan for
 * @throws RangeError where the laboratories' own sets alone are more than that
 */
export function planSets(laboratories: readonly CountryLaboratory[], draw: Draw, wanted: number): SetPlan {
  const plan = new SetPlan(draw);
  const working = ownSets(plan, laboratories);
  if (plan.valueCount > wanted) {
    throw new RangeError(
      `A country of ${laboratories.length} laboratories has ${plan.valueCount} values at least; ${wanted} were asked for.`,
    );
  }
  for (let n = 0; plan.valueCount < wanted; n += 1) addCustomer(plan, laboratories, working, draw, wanted, n);
  return plan;
}

/** Own sets of the institute and the three tiers; by laboratory, what it calibrates others with. */
function ownSets(plan: SetPlan, laboratories: readonly CountryLaboratory[]): Map<number, Holding> {
  const institute = { holder: 0, issuer: 0 };
  const kilogram = { from: KILOGRAM, count: 1 };
  const nothing = { first: 0, count: 0, readyDay: FIRST_DAY };
  const root = plan.add(1, 0, institute, kilogram, nothing, { mostCalibrations: 1 });
  const copies = plan.add(3, 1, institute, kilogram, root);
  const kilograms = plan.add(6, 2, institute, kilogram, copies);
  const primary = plan.add(3, 3, institute, WHOLE_SET, kilograms, { isSubdivision: true });
  const working = new Map([[0, plan.add(4, 4, institute, WHOLE_SET, primary)]]);
  const tiers = { first: [] as number[], second: [] as number[], third: [] as number[] };
  for (const { index, tier } of laboratories) if (tier !== 'institute') tiers[tier].push(index);
  const steps = [
    { above: [0], tier: tiers.first, level: 5 },
    { above: tiers.first, tier: tiers.second, level: 7 },
    { above: tiers.second, tier: tiers.third, level: 9 },
  ];
  for (const { above, tier, level } of steps) {
    for (const [n, holder] of tier.entries()) {
      const issuer = above[n % above.length]!;
      const references = plan.add(2, level, { holder, issuer }, WHOLE_SET, working.get(issuer)!, {
        spread: STAGGER_DAYS,
      });
      // Every third laboratory of the first tier subdivides the kilogram itself.
      const isSubdivision = level === 5 && n % 3 === 0;
      const own = { holder, issuer: holder };
      working.set(holder, plan.add(3, level + 1, own, WHOLE_SET, references, { isSubdivision }));
    }
  }
  return working;
}

/** The step that each tier's calibrations for customers deliver. */
const STEP_FOR_CUSTOMERS = { institute: 5, first: 7, second: 9, third: 11 } as const;

/** A customer's weights; those of the third tier's customers calibrate two further steps themselves. */
function addCustomer(
  plan: SetPlan,
  laboratories: readonly CountryLaboratory[],
  working: ReadonlyMap<number, Holding>,
  draw: Draw,
  wanted: number,
  n: number,
): void {
  const accredited = laboratories.filter((laboratory) => laboratory.isAccredited);
  const issuer = accredited[n % accredited.length]!;
  const holder = Math.floor(draw(PURPOSE.holder, n) * laboratories.length);
  const size = draw(PURPOSE.pieces, n);
  const count = 1 + Math.floor(size * size * 14);
  const from = Math.floor(draw(PURPOSE.pieces, n + 10_000_000) * (PIECES.length - count + 1));
  const pieces = { from, count };
  const references = working.get(issuer.index)!;
  const earliest = FIRST_DAY + 900 + Math.floor(draw(PURPOSE.start, n + 10_000_000) * 4500);
  const level = STEP_FOR_CUSTOMERS[issuer.tier];
  const left = () => wanted - plan.valueCount;
  const add = (many: number, step: number, maker: number, from_: Holding, start?: number): Holding =>
    plan.add(many, step, { holder, issuer: maker }, fitted(pieces, left()), from_, {
      earliest: start ?? 0,
      mostCalibrations: Math.max(1, Math.floor(left() / pieces.count / many)),
    });
  const main = add(level === 11 ? 3 : 1, level, issuer.index, references, earliest);
  if (level !== 11 || left() <= 0 || main.count < 3) return;
  const shop = add(3, 12, holder, main);
  if (left() > 0) add(6, 13, holder, shop);
}

/** No more pieces than values are left to plan. */
function fitted(
  { from, count }: { from: number; count: number },
  left: number,
): { from: number; count: number } {
  return { from, count: Math.max(1, Math.min(count, left)) };
}
