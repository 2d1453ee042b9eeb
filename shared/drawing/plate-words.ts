import type { ChainValue } from '#shared/contracts/chains.ts';
import { quantitySpans, type InkSpan } from '#shared/numbers/ink-spans.ts';
import { nominalText } from '#shared/numbers/nominal.ts';
import type { NumberStyle } from '#shared/numbers/quantity-text.ts';
import type { State } from '#shared/states.ts';
import type { DrawnNode, PlateGroup } from './drawn-chain.ts';

/** What stands on a plate beside its value, ready to be set. */
export interface PlateWords {
  /** Registry number; of a group, the laboratory's name. */
  name: string;
  /** At the right of the name: nominal and class, kind of root, or how many values. */
  corner: string;
  /** Deviation with U; of a group, what its values have in common. */
  value: InkSpan[];
  /** Under the value: the day, and who holds the weight or, where that is not said, who calibrated it. */
  foot: string;
  /** How it stands in a word, beside its mark; a value that no longer stands says so. Null for an effect. */
  stands: string | null;
}

/** The words of a plate. */
export function plateWords(node: DrawnNode, state: State, style: NumberStyle): PlateWords {
  if (node.type === 'group') return groupWords(node);
  if (node.type === 'source')
    return {
      name: node.registryNo ?? node.kind,
      corner: 'shared effect',
      value: [],
      foot: node.name,
      stands: null,
    };
  const { issuer, performedEnd, datePrecision } = node;
  return {
    name: node.registryNo,
    corner: node.rootKind ?? nominalAndClass(node, style.decimalMark),
    value: valueOf(node, style),
    foot: `${datedTo(performedEnd, datePrecision)} · ${node.holder?.name ?? issuer.name}`,
    stands: node.state === 'in force' ? state : `${state}, ${node.state}`,
  };
}

/** Nominal in the unit it is spoken of, with the class: "1 kg E2". */
function nominalAndClass(node: ChainValue, decimalMark: NumberStyle['decimalMark']): string {
  const nominal = nominalText(node.nominal, decimalMark);
  return node.class ? `${nominal} ${node.class}` : nominal;
}

function valueOf(node: ChainValue, style: NumberStyle): InkSpan[] {
  const spans = quantitySpans(
    {
      value: node.deviation,
      expandedUncertainty: node.expandedU,
      coverageFactor: node.k,
      kind: 'deviation',
      shownIn: 'auto',
    },
    { style },
  );
  return node.expandedU === null ? [...spans, { text: ', U not stated', isBeyond: true }] : spans;
}

function groupWords(group: PlateGroup): PlateWords {
  const { broken, caution, notJudged } = group.failing;
  const count = { broken, caution, 'not judged': notJudged, sound: 0, 'does not apply': 0 }[group.state];
  const years = new Set([group.from.slice(0, 4), group.to.slice(0, 4)]);
  return {
    name: group.laboratory.name,
    corner: `${group.members.length} values`,
    value: group.common === null ? [] : [{ text: group.common }],
    foot: [...years].join(' to '),
    stands: count === 0 ? group.state : `${count} ${group.state}`,
  };
}

/** A date no more exact than it is known. */
function datedTo(day: string, precision: 'day' | 'month' | 'year'): string {
  return { day, month: day.slice(0, 7), year: day.slice(0, 4) }[precision];
}
