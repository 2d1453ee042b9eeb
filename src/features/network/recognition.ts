import type { LaboratoryListResponse } from '#shared/contracts/network.ts';
import type { State } from '#shared/states.ts';

type Standing = LaboratoryListResponse['laboratories'][number]['recognition'];

/** How a recognition or a scope line is marked; where nothing was ever asserted nothing is judged. */
export function stateOfRecognition(standing: Standing): State {
  return {
    granted: 'sound',
    suspended: 'caution',
    withdrawn: 'broken',
    none: 'not judged',
  }[standing] as State;
}
