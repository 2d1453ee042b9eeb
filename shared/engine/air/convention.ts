import { Decimal } from '#shared/decimal.ts';

/*
 * The convention of conventional mass: weights of 8000 kg/m3 at 20 degC in air of 1.2 kg/m3
 * (OIML D 28:2004, clauses 4 and 5). All three are exact.
 */

/** Reference air density, kg/m3. */
export const REFERENCE_AIR_DENSITY = new Decimal('1.2');

/** Reference density of weights, kg/m3. */
export const REFERENCE_DENSITY = new Decimal(8000);

/** 1 - 1.2/8000, exactly 0.99985. */
export const REFERENCE_FACTOR = new Decimal(1).minus(REFERENCE_AIR_DENSITY.div(REFERENCE_DENSITY));

/** A volume in cm3 times an air density in kg/m3 is a mass in mg; this brings it to g. */
export const GRAM_PER_MILLIGRAM = new Decimal('0.001');

/** Kinds of mass a value may be, never mixed. */
export const MASS_KINDS = ['mass', 'conventional'] as const;

/** Whether a value is a mass or a conventional mass. */
export type MassKind = (typeof MASS_KINDS)[number];
