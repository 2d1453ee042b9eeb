import type { Country } from './country.ts';
import { PURPOSE } from './draws.ts';
import { FIGURES, GRADES } from './grades.ts';
import { KILOGRAM, PIECES } from './pieces.ts';
import { volumeU } from './tables-of-standards.ts';
import type { Work } from './work-list.ts';

/** Steps from here on are weighed in air with volumes that matter. */
const FIRST_STEP_WITH_VOLUMES = 3;
/** Part of the certificates that name the volumes of weight and reference as shared effects. */
const WITH_VOLUMES = 0.5;
/** How far the air density lay from 1.2 kg/m3 at most, g/cm3. */
const AIR_DENSITY_RANGE = 2e-5;

/** How much of a volume's error a revision's results take over, g per cm3; null where it names no volumes. */
export function buoyancySensitivity(country: Country, work: Work): number | null {
  const { draw } = country;
  if (work.set.level < FIRST_STEP_WITH_VOLUMES) return null;
  if (draw(PURPOSE.volumeShared, work.certificate) >= WITH_VOLUMES) return null;
  return 2 * (draw(PURPOSE.airDensity, work.certificate) - 0.5) * AIR_DENSITY_RANGE;
}

/**
 * What a piece's calibration added itself, g: what U leaves beside the references and volumes. References count as
 * fully correlated, so that U covers the chain whatever they share.
 */
export function localU(country: Country, work: Work, piece: number): number {
  const { set } = work;
  const { u } = FIGURES[set.level]![piece]!;
  if (set.level === 0) return u;
  const used = set.isSubdivision ? KILOGRAM : piece;
  const part = set.isSubdivision ? Number(PIECES[piece]!.nominal) / 1000 : 1;
  const carried = part * FIGURES[set.level - 1]![used]!.u;
  const buoyancy = buoyancySensitivity(country, work) ?? 0;
  const own = buoyancy * volumeU(PIECES[piece]!, GRADES[set.level]!);
  const references = buoyancy * part * volumeU(PIECES[used]!, GRADES[set.level - 1]!);
  return Math.sqrt(Math.max(0, u * u - carried * carried - own * own - references * references));
}
