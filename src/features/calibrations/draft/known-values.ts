import { useCallback, useMemo, useState } from 'react';
import type { DraftResponse, ReferenceChoice } from '#shared/contracts/drafts.ts';
import type { StandardRow } from '#shared/contracts/standards.ts';
import { knownFromRow, type Known, type KnownStandard } from './known.ts';

/**
 * Gathers the weights and references a draft names: the server's word first, then what was chosen since.
 * @param first weights a new draft begins with
 * @param firstReference what it leans on
 */
export function useKnownValues(
  draft: DraftResponse | null,
  first: readonly StandardRow[] = [],
  firstReference: ReferenceChoice | null = null,
): Known {
  const [standards, setStandards] = useState<readonly KnownStandard[]>(() => first.map(knownFromRow));
  const [references, setReferences] = useState<readonly ReferenceChoice[]>(() =>
    firstReference ? [firstReference] : [],
  );
  const learnStandards = useCallback(
    (rows: readonly StandardRow[]) => setStandards((before) => [...before, ...rows.map(knownFromRow)]),
    [],
  );
  const learnReferences = useCallback(
    (found: readonly ReferenceChoice[]) => setReferences((before) => [...before, ...found]),
    [],
  );
  return useMemo(
    () => ({
      standards: new Map([...standards, ...(draft?.standards ?? [])].map((one) => [one.id, one])),
      references: new Map([...references, ...(draft?.references ?? [])].map((one) => [one.valueUid, one])),
      learnStandards,
      learnReferences,
    }),
    [standards, references, draft, learnStandards, learnReferences],
  );
}
