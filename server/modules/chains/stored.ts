import type { GroupCovariance } from './group-covariance.ts';

/**
 * What the chain reads of the register, in the register's own terms. Days are ISO text, instants ISO UTC with
 * microseconds, decimals exact text in grams, uncertainties numbers in grams.
 */

/** A result as its certificate states it, wherever it is met. */
interface StoredResult {
  id: number;
  uid: string;
  calibrationId: string;
  revisionId: string;
  certificateNo: string;
  revisionN: number;
  quantity: 'mass' | 'conventional mass';
  medium: 'air' | 'vacuum' | 'inert gas';
  stage: 'as found' | 'as left' | null;
  epochN: number;
  deviation: string;
  reportedUnit: 'kg' | 'g' | 'mg' | 'ug';
  reportedDecimals: number;
  expandedU: string | null;
  reportedUDecimals: number | null;
  k: string | null;
  performedBegin: string;
  performedEnd: string;
  datePrecision: 'day' | 'month' | 'year';
  issuedOn: string;
  recordedAt: string;
  changed: 'new' | 'text' | 'value';
}

/** An assigned value with the certificate line it stands on. Never changes once recorded. */
export interface StoredValue extends StoredResult {
  line: number;
  issuerId: string;
  holderId: string;
  registeredById: string;
  standardId: string;
  registryNo: string;
  marking: string;
  standardKind: StandardDossier['kind'];
  setId: string | null;
  epochBeginsOn: string;
  nominal: string;
  coverage: string | null;
  nuEff: number | null;
  uStated: number | null;
  localU: number | null;
  localOrigin: 'components' | 'inferred' | 'agreed' | 'group' | 'unknown';
  localDegreesOfFreedom: number | null;
  localEstimate: string | null;
  rootKind:
    | 'realization run'
    | 'consensus value'
    | 'recognized certificate'
    | 'earlier definition'
    | 'accepted stop'
    | null;
  scaleVersion: string | null;
  class: string | null;
  underAccreditation: boolean;
  unitConfirmed: boolean;
  decisionRule: 'guarded' | 'simple' | null;
  method: string;
  /** Account of whoever signed; null: not on record. */
  signatoryId: string | null;
  /** What a further revision says it changes and why. */
  amendmentReason: string | null;
  /** Names of the budget's components, in their order. */
  components: readonly string[];
  parents: StoredLink[];
  sources: StoredSourceLink[];
  /** How many other lines of the same revision name a reference. */
  siblingLinesWithReferences: number;
  /** The group whose covariance replaces `localU`, where its calibration correlates its results. */
  groupId: number | null;
}

/** What a value leaned on, as used. */
export interface StoredLink {
  parentId: number;
  role: 'reference' | 'informs';
  sensitivity: number;
  usedBegin: string;
  usedEnd: string;
  usedAs: 'certificate' | 'by notice' | 'class limit' | 'fit' | 'bracketing';
  usedDeviation: string | null;
  usedExpandedU: string | null;
  usedK: string | null;
}

export interface StoredSourceLink {
  sourceId: number;
  sensitivity: number;
}

/** An effect shared by several values. */
export interface StoredSource {
  id: number;
  uid: string;
  kind: 'volume' | 'air' | 'drift' | 'apparatus' | 'scale version';
  name: string;
  u: number;
  unit: string;
  degreesOfFreedom: number | null;
  estimate: string | null;
  standardId: string | null;
  registryNo: string | null;
  laboratoryId: string | null;
  determinedOn: string | null;
  /** A notice: its uncertainty is for everybody to read. */
  isPublished?: true;
}

/** Correlated local parts of one calibration. */
export interface StoredGroup {
  id: number;
  degreesOfFreedom: number | null;
  estimate: string | null;
  covariance: GroupCovariance;
}

export interface StoredEnd {
  kind: 'superseded' | 'withdrawn';
  effectiveOn: string;
  madeKnownOn: string;
  recordedAt: string;
  changed: 'text' | 'value';
  reason: string;
  replacedById: number | null;
  replacedByCertificate: string | null;
}

/** One value in the life of a standard, as its history tells it. */
export interface StoredHistoryValue extends StoredResult {
  ends: StoredEnd[];
}

/** A dated assertion: the latest recorded one that covers a day wins. */
export interface Asserted {
  validFrom: string;
  validTo: string | null;
  recordedAt: string;
  actSeq: number;
}

export interface StoredEpoch {
  n: number;
  reason: string;
  beginsOn: string;
  lastGoodOn: string | null;
  recordedAt: string;
}

export interface StoredProgramme extends Asserted {
  laboratoryId: string;
  intervalMonths: number;
  method: string;
  justification: string;
}

export interface StoredProperty extends Asserted {
  kind: 'density' | 'volume' | 'susceptibility' | 'polarisation';
  value: string;
  expandedU: string | null;
  k: string | null;
  origin: 'measured' | 'assumed' | 'manufacturer';
  sourceId: number | null;
}

export interface StoredClass extends Asserted {
  value: string;
}

/** Standard uncertainty of a rate of drift, g per year. */
export interface StoredDriftRate {
  u: number;
  determinedOn: string | null;
  recordedAt: string;
}

/** Everything about one standard that later acts may add to. */
export interface StandardDossier {
  standardId: string;
  registryNo: string;
  marking: string;
  nominal: string;
  kind: 'weight' | 'prototype' | 'silicon sphere' | 'realization' | 'consensus value';
  serial: string | null;
  shape: 'knob' | 'cylinder' | 'sphere' | 'sheet' | 'wire' | 'block' | 'other';
  isInSet: boolean;
  /** Classes claimed for it. */
  classes: StoredClass[];
  /** Drift declared for it as a source of its own. */
  driftRates: StoredDriftRate[];
  history: StoredHistoryValue[];
  epochs: StoredEpoch[];
  programmes: StoredProgramme[];
  properties: StoredProperty[];
  /** Other members of the same sets at the same nominal: 2 and 2*. */
  duplicateIds: string[];
}

export interface StoredScopeLine extends Asserted {
  line: number;
  quantity: 'mass' | 'conventional mass';
  nominalFrom: string;
  nominalTo: string;
  method: string;
  bestUConstant: string;
  bestURelative: number;
  k: string;
  coverage: string;
  state: 'granted' | 'suspended' | 'withdrawn';
}

export interface StoredRecognition extends Asserted {
  kind: 'institute arrangement' | 'accreditation';
  body: string;
  number: string;
  arrangement: string;
  state: 'granted' | 'suspended' | 'withdrawn';
}

/** Who may sign calibrations for a laboratory. */
export interface StoredAuthorisation extends Asserted {
  accountId: string;
  state: 'granted' | 'ended';
}

/** Everything about one laboratory that later acts may add to. */
export interface LaboratoryDossier {
  id: string;
  code: string;
  name: string;
  kind: 'national institute' | 'calibration laboratory' | 'external institute';
  scope: StoredScopeLine[];
  recognitions: StoredRecognition[];
  authorisations: StoredAuthorisation[];
}
