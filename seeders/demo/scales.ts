import { cutNormal, drawsFor } from './draws.ts';
import type { SourceUse } from './leaning.ts';

/** The versions of the mass scale that values of the network rest on. */
export const REALIZED = 'Kilogram as realized';
export const CONSENSUS = 'Consensus value 2021';
/** From this day values are disseminated from the consensus value. */
export const ADOPTION = '2021-03-01';

/** Versions of the mass scale as they are registered. */
export const SCALES = [
  {
    name: REALIZED,
    basis: 'Each institute disseminates from its own realization of the kilogram',
    validFrom: '2016-06-01',
  },
  {
    name: CONSENSUS,
    basis: 'Value of the kilogram agreed from a comparison of realizations, u agreed and not computed',
    validFrom: ADOPTION,
  },
] as const;

/** Agreed standard uncertainty of the consensus value at 1 kg, g. */
export const CONSENSUS_U = 0.000018;

/** How a value of some nominal leans on the consensus scale: in proportion to its mass. */
export function onConsensusScale(grams: number): SourceUse {
  return {
    source: `S:${CONSENSUS}`,
    sensitivity: grams / 1000,
    u: CONSENSUS_U,
    error: CONSENSUS_U * cutNormal(drawsFor('consensus scale'), 1.2),
  };
}
