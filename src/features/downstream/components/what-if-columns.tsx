import type { ReactNode } from 'react';
import type { WhatIfGroup, WhatIfRow, WhatIfSort } from '#shared/contracts/downstream.ts';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { usePreferences } from '#src/lib/preferences.ts';
import { plainText, ratioText, roundedText } from '../rounded.ts';
import type { Suppose } from '../search.ts';

/** A column between the weight and its word: what is told of a group and of a row. */
interface WhatIfColumn {
  name: string;
  /** At the head of the groups, where it differs from what heads the rows. */
  groupName?: string;
  sort?: WhatIfSort;
  ofGroup: (group: WhatIfGroup) => ReactNode;
  ofRow: (row: WhatIfRow) => ReactNode;
}

const SHIFT: WhatIfColumn = {
  name: 'Shift',
  groupName: 'Largest shift',
  sort: 'shift',
  ofGroup: ({ largestShift }) => (largestShift === null ? null : <Mass grams={largestShift} />),
  ofRow: ({ shift }) =>
    shift === null ? <span className="text-ink-3">unknown</span> : <Mass grams={shift} isSigned />,
};

const RATIO: WhatIfColumn = {
  name: 'Shift/U',
  sort: 'ratio',
  ofGroup: ({ largestRatio }) => (largestRatio === null ? null : <Ratio value={largestRatio} />),
  ofRow: (row) => (row.view !== 'full' || row.ratio === null ? null : <Ratio value={row.ratio} isSigned />),
};

const U_AFTER: WhatIfColumn = {
  name: 'U after',
  sort: 'u',
  ofGroup: () => null,
  ofRow: (row) =>
    row.view !== 'full' || row.expandedUAfter === null ? null : (
      <Expanded grams={row.expandedUAfter} k={row.k} />
    ),
};

const U_BEFORE: WhatIfColumn = {
  name: 'U now',
  ofGroup: () => null,
  ofRow: (row) =>
    row.view !== 'full' || row.expandedU === null ? null : (
      <Expanded grams={Number(row.expandedU)} k={row.k} />
    ),
};

/** What a change can do: a shift moves values, a larger u widens U, a withdrawal leaves nothing to compute. */
export const COLUMNS: Record<Suppose, readonly WhatIfColumn[]> = {
  shift: [SHIFT, RATIO],
  raise: [U_BEFORE, U_AFTER],
  withdraw: [],
};

function Mass({ grams, isSigned = false }: { grams: number; isSigned?: boolean }) {
  return <Quantity value={roundedText(grams)} kind={isSigned ? 'deviation' : 'value'} shownIn="auto" />;
}

/** U as stated or as it would become, to two digits. */
function Expanded({ grams, k }: { grams: number; k: string | null }) {
  return <Quantity value={plainText(grams)} kind="uncertainty" coverageFactor={k} shownIn="auto" />;
}

function Ratio({ value, isSigned = false }: { value: number; isSigned?: boolean }) {
  const { decimalMark } = usePreferences();
  return <>{ratioText(value, { decimalMark, isSigned })}</>;
}
