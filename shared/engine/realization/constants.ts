import { Decimal } from '#shared/decimal.ts';

/** Planck constant in J s, exact by definition. Source: SI Brochure, 9th edition (2019), 2.2. */
export const PLANCK_CONSTANT = new Decimal('6.62607015e-34');

/** Elementary charge in C, exact by definition. Source: SI Brochure, 9th edition (2019), 2.2. */
export const ELEMENTARY_CHARGE = new Decimal('1.602176634e-19');

/** Speed of light in vacuum in m/s, exact by definition. Source: SI Brochure, 9th edition (2019), 2.2. */
export const SPEED_OF_LIGHT = new Decimal('299792458');

/** Josephson constant 2e/h in Hz/V, exact. Source: SI Brochure, 9th edition, appendix 2, electrical units. */
export const JOSEPHSON_CONSTANT = ELEMENTARY_CHARGE.times(2).div(PLANCK_CONSTANT);

/** Von Klitzing constant h/e2 in ohm, exact. Source: SI Brochure, 9th edition, appendix 2, electrical units. */
export const VON_KLITZING_CONSTANT = PLANCK_CONSTANT.div(ELEMENTARY_CHARGE.pow(2));
