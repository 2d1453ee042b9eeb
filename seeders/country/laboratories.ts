/** What a laboratory of the country is for. */
export type Tier = 'institute' | 'first' | 'second' | 'third';

export interface CountryLaboratory {
  index: number;
  tier: Tier;
  code: string;
  name: string;
  place: string;
  isAccredited: boolean;
}

/** Values a laboratory has to do with on average. */
const VALUES_A_LABORATORY = 2500;
const FEWEST = 6;

/**
 * The laboratories of a register of this size: the institute, those it calibrates for, those that these calibrate
 * for, and the third tier, of which every fourth calibrates for itself only. Names are invented.
 */
export function laboratoriesFor(valueCount: number): CountryLaboratory[] {
  const count = Math.max(FEWEST, Math.round(valueCount / VALUES_A_LABORATORY));
  const first = Math.max(1, Math.round(count * 0.15));
  const second = Math.max(2, Math.round(count * 0.35));
  return Array.from({ length: count }, (_, index) => {
    const tier =
      index === 0 ? 'institute' : index <= first ? 'first' : index <= first + second ? 'second' : 'third';
    const number = String(index).padStart(3, '0');
    return {
      index,
      tier,
      code: index === 0 ? 'NI' : `L${number}`,
      name: index === 0 ? 'National Institute of Mass' : `Mass Laboratory ${number}`,
      place: `Town ${number}`,
      // The last of the second tier upwards issue to others; in the third tier every fourth does not.
      isAccredited: tier === 'first' || tier === 'second' || (tier === 'third' && index % 4 !== 3),
    };
  });
}

/** The e-mail of a person of a laboratory. */
export function emailOf(role: string, laboratory: CountryLaboratory): string {
  return `${role}@${laboratory.code.toLowerCase()}.example`;
}
