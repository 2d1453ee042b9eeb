import type { ChainValue } from '#shared/contracts/chains.ts';
import { Decimal } from '#shared/decimal.ts';
import { nominalText } from '#shared/numbers/nominal.ts';

/** What plates of one group have in common. */
export type FoldBy = 'laboratory' | 'laboratory, class and nominal';

/** The laboratory that a plate names: who holds the weight or, where that is not said, who calibrated it. */
export function laboratoryOf(node: ChainValue): ChainValue['issuer'] {
  return node.holder ?? node.issuer;
}

/** What plates must have in common to be merged; roots of one kind stay by themselves, or they would hide. */
export function kindOf(node: ChainValue, by: FoldBy): string {
  const common = [laboratoryOf(node).code, node.rootKind?.split(' ')[0] ?? ''];
  if (by === 'laboratory') return common.join('_');
  return [...common, node.class ?? '', decadeOf(node.nominal)].join('_');
}

/** Key of a group: its kind and how often the kind changed on the way up to it. Fit for an address. */
export function keyOf(node: ChainValue, by: FoldBy, run: number): string {
  return `${kindOf(node, by)}_${run}`.replace(/[^\w-]/g, '-');
}

/** Power of ten of a nominal in grams: 3 for 1 kg to 5 kg. */
function decadeOf(nominal: string): number {
  return new Decimal(nominal).e;
}

/** What the members have in common in words, for the plate. */
export function commonOf(members: readonly ChainValue[], by: FoldBy): string | null {
  const [first] = members;
  if (!first) return null;
  if (first.rootKind) return first.rootKind;
  if (by === 'laboratory') return null;
  const nominals = members.map((node) => new Decimal(node.nominal));
  const [least, most] = [Decimal.min(...nominals), Decimal.max(...nominals)];
  const span = least.eq(most)
    ? nominalText(least.toFixed())
    : `${nominalText(least.toFixed())} to ${nominalText(most.toFixed())}`;
  return first.class ? `${span} ${first.class}` : span;
}
