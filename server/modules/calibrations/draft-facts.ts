import type { DraftLine } from '#shared/contracts/drafts.ts';
import type { WeightClass } from '#shared/contracts/common.ts';

/** What the register knows that the reading of a draft asks for. */
export interface DraftFacts {
  /** The laboratory whose draft it is. */
  laboratoryId: string;
  issuer: { id: string; name: string; isRecognized: boolean } | null;
  /** Weights named by the lines, by id, as far as the laboratory may see them. */
  standards: ReadonlyMap<string, DraftStandardFacts>;
  /** Values named as references, by uid. */
  references: ReadonlyMap<string, { registryNo: string; nominal: string }>;
}

export interface DraftStandardFacts {
  registryNo: string;
  nominal: string;
  class: WeightClass | null;
  /** Its last value of each kind, for the questions of sign and unit. */
  lastValues: Partial<Record<DraftLine['quantity'], { deviation: string; expandedU: string | null }>>;
}
