import type { ReactNode } from 'react';
import type { WhatIfChange, WhatIfGroup, WhatIfRow, WhatIfSort } from '#shared/contracts/downstream.ts';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { usePreferences } from '#src/lib/preferences.ts';
import { plainText, ratioText, roundedText } from '../rounded.ts';

/** A column between the weight and its word: what is told of a group and of a row. */
export interface WhatIfColumn {
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

/** What changes can do: a shift moves values, a larger u widens U, a withdrawal leaves nothing to compute. */
export function columnsOf(changes: readonly WhatIfChange[]): WhatIfColumn[] {
  const moves = changes.some(({ kind }) => kind === 'shift' || kind === 'notice');
  const widens = changes.some(
    (change) => change.kind === 'raise' || (change.kind === 'notice' && change.addedUPerKilogram > 0),
  );
  return [...(moves ? [SHIFT, RATIO] : []), ...(widens ? [U_BEFORE, U_AFTER] : [])];
}

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
