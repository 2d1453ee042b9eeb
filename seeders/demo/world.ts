import type { CatalogueEntry } from './catalogue.ts';
import type { Step } from './plan.ts';
import type { DemoValue } from './value.ts';
import type { Weight } from './weight.ts';

/** The network while it is being made: what stands in the register so far. */
export interface World {
  steps: Step[];
  catalogue: CatalogueEntry[];
  weights: Map<string, Weight>;
  values: Map<string, DemoValue>;
  certificates: Map<string, number>;
}

export function emptyWorld(): World {
  return { steps: [], catalogue: [], weights: new Map(), values: new Map(), certificates: new Map() };
}

/** The next number of a laboratory in the year of a day: `OI-17-004`. */
export function nextCertificateNo(world: World, issuer: string, day: string): string {
  const series = `${issuer}-${day.slice(2, 4)}`;
  const count = (world.certificates.get(series) ?? 0) + 1;
  world.certificates.set(series, count);
  return `${series}-${String(count).padStart(3, '0')}`;
}

/** A weight by its registry number. @throws Error where there is none */
export function weightOf(world: World, registryNo: string): Weight {
  const weight = world.weights.get(registryNo);
  if (!weight) throw new Error(`The demo network has no weight ${registryNo}`);
  return weight;
}
