import type { WeightClass } from '#shared/contracts/common.ts';

/** What the register knows that the rules of issuing ask for. Days are ISO text; masses grams. */
export interface IssueFacts {
  /** The context's day. */
  today: string;
  laboratories: ReadonlyMap<string, LaboratoryFacts>;
  /** By standard id. */
  standards: ReadonlyMap<string, StandardFacts>;
  /** By value uid. */
  references: ReadonlyMap<string, ReferenceFacts>;
  /** By source uid. */
  sources: ReadonlyMap<string, SourceFacts>;
  scaleVersionIds: ReadonlySet<string>;
  /** Laboratory of the document named; null where there is no such document. */
  documentLaboratoryId: string | null;
}

export interface LaboratoryFacts {
  id: string;
  name: string;
  kind: 'national institute' | 'calibration laboratory' | 'external institute';
}

export interface StandardFacts {
  id: string;
  registryNo: string;
  marking: string;
  nominal: string;
  /** On the last day of the calibration. */
  ownerId: string;
  custodianId: string;
  /** Where it was registered. */
  laboratoryId: string;
  class: WeightClass | null;
  epochs: readonly { id: string; n: number; beginsOn: string }[];
  /** The shared effect of its volume, where its density or volume is known with U. */
  volumeSource: SourceFacts | null;
  /** Its last conventional mass in force before this calibration, for the question of the unit. */
  lastConventional: { deviation: string; expandedU: string | null } | null;
}

export interface SourceFacts {
  id: number;
  uid: string;
  kind: string;
  u: number;
}

export interface ReferenceFacts {
  id: number;
  uid: string;
  calibrationId: string;
  certificateNo: string;
  standardId: string;
  registryNo: string;
  nominal: string;
  class: WeightClass | null;
  quantity: 'mass' | 'conventional mass';
  u: number | null;
  k: string | null;
  performedEnd: string;
  issuedOn: string;
  /** The shared effect of the reference's own volume. */
  volumeSource: SourceFacts | null;
}
