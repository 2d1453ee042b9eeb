import type { AsNowKnown } from '#shared/contracts/chains.ts';
import { shareText } from '#shared/numbers/share-text.ts';
import type { Preferences } from '#src/lib/preferences.ts';

/** Below this part of U a shift calls for nothing. Common practice, no source; a network may set another. */
const MATERIAL = 0.1;

/**
 * What follows from a shift, in one sentence. A shift that is small beside U calls for nothing, unless it changes
 * whether the class stated is accepted.
 * @param ofU size of the shift over the certificate's U; null where either is not known
 */
export function whatToDo(
  now: AsNowKnown,
  ofU: number | null,
  decimalMark: Preferences['decimalMark'],
): string {
  if (now.shift === null) return `Not computable, because ${now.because}.`;
  if (now.keepsClass && now.keepsClass.certified !== now.keepsClass.now) {
    return now.keepsClass.now
      ? 'The declared rule accepts the class stated for it as now known, and did not as certified.'
      : 'The declared rule no longer accepts the class stated for it: judge what was done with this value.';
  }
  if (Number(now.shift) === 0 && ofU !== null) {
    return 'No action needed, because its value did not move; U as now known stands above.';
  }
  if (ofU === null) return 'The certificate states no U to compare the shift with: judge the effect.';
  const share = shareText(ofU, decimalMark);
  return ofU < MATERIAL
    ? `No action needed, because the shift is ${share} of U.`
    : `The shift is ${share} of U: judge what was done with this value.`;
}
