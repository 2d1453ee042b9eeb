import type { DownstreamRow, WhatIfGroup, WhatIfRow } from '#shared/contracts/downstream.ts';

type Column<Row> = readonly [head: string, of: (row: Row) => string | number | null];

const WEIGHT: Column<DownstreamRow | WhatIfRow>[] = [
  ['weight', (row) => row.registryNo],
  ['nominal g', (row) => row.nominal],
  ['class', (row) => row.class],
  ['laboratory', (row) => (row.view === 'full' ? row.holder.name : row.laboratory.name)],
  ['kind', (row) => (row.view === 'full' ? row.quantity : null)],
  ['deviation g', (row) => (row.view === 'full' ? row.deviation : null)],
  ['U g', (row) => (row.view === 'full' ? row.expandedU : null)],
  ['k', (row) => (row.view === 'full' ? row.k : null)],
];

const CONSEQUENCE: Column<WhatIfRow>[] = [
  ['shift g', (row) => row.shift],
  ['shift/U', (row) => (row.view === 'full' ? row.ratio : null)],
  ['deviation after g', (row) => (row.view === 'full' ? row.deviationAfter : null)],
  ['U after g', (row) => (row.view === 'full' ? row.expandedUAfter : null)],
  ['class before', (row) => (row.view === 'full' ? row.classBefore : null)],
  ['class after', (row) => (row.view === 'full' ? row.classAfter : null)],
  ['word', (row) => row.word],
];

/** Rows as they were sent, as CSV (RFC 4180): who leans on it. What is not told stays empty. */
export function leaningCsv(rows: readonly DownstreamRow[], hasHead = true): string {
  const calibrated: Column<DownstreamRow> = [
    'calibrated',
    (row) => (row.view === 'full' ? row.performedEnd : null),
  ];
  return csvOf<DownstreamRow>(rows, [...WEIGHT, calibrated], hasHead);
}

/** Rows as they were sent, as CSV (RFC 4180): what a change would do. What is not told stays empty. */
export function whatIfCsv(rows: readonly WhatIfRow[], hasHead = true): string {
  return csvOf<WhatIfRow>(rows, [...WEIGHT, ...CONSEQUENCE], hasHead);
}

/** Groups as they were sent, as CSV (RFC 4180). @param nameOf what a group is called */
export function groupsCsv(
  groups: readonly WhatIfGroup[],
  headOf: string,
  nameOf: (group: WhatIfGroup) => string,
): string {
  return csvOf<WhatIfGroup>(groups, [
    [headOf, nameOf],
    ['in all', (group) => group.count],
    ['of others', (group) => group.warned],
    ['none', (group) => group.words.none],
    ['material', (group) => group.words.material],
    ['verdict changes', (group) => group.words.verdictChanges],
    ['largest shift g', (group) => group.largestShift],
    ['largest shift/U', (group) => group.largestRatio],
  ]);
}

function csvOf<Row>(rows: readonly Row[], columns: readonly Column<Row>[], hasHead = true): string {
  const lines = rows.map((row) => columns.map(([, of]) => field(of(row))));
  return [...(hasHead ? [columns.map(([head]) => head)] : []), ...lines]
    .map((line) => `${line.join(',')}\r\n`)
    .join('');
}

const NUMBER = /^-?\d+(\.\d+)?(e[+-]?\d+)?$/;

/** A text that a spreadsheet would take for a formula is set off by an apostrophe. */
function field(value: string | number | null): string {
  const text = String(value ?? '');
  const safe = /^[=+\-@\t\r]/.test(text) && !NUMBER.test(text) ? `'${text}` : text;
  return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}
