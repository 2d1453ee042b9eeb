import { createContext, useContext } from 'react';
import type { ReferenceChoice } from '#shared/contracts/drafts.ts';
import type { WeightClass } from '#shared/contracts/common.ts';
import type { StandardRow } from '#shared/contracts/standards.ts';

/** A weight as the draft needs it; the form itself holds identifiers only. */
export interface KnownStandard {
  id: string;
  registryNo: string;
  marking: string;
  /** Grams. */
  nominal: string;
  class: WeightClass | null;
  /** Grams. */
  lastValue: { deviation: string; expandedU: string | null; performedEnd: string } | null;
}

/** The weights and references that the entries name: those the server told and those chosen since. */
export interface Known {
  standards: ReadonlyMap<string, KnownStandard>;
  references: ReadonlyMap<string, ReferenceChoice>;
  learnStandards: (rows: readonly StandardRow[]) => void;
  learnReferences: (references: readonly ReferenceChoice[]) => void;
}

/** Filled by the draft's editor. */
export const KnownContext = createContext<Known | null>(null);

/** What the entries of this draft name. */
export function useKnown(): Known {
  const known = useContext(KnownContext);
  if (!known) throw new Error('useKnown is for parts of the draft editor');
  return known;
}

/** A weight of the list, with its value as the last one where it is of the draft's usual kind. */
export function knownFromRow(row: StandardRow): KnownStandard {
  const { id, registryNo, marking, nominal, value } = row;
  const isLast = value?.quantity === 'conventional mass';
  return { id, registryNo, marking, nominal, class: row.class, lastValue: isLast ? value : null };
}
