import { Decimal } from '#shared/decimal.ts';

/** A density or volume with its expanded uncertainty, as asserted of a standard. */
export interface StatedVolume {
  kind: 'density' | 'volume';
  /** kg/m3 or cm3. */
  value: string;
  expandedU: string;
  k: string;
}

/**
 * Standard uncertainty of a weight's volume in cm3: the effect that its own calibration and every use of it
 * as reference share. From a density it is V u(rho)/rho with V = nominal/rho; the mass adds nothing to it at
 * this level.
 * @param nominal grams
 */
export function volumeUncertainty(nominal: string, stated: StatedVolume): number {
  const u = new Decimal(stated.expandedU).div(stated.k);
  if (stated.kind === 'volume') return u.toNumber();
  const volume = new Decimal(nominal).div(stated.value).times(1000);
  return volume.times(u).div(stated.value).toNumber();
}
