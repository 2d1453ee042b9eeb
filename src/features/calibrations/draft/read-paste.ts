import { Decimal } from '#shared/decimal.ts';
import type { MassUnit } from '#shared/contracts/common.ts';
import { EngineError } from '#shared/engine/errors.ts';
import { parseQuantity, type ParsedQuantity } from '#shared/engine/quantity/parse-quantity.ts';
import { evidentDecimalMark, type DecimalMark } from '#shared/engine/quantity/read-number.ts';
import { unitOfText } from '#shared/engine/quantity/units.ts';

/** What a pasted column holds. */
export type Column = 'weight' | 'value' | 'U' | 'k' | 'nothing';

/** A pasted table, split into cells, with what each column was taken for. */
export interface PastedTable {
  columns: Column[];
  /** The units named in the head, by column. */
  units: (MassUnit | null)[];
  rows: string[][];
  /** The head calls the value a correction, which has the opposite sign. */
  isCorrection: boolean;
}

/** A number as it was understood: plain text in its unit, or why it was not. */
export type PastedNumber = { text: string; unit: MassUnit } | { problem: string } | null;

export interface PastedRow {
  /** What names the weight: its marking, number or nominal. */
  weight: string;
  value: PastedNumber;
  expandedU: PastedNumber;
  k: string;
}

const MASS_UNITS = ['kg', 'g', 'mg', 'ug'] as const;

const HEADS: readonly [Column, RegExp][] = [
  ['U', /^u\b|uncert|unsich|incert/i],
  ['k', /^k\b|coverage factor/i],
  ['weight', /weight|mark|nominal|number|^no\b|serial|identif/i],
  ['value', /dev|value|error|correct|mass|result|measured/i],
];

/** Splits what a spreadsheet puts on the clipboard; also text set with semicolons or wide spaces. */
export function readPastedTable(text: string): PastedTable {
  const lines = text.split(/\r?\n/).filter((line) => line.trim() !== '');
  const separator = [/\t/, /;/, / {2,}/].find((one) => lines.some((line) => one.test(line))) ?? /\t/;
  const cells = lines.map((line) => line.split(separator).map((cell) => cell.trim()));
  const [first = [], ...rest] = cells;
  const isHead = first.length > 1 && first.every((cell) => !/^[+\-\u2212]?\d/.test(cell));
  const rows = isHead ? rest : cells;
  const width = Math.max(0, ...cells.map((row) => row.length));
  const head = isHead ? first : [];
  return {
    columns: isHead ? columnsOfHead(head, width) : plainColumns(width),
    units: Array.from({ length: width }, (_, at) => unitOfHead(head[at] ?? '')),
    rows: rows.map((row) => [...row, ...Array<string>(width - row.length).fill('')]),
    isCorrection: head.some((cell) => /correction/i.test(cell)),
  };
}

/**
 * Which decimal sign the numbers of a table show. One number without doubt, such as 0,12, decides for all;
 * `ambiguous` where every number with a comma has exactly three digits after it; null where no number shows one.
 */
export function decimalSignOf(table: PastedTable): DecimalMark | 'ambiguous' | null {
  const numbers = table.rows.flatMap((row) =>
    row.filter((_, at) => table.columns[at] === 'value' || table.columns[at] === 'U'),
  );
  const written = numbers.flatMap((cell) =>
    (cell.match(/\d(?:[\d.,\s]*\d)?/g) ?? []).map((text) => text.replace(/\s/g, '')),
  );
  // More than one comma in a number is a grouping, which only a point can be the decimal sign beside.
  if (written.some((text) => text.includes('.') || text.split(',').length > 2)) return '.';
  const withComma = written.filter((text) => text.includes(','));
  if (withComma.length === 0) return null;
  return withComma.some((text) => evidentDecimalMark(text) === ',') ? ',' : 'ambiguous';
}

/** Reads every row by what its columns hold. Nothing is guessed: what cannot be read says why. */
export function readPastedRows(
  table: PastedTable,
  { unit, uUnit, decimalMark }: { unit: MassUnit; uUnit: MassUnit; decimalMark: DecimalMark },
): PastedRow[] {
  const at = (column: Column): number => table.columns.indexOf(column);
  const cell = (row: string[], column: Column): string => row[at(column)] ?? '';
  const unitOf = (column: Column, otherwise: MassUnit): MassUnit => table.units[at(column)] ?? otherwise;
  return table.rows.map((row) => {
    const value = readCell(cell(row, 'value'), unitOf('value', unit), decimalMark);
    const own = readCell(cell(row, 'U'), unitOf('U', uUnit), decimalMark);
    const beside = value && 'beside' in value ? value.beside : null;
    return {
      weight: row.filter((_, index) => table.columns[index] === 'weight').join(' '),
      value: value && 'problem' in value ? value : value && { text: value.text, unit: value.unit },
      expandedU:
        own === null ? (beside ?? null) : 'problem' in own ? own : { text: own.text, unit: own.unit },
      k: cell(row, 'k'),
    };
  });
}

