import { placeOf, type CatalogueEntry } from './catalogue.ts';
import type { Entry } from './certificate.ts';
import type { DemoValue } from './value.ts';
import type { World } from './world.ts';

/** What a certificate leaves out on purpose, and the rule that finds it. The result itself is right. */
export const OMISSIONS = {
  drift: { rule: 'B-23', kind: 'budget without a term for the change of the reference' },
  buoyancy: { rule: 'B-25', kind: 'budget without air buoyancy' },
  'decision rule': { rule: 'B-31', kind: 'class stated without a decision rule' },
  'degrees of freedom': { rule: 'B-32', kind: 'k = 2 with few degrees of freedom' },
  'result as found': { rule: 'B-36', kind: 'adjusted, and no result as found' },
  signatory: { rule: 'B-38', kind: 'signed by somebody without authorisation' },
} as const satisfies Record<string, Pick<CatalogueEntry, 'rule' | 'kind'>>;

export type Omission = keyof typeof OMISSIONS;

/** Degrees of freedom that a certificate states where they are few. */
export const FEW_DEGREES = 4;

/** Names of components that a budget has not where something is left out of it. */
export const LEFT_OUT: Partial<Record<Omission, string>> = {
  drift: 'Reference since its calibration',
  buoyancy: 'Air density',
};

/** Enters what is left out into the catalogue, once the certificate has its number. */
export function noteOmissions(world: World, entries: readonly Entry[], values: readonly DemoValue[]): void {
  for (const [at, { omits }] of entries.entries()) {
    if (!omits) continue;
    world.catalogue.push({
      is: 'fault',
      ...OMISSIONS[omits],
      verdict: 'conduct',
      ...placeOf(values[at]!),
      reference: null,
      alsoFoundBy: [],
    });
  }
}
