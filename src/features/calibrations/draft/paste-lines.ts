import type { DraftLine } from '#shared/contracts/drafts.ts';
import { Decimal } from '#shared/decimal.ts';
import { newLine } from './draft-values.ts';
import type { KnownStandard } from './known.ts';
import { readMass } from './read-line.ts';
import { matchWeight, nominalOf, type PastedNumber, type PastedRow } from './read-paste.ts';

/** A pasted row as it will stand in the results. */
export interface UnderstoodRow {
  row: PastedRow;
  standard: KnownStandard | null;
  /** The value is close to the nominal, so it is the whole value and no deviation. */
  isWhole: boolean;
}

/** A value within this part of the nominal is no deviation from it. */
const WHOLE_WITHIN = 0.1;

/** Finds the weight of each row: among those of the results already there first, then among all others. */
export function understandRows(
  rows: readonly PastedRow[],
  inResults: readonly KnownStandard[],
  others: readonly KnownStandard[],
): UnderstoodRow[] {
  return rows.map((row) => {
    const standard = matchWeight(row.weight, inResults) ?? matchWeight(row.weight, others);
    const nominal = standard ? new Decimal(standard.nominal) : nominalOf(row.weight);
    return { row, standard, isWhole: isWhole(row.value, nominal) };
  });
}

/** Why a pasted row stays out; null where it goes in. */
export function whyLeftOut({ row }: UnderstoodRow): string | null {
  if (row.value && 'problem' in row.value) return row.value.problem;
  if (row.value || row.k !== '') return null;
  if (row.expandedU) return 'problem' in row.expandedU ? row.expandedU.problem : null;
  return row.weight.trim() === '' ? 'The row says nothing.' : null;
}

/**
 * Puts pasted rows into the results: into the line of the same weight where there is one, else as a new line.
 * @param names gets the pasted names of lines that found no weight, by key of the line
 * @param turnsSign the column held corrections, which have the opposite sign of deviations
 */
export function putRows(
  lines: readonly DraftLine[],
  rows: readonly UnderstoodRow[],
  turnsSign: boolean,
  names: Map<string, string> = new Map(),
): DraftLine[] {
  const result = [...lines];
  for (const { row, standard, isWhole } of rows) {
    const at = standard ? result.findIndex(({ standardId }) => standardId === standard.id) : -1;
    const line = result[at] ?? newLine(standard?.id ?? null, result[0]);
    const filled = { ...line, ...valueOf(row.value, isWhole, turnsSign), ...uOf(row.expandedU) };
    if (!standard && row.weight !== '') names.set(line.key, row.weight);
    if (row.k !== '') filled.k = row.k.slice(0, 20);
    if (at >= 0) result[at] = filled;
    else result.push(filled);
  }
  return result;
}

function valueOf(value: PastedNumber, isWhole: boolean, turnsSign: boolean): Partial<DraftLine> {
  if (!value || 'problem' in value) return {};
  const text = turnsSign && !isWhole ? turned(value.text) : value.text;
  return { value: text, unit: value.unit, valueIs: isWhole ? 'whole value' : 'deviation' };
}

function uOf(expandedU: PastedNumber): Partial<DraftLine> {
  if (!expandedU || 'problem' in expandedU) return {};
  return { expandedU: expandedU.text, uUnit: expandedU.unit, uNotStated: false };
}

/** The same number with the other sign, its zeros kept. */
export function turned(text: string): string {
  if (/^[-\u2212]/.test(text)) return text.slice(1);
  return `-${text.replace(/^\+/, '')}`;
}

function isWhole(value: PastedNumber, nominal: Decimal | null): boolean {
  if (!nominal || !value || 'problem' in value) return false;
  const grams = readMass(value.text, value.unit);
  const distance = grams?.minus(nominal).abs().div(nominal);
  return distance?.lt(WHOLE_WITHIN) ?? false;
}