function columnsOfHead(head: readonly string[], width: number): Column[] {
  const taken = new Set<Column>();
  return Array.from({ length: width }, (_, at) => {
    const column = HEADS.find(([name, words]) => words.test(head[at] ?? '') && !taken.has(name))?.[0];
    if (column) taken.add(column);
    return column ?? 'nothing';
  });
}

function plainColumns(width: number): Column[] {
  const order: Column[] = ['weight', 'value', 'U', 'k'];
  return Array.from({ length: width }, (_, at) => order[at] ?? 'nothing');
}

/** The unit in a head such as "U / µg", "U (µg)" or "U, µg". */
function unitOfHead(cell: string): MassUnit | null {
  const words = cell.split(/[\s,;:/()[\]]+/).filter((word) => word !== '');
  const units = words.map((word) => unitOfText(word));
  return MASS_UNITS.find((unit) => units.includes(unit)) ?? null;
}

type ReadCell = { text: string; unit: MassUnit; beside: PastedNumber } | { problem: string } | null;

function readCell(text: string, unit: MassUnit, decimalMark: DecimalMark): ReadCell {
  if (text.trim() === '') return null;
  try {
    const options = { field: 'cell', units: MASS_UNITS, defaultUnit: unit, decimalMark };
    const parsed = parseQuantity(text, options);
    const own = (parsed.unit ?? unit) as MassUnit;
    return { text: parsed.value.toFixed(parsed.decimals), unit: own, beside: besideValue(parsed, own) };
  } catch (error) {
    if (!(error instanceof EngineError)) throw error;
    return { problem: error.message.replace(/^\S+: r/, 'R') };
  }
}

/** An uncertainty written in the value's own cell: after the plus-minus sign it is U; in brackets it is not. */
function besideValue({ uncertainty }: ParsedQuantity, unit: MassUnit): PastedNumber {
  if (!uncertainty) return null;
  if (uncertainty.form === 'brackets') {
    return { problem: 'Digits in brackets are a standard uncertainty (JCGM 100:2008, 7.2.2); enter U.' };
  }
  return {
    text: uncertainty.value.toFixed(uncertainty.decimals),
    unit: (uncertainty.unit ?? unit) as MassUnit,
  };
}

/** A weight that a pasted row can mean. */
export interface Candidate {
  id: string;
  registryNo: string;
  marking: string;
  nominal: string;
}

/**
 * The weight a pasted name means: by registry number, by marking, or by nominal where only one weight has it.
 * Two equal candidates are no answer.
 */
export function matchWeight<Weight extends Candidate>(
  name: string,
  candidates: readonly Weight[],
): Weight | null {
  const wanted = plainName(name);
  if (wanted === '') return null;
  const nominal = nominalOf(name);
  const tests: ((weight: Weight) => boolean)[] = [
    (weight) => plainName(weight.registryNo) === wanted,
    (weight) => plainName(weight.marking) === wanted,
    (weight) => nominal !== null && nominal.eq(weight.nominal) && starsOf(weight.marking) === starsOf(name),
  ];
  for (const test of tests) {
    const found = candidates.filter(test);
    if (found.length === 1) return found[0] ?? null;
    if (found.length > 1) return null;
  }
  return null;
}

/** A marking or number without what people write in different ways: case, spaces, kinds of star. */
export function plainName(text: string): string {
  return text
    .toLowerCase()
    .replace(/\s/g, '')
    .replace(/[\u2217\u22c6\u2605\u2022\u00b7]/g, '*');
}

function starsOf(text: string): number {
  return (plainName(text).match(/\*/g) ?? []).length;
}

/** The nominal a name states, in grams: "200 g *" is 200; null where it states none. */
export function nominalOf(text: string): Decimal | null {
  const match = /^\s*([\d.,\s]+?)\s*(kg|mg|g)\b/.exec(text);
  if (!match) return null;
  const read = readCell(`${match[1]} ${match[2]}`, 'g', evidentDecimalMark(match[1] ?? '') ?? '.');
  if (!read || 'problem' in read) return null;
  return new Decimal(read.text).times({ kg: 1000, g: 1, mg: 0.001, ug: 0.000001 }[read.unit]);
}
