import { decimalText } from '#shared/decimal.ts';
import type { ReferenceChoice } from '#shared/contracts/drafts.ts';
import { readsInFull, type User } from '#server/policy/user.ts';

/**
 * References as a picker shows them: decimals in canonical text. Of another laboratory's weight what a certificate that
 * names it says, and no numbers: who knows a registry number could read any value by it.
 */
export function presentReferences(references: readonly ReferenceChoice[], user: User): ReferenceChoice[] {
  return references.map((reference) => ({
    ...reference,
    nominal: decimalText(reference.nominal),
    ...(readsInFull(user, reference.holder.id) ? numbersOf(reference) : NO_NUMBERS),
  }));
}

const NO_NUMBERS = { deviation: null, expandedU: null, k: null };

function numbersOf({ deviation, expandedU, k }: ReferenceChoice) {
  return {
    deviation: deviation && decimalText(deviation),
    expandedU: expandedU && decimalText(expandedU),
    k: k && decimalText(k),
  };
}
