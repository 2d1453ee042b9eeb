import { actOf, LAST_DAY } from './days.ts';
import { drawsOf, PURPOSE, type Draw } from './draws.ts';
import { laboratoriesFor, type CountryLaboratory } from './laboratories.ts';
import { PERFORMANCE_DAYS, planSets, type WeightSet } from './weight-sets.ts';
import { workListOf, type Work } from './work-list.ts';

/** Links a value, 1 800 000 to a million. */
const LINKS_A_VALUE = 1.8;
/** Values that first issues bring; the rest are re-issues. */
const FIRST_ISSUES = 0.986;
/** Off the wanted number of links by more than this, the next calibration takes more or fewer references. */
const TOLERANCE = 150;

/** A country's register, planned: what every row is worked out from. Numbers of values count from 0, ids from 1. */
export interface Country {
  seed: number;
  draw: Draw;
  laboratories: CountryLaboratory[];
  sets: WeightSet[];
  standardCount: number;
  works: Work[];
  valueCount: number;
  linkCount: number;
  certificateCount: number;
  /** Newest act. */
  lastAct: number;
  /** The revision a value belongs to, by value. */
  workOf: Int32Array;
  /** Places in `works` of each set's revisions, in order of issue. */
  worksOfSet: number[][];
}

/**
 * Plans a country of a number of values and 1.8 links a value. The same seed gives the same register.
 * @param valueCount 10 000 or more
 */
export function planCountry(valueCount: number, seed = 1): Country {
  const draw = drawsOf(seed);
  const laboratories = laboratoriesFor(valueCount);
  const plan = planSets(laboratories, draw, Math.floor(valueCount * FIRST_ISSUES));
  const works = workListOf(plan.sets, draw, valueCount);
  const workOf = new Int32Array(valueCount);
  const worksOfSet: number[][] = plan.sets.map(() => []);
  for (const [place, work] of works.entries()) {
    workOf.fill(place, work.firstValue, work.firstValue + work.set.count);
    worksOfSet[work.set.index]!.push(place);
  }
  const linkCount = chooseReferences(works, draw, valueCount);
  return {
    seed,
    draw,
    laboratories,
    sets: plan.sets,
    standardCount: plan.standardCount,
    works,
    valueCount,
    linkCount,
    certificateCount: works.filter((work) => work.revisionN === 1).length,
    lastAct: actOf(LAST_DAY),
    workOf,
    worksOfSet,
  };
}

/** One to three references a calibration, so that the country has the links asked for. Gives their number. */
function chooseReferences(works: readonly Work[], draw: Draw, valueCount: number): number {
  const wanted = Math.round(valueCount * LINKS_A_VALUE);
  let links = 0;
  let values = 0;
  const ofCertificate = new Map<number, Work>();
  for (const work of works) {
    const { count, referenceCount } = work.set;
    const most = Math.min(3, referenceCount);
    const original = ofCertificate.get(work.certificate);
    if (original) {
      work.referenceCount = original.referenceCount;
      work.firstReference = original.firstReference;
    } else {
      const off = Math.round(wanted * (values / valueCount)) - links;
      const drawn = draw(PURPOSE.references, work.certificate);
      const usual = drawn < 0.4 ? 1 : drawn < 0.8 ? 2 : 3;
      work.referenceCount = Math.min(most, off > TOLERANCE ? 3 : off < -TOLERANCE ? 1 : usual);
      work.firstReference = Math.floor(
        draw(PURPOSE.firstReference, work.certificate) * Math.max(1, referenceCount),
      );
      ofCertificate.set(work.certificate, work);
    }
    values += count;
    links += count * work.referenceCount;
  }
  return links + settle(works, wanted - links);
}

/** Takes single references away or adds them, last calibrations first, until the number is exact. */
function settle(works: readonly Work[], missing: number): number {
  let changed = 0;
  const reissued = new Set(works.filter((work) => work.revisionN === 2).map((work) => work.certificate));
  for (const work of works.toReversed()) {
    const left = missing - changed;
    if (left === 0) break;
    if (reissued.has(work.certificate) || work.set.count > Math.abs(left) || work.set.level === 0) continue;
    const next = work.referenceCount + Math.sign(left);
    if (next < 1 || next > Math.min(3, work.set.referenceCount)) continue;
    work.referenceCount = next;
    changed += Math.sign(left) * work.set.count;
  }
  return changed;
}

/**
 * The revision of a set to use on a day: the newest issued before it that had not ended by then, and where all had,
 * the newest that had: somebody used what was withdrawn. -1 where none was issued.
 */
export function standingWork(country: Country, set: number, day: number): number {
  const places = country.worksOfSet[set]!;
  let newest = -1;
  let ended = -1;
  for (const place of places) {
    const work = country.works[place]!;
    if (work.issuedOn >= day) break;
    const hasEnded = work.ending !== 'none' && work.endsOn <= day;
    if (hasEnded) {
      ended = place;
      continue;
    }
    const before = country.works[newest];
    if (!before || work.day >= before.day) newest = place;
  }
  return newest >= 0 ? newest : ended;
}

/** The revisions that a revision's references came from, one for each reference used. */
export function referencesOf(country: Country, work: Work): Work[] {
  const found: Work[] = [];
  for (let n = 0; n < work.referenceCount; n += 1) {
    const at = (work.firstReference + n) % work.set.referenceCount;
    const place = standingWork(country, work.set.firstReference + at, work.day);
    if (place < 0) throw new Error(`Set ${work.set.index} was calibrated before its references were.`);
    found.push(country.works[place]!);
  }
  return found;
}

/** The last day of a revision's weighings. */
export function performedEnd(work: Work): number {
  return work.day + PERFORMANCE_DAYS;
}
