import { decimalText } from '#shared/decimal.ts';
import type { ReferenceChoice } from '#shared/contracts/drafts.ts';

/** References as a picker shows them: decimals in canonical text. */
export function presentReferences(references: readonly ReferenceChoice[]): ReferenceChoice[] {
  return references.map((reference) => ({
    ...reference,
    nominal: decimalText(reference.nominal),
    deviation: decimalText(reference.deviation),
    expandedU: reference.expandedU && decimalText(reference.expandedU),
    k: reference.k && decimalText(reference.k),
  }));
}
