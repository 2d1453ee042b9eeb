import type { GraphLinkRow, GraphValueRow } from './graph-arrays.ts';

/**
 * Rows by the hundred thousand come as one text each: reading a column costs the connector more than its bytes do,
 * and a packed row takes a quarter of the processor time. A double's text is the shortest that gives it back, so
 * nothing is lost; no part holds a comma.
 */
const SEPARATOR = ',';

const VALUE_PARTS = [
  'v.id',
  'v.standard_id',
  'v.holder_id',
  'v.issuer_id',
  'v.nominal',
  'v.class',
  'v.quantity',
  'r.decision_rule',
  'TO_DAYS(v.performed_end)',
  'TO_DAYS(v.effective_from)',
  'TO_DAYS(v.recorded_at)',
  // Deviations of up to 1 000 g keep all their twelve decimals in a double.
  'CAST(v.deviation AS DOUBLE)',
  'CAST(v.expanded_u AS DOUBLE)',
  'v.u',
  `CASE v.reported_unit WHEN 'kg' THEN 3 WHEN 'g' THEN 0 WHEN 'mg' THEN -3 ELSE -6 END
     - CAST(v.reported_u_decimals AS SIGNED)`,
];

const LINK_PARTS = [
  'l.child_id',
  'l.parent_id',
  'l.sensitivity',
  'TO_DAYS(l.used_begin)',
  'TO_DAYS(l.used_end)',
  "l.used_as = 'class limit'",
  'CAST(l.used_expanded_u AS DOUBLE)',
  "l.used_as = 'by notice'",
];

/** One row as it comes. */
export interface Packed {
  line: string;
}

/** The columns of a value, of `assigned_value v` and its `revision r`. */
export const VALUE_COLUMNS = packed(VALUE_PARTS);
/** The columns of a link, of `value_link l`. */
export const LINK_COLUMNS = packed(LINK_PARTS);

function packed(parts: readonly string[]): string {
  return `CONCAT_WS('${SEPARATOR}', ${parts.map((part) => `IFNULL(${part}, '')`).join(', ')}) AS line`;
}

/** A value, in the order of its parts. */
export function unpackValue({ line }: Packed): GraphValueRow {
  const part = line.split(SEPARATOR);
  return {
    id: Number(part[0]),
    standardId: part[1]!,
    holderId: part[2]!,
    issuerId: part[3]!,
    nominal: part[4]!,
    class: part[5] || null,
    quantity: part[6] as GraphValueRow['quantity'],
    decisionRule: (part[7] || null) as GraphValueRow['decisionRule'],
    performedDay: Number(part[8]),
    effectiveDay: Number(part[9]),
    recordedDay: Number(part[10]),
    deviation: Number(part[11]),
    expandedU: numberOrNull(part[12]!),
    u: numberOrNull(part[13]!),
    uPlace: numberOrNull(part[14]!),
  };
}

/** A link, in the order of its parts. */
export function unpackLink({ line }: Packed): GraphLinkRow {
  const part = line.split(SEPARATOR);
  return {
    childId: Number(part[0]),
    parentId: Number(part[1]),
    sensitivity: Number(part[2]),
    usedBeginDay: Number(part[3]),
    usedEndDay: Number(part[4]),
    isClassLimit: part[5] === '1',
    usedExpandedU: numberOrNull(part[6]!),
    isByNotice: part[7] === '1',
  };
}

function numberOrNull(text: string): number | null {
  return text === '' ? null : Number(text);
}
