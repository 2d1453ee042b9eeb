import type { z } from 'zod';
import type { PropertyOrigin, RegisterStandardBody } from '#shared/contracts/standards.ts';

/** A density as it is typed: numbers as text, null where it is not known at all. */
export type DensityEntry = z.input<typeof RegisterStandardBody>['density'];

/** Stainless steel of which nothing was measured. Common practice, no source; k = 2. */
export const ASSUMED_STEEL: NonNullable<DensityEntry> = {
  value: '7950',
  expandedU: '140',
  k: '2',
  origin: 'assumed',
};

/** The entry once it is said where the density comes from; what was typed before stays. */
export function withOrigin(entry: DensityEntry, origin: z.infer<typeof PropertyOrigin> | ''): DensityEntry {
  if (origin === '') return null;
  return { value: '', expandedU: null, k: '2', ...entry, origin };
}
