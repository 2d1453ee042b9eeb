/** Names of the draft's fields as the screen writes them, by the last part of their path. */
const WORDS: Record<string, string> = {
  issuerId: 'Issued by',
  certificateNo: 'Certificate number',
  issuedOn: 'Issued on',
  performedBegin: 'Begun on',
  performedEnd: 'Ended on',
  datePrecision: 'Dates known to the',
  method: 'Method',
  decisionRule: 'Decision rule',
  documentId: 'Certificate as PDF',
  lines: 'Results',
  standardId: 'Weight',
  quantity: 'Quantity',
  medium: 'Weighed in',
  stage: 'Stage',
  value: 'Value',
  valueIs: 'Value is',
  unit: 'Unit of value',
  expandedU: 'U',
  uUnit: 'Unit of U',
  uNotStated: 'U not stated',
  k: 'k',
  coverage: 'Coverage',
  class: 'Class stated',
  underAccreditation: 'Under accreditation',
  unitConfirmed: 'Unit confirmed',
  signConfirmed: 'Sign confirmed',
  references: 'Reference',
  valueUid: 'Reference',
  sensitivity: 'Sensitivity',
  usedAs: 'Reference used as',
};

/** The name of one field, without the line it stands in. */
export function fieldWord(path: string): string {
  const last = path.split('.').findLast((part) => !/^\d+$/.test(part)) ?? path;
  return WORDS[last] ?? last;
}

/**
 * A field of the draft in words: `lines.1.expandedU` is "Line 2, 200 g: U".
 * @param weightOf the marking of the weight in a line, where one is chosen
 */
export function fieldWords(path: string, weightOf: (line: number) => string | null): string {
  const at = lineOf(path);
  if (at === null) return fieldWord(path);
  const weight = weightOf(at);
  return `Line ${at + 1}${weight ? `, ${weight}` : ''}: ${fieldWord(path)}`;
}

/** The line a field belongs to; null for the head of the certificate. */
export function lineOf(path: string): number | null {
  const at = /^lines\.(\d+)/.exec(path)?.[1];
  return at === undefined ? null : Number(at);
}
