import type { z } from 'zod';
import type { PropertyOrigin, StandardKind, StandardResponse } from '#shared/contracts/standards.ts';

/** How the kinds of standards are called on paper. */
export const KIND_WORDS: Record<z.infer<typeof StandardKind>, string> = {
  weight: 'weight',
  prototype: 'prototype',
  'silicon sphere': 'silicon sphere',
  realization: 'realization',
  'consensus value': 'consensus value',
};

/** Where a property comes from, as it is said after the number. */
export const ORIGIN_WORDS: Record<z.infer<typeof PropertyOrigin>, string> = {
  measured: 'measured',
  assumed: 'assumed',
  manufacturer: 'stated by the manufacturer',
};

type PropertyKind = StandardResponse['properties'][number]['kind'];

/** Name and unit of each property; the unit as a carat text that the number component sets. */
export const PROPERTIES: Record<PropertyKind, { name: string; unit: string }> = {
  density: { name: 'Density', unit: 'kg/m3' },
  volume: { name: 'Volume', unit: 'cm3' },
  susceptibility: { name: 'Susceptibility', unit: '' },
  polarisation: { name: 'Polarisation', unit: 'µT' },
};

/** A person reads "1 month", "24 months". */
export function monthsText(months: number): string {
  return months === 1 ? '1 month' : `${months} months`;
}
