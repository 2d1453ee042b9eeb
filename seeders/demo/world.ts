import type { CatalogueEntry } from './catalogue.ts';
import type { Sheet } from './certificate.ts';
import type { Step } from './plan.ts';
import type { DemoValue } from './value.ts';
import type { Weight } from './weight.ts';

/** The network while it is being made: what stands in the register so far. */
export interface World {
  steps: Step[];
  catalogue: CatalogueEntry[];
  weights: Map<string, Weight>;
  values: Map<string, DemoValue>;
  /** How many certificates a laboratory has issued in a year. */
  certificates: Map<string, number>;
  /** What each certificate says, by its number: the latest revision. */
  sheets: Map<string, IssuedSheet>;
  /** Values of each round of a series, by `<series>/<round>`. */
  rounds: Map<string, DemoValue[]>;
}

/** A certificate as it stands: its latest revision. */
export interface IssuedSheet {
  sheet: Sheet;
  revision: number;
  values: DemoValue[];
}

/** The network before its first day. */
export function emptyWorld(): World {
  return {
    steps: [],
    catalogue: [],
    weights: new Map(),
    values: new Map(),
    certificates: new Map(),
    sheets: new Map(),
    rounds: new Map(),
  };
}

/** The values of one round of a series. @throws Error where it has not been done */
export function valuesOf(world: World, series: string, round: number): DemoValue[] {
  const found = world.rounds.get(`${series}/${round}`);
  if (!found) throw new Error(`Round ${round} of ${series} has not been done`);
  return found;
}

/** The next number of a laboratory in the year of a day: `OI-17-004`. */
export function nextCertificateNo(world: World, issuer: string, day: string): string {
  const series = `${issuer}-${day.slice(2, 4)}`;
  const count = (world.certificates.get(series) ?? 0) + 1;
  world.certificates.set(series, count);
  return `${series}-${String(count).padStart(3, '0')}`;
}
