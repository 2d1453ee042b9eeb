import { createContext, useContext } from 'react';
import type { DraftResponse, OpenPoint } from '#shared/contracts/drafts.ts';

interface DraftInUse {
  /** What the server has; null before the first change is saved. */
  draft: DraftResponse | null;
  /** Whose draft it is or becomes. */
  laboratoryId: string;
  /** This person reads it and does not write it. */
  isLocked: boolean;
  /** The open points that still speak of what stands in the form. */
  points: readonly OpenPoint[];
  /** Opens the line of a field where needed and moves the focus to the field. */
  goTo: (path: string) => void;
}

/** Filled by the draft's editor. */
export const DraftContext = createContext<DraftInUse | null>(null);

/** The draft being edited. */
export function useDraft(): DraftInUse {
  const draft = useContext(DraftContext);
  if (!draft) throw new Error('useDraft is for parts of the draft editor');
  return draft;
}
