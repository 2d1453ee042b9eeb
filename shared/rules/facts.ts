import type { z } from 'zod';
import type { DecisionRule, RootKind, UsedAs } from '#shared/contracts/calibration-input.ts';
import type {
  DatePrecision,
  MassUnit,
  Medium,
  QuantityKind,
  Stage,
  WeightClass,
} from '#shared/contracts/common.ts';
import type { BudgetFacts, SheetFacts, WeightFacts } from './weight-facts.ts';

/*
 * What the rules read: plain data, assembled once per question by the server. Masses are decimal text in grams,
 * days ISO 8601, instants UTC with microseconds; variances and covariances are numbers in g2. Every list holds only
 * what the register knew at the end of the knowledge day: rules do not filter by it again, except for ends.
 */

/** A laboratory as rules name it. */
export interface LaboratoryFacts {
  id: string;
  name: string;
  kind: 'national institute' | 'calibration laboratory' | 'external institute';
}

/** The days of the world an assertion covers, and when the register learnt of it. */
export interface Assertion {
  validFrom: string;
  /** Last day covered; null: open. */
  validTo: string | null;
  recordedAt: string;
}

/** A row of `recognition`: every row of the issuer, whatever its state or period. */
export interface RecognitionFacts extends Assertion {
  kind: 'institute arrangement' | 'accreditation';
  body: string;
  number: string;
  arrangement: string;
  state: 'granted' | 'suspended' | 'withdrawn';
}

/** A row of `scope_line`: every row of the issuer for this quantity, whatever its state, range or period. */
export interface ScopeLineFacts extends Assertion {
  line: number;
  /** g; both ends belong to the range. */
  nominalFrom: string;
  nominalTo: string;
  method: string;
  /** Best capability U = constant (g) + relative x nominal (g), at k. */
  bestUConstant: string;
  bestURelative: number;
  k: string;
  state: 'granted' | 'suspended' | 'withdrawn';
}

/** A row of `programme`: the laboratory's own rule for one of its references. */
export interface ProgrammeFacts extends Assertion {
  intervalMonths: number;
  method: string;
  justification: string;
}

/** Density of a standard in force on the last day of the weighing. */
export interface DensityFacts {
  /** kg/m3. */
  value: string;
  /** kg/m3; null: not stated. */
  expandedU: string | null;
  k: string | null;
  origin: 'measured' | 'assumed' | 'manufacturer';
}

/** The end of a value, and what took its place (with that value's own ends in turn). */
export interface EndFacts {
  kind: 'superseded' | 'withdrawn';
  effectiveOn: string;
  madeKnownOn: string;
  recordedAt: string;
  /** Whether value, u, kind or scale changed, or words only. */
  changed: 'text' | 'value';
  replacedBy: { uid: string; certificateNo: string; revisionN: number; ends: EndFacts[] } | null;
}

/** Days of one calibration; the precision holds for all of them. */
export interface DatesFacts {
  performedBegin: string;
  performedEnd: string;
  issuedOn: string;
  datePrecision: z.infer<typeof DatePrecision>;
}

/** A result as printed. */
export interface ResultFacts {
  uid: string;
  certificateNo: string;
  revisionN: number;
  /** g. */
  deviation: string;
  reportedUnit: MassUnit;
  /** Decimals of the value in the reported unit. */
  reportedDecimals: number;
  /** g; null: the certificate states none. */
  expandedU: string | null;
  /** Decimals of U in the reported unit, where they were kept. */
  reportedUDecimals: number | null;
  k: string | null;
}

/** Another value of a standard (same quantity, medium and epoch), with its covariance to the value judged. */
export interface HistoryFacts extends ResultFacts, DatesFacts {
  /** g2; null: not known. */
  covariance: number | null;
}

/** A weight of the same set and nominal that was on the same certificate: could the two have been swapped? */
export interface DuplicateFacts {
  registryNo: string;
  marking: string;
  /** Its result on the same certificate, same quantity. */
  result: ResultFacts;
  /** Its other values, chosen as in `ValueFacts.history`; `covariance` is to the value judged, null if not known. */
  history: HistoryFacts[];
}

/** One assigned value and what the value rules need. */
export interface ValueFacts extends ResultFacts, DatesFacts {
  calibrationId: string;
  standardId: string;
  registryNo: string;
  marking: string;
  issuer: LaboratoryFacts;
  /** Who holds the weight. */
  holder: LaboratoryFacts;
  /** Entered by the issuer itself, or by the holder who received the certificate. */
  registeredByIssuer: boolean;
  recordedAt: string;
  method: string;
  quantity: QuantityKind;
  medium: z.infer<typeof Medium>;
  stage: z.infer<typeof Stage> | null;
  /** g. */
  nominal: string;
  class: WeightClass | null;
  decisionRule: z.infer<typeof DecisionRule> | null;
  /** Coverage probability as text. */
  coverage: string | null;
  underAccreditation: boolean;
  unitConfirmed: boolean;
  rootKind: RootKind | null;
  scaleVersion: string | null;
  ends: EndFacts[];
  /** The epoch that followed the value's own, if any: an adjustment, repair, re-polishing or damage. */
  nextEpoch: { reason: string; beginsOn: string; lastGoodOn: string | null; recordedAt: string } | null;
  /** How many references its line names (without those that only inform). */
  references: number;
  /** Of the other lines of the same revision: how many name a reference; null: those lines are not known. */
  siblingLinesWithReferences: number | null;
  recognitions: RecognitionFacts[];
  scope: ScopeLineFacts[];
  density: DensityFacts | null;
  /** The other kind of quantity for the same weight on the same certificate. */
  otherKind: ResultFacts | null;
  /** What the references and declared sources bring, each with u as used, with covariance; null: not computable. */
  carriedVariance: number | null;
  /** The same with every covariance between the references left out; null: not computable. */
  carriedVarianceIndependent: number | null;
  /** Certificates that state no U and so make `carriedVariance` not computable. */
  carriedMissing: string[];
  /** Registry numbers of ancestors that two or more of its references share. */
  sharedAncestors: string[];
  /** Every other value of this standard in force (same quantity, medium, epoch, other calibration), oldest first. */
  history: HistoryFacts[];
  duplicates: DuplicateFacts[];
  weight: WeightFacts;
  sheet: SheetFacts;
  budget: BudgetFacts;
}

/** Another value of the parent's standard (same quantity and medium, other calibration): was there a newer one? */
export interface OtherValueFacts extends DatesFacts {
  uid: string;
  certificateNo: string;
  revisionN: number;
  /** Same epoch as the parent. */
  sameEpoch: boolean;
  ends: EndFacts[];
}

/** A notice in force when a value was used, that the value's certificate leaves out. Grams, at the value used. */
export interface NoticeFacts {
  number: string;
  title: string;
  effectiveOn: string;
  madeKnownOn: string;
  shift: number;
  /** Standard uncertainty. */
  u: number;
}

/** The notices that take one version of the mass scale to another, and what they bring to the value used, grams. */
export interface ScaleMapFacts {
  /** Numbers, one after the other; none where the scale is the same. */
  notices: string[];
  shift: number;
  /** Standard uncertainty. */
  u: number;
}

/** A value and one value it leaned on. */
export interface LinkFacts {
  child: ValueFacts;
  parent: ValueFacts;
  /** `informs`: named above a consensus value, without flow; no rule judges it. */
  role: 'reference' | 'informs';
  sensitivity: number;
  /** Days of use; their precision is the child's. */
  usedBegin: string;
  usedEnd: string;
  usedAs: z.infer<typeof UsedAs>;
  /** g, where they differ from the certificate's; null: as the certificate states. */
  usedDeviation: string | null;
  usedExpandedU: string | null;
  usedK: string | null;
  /** Rows of `programme` by the child's issuer for the parent's standard. */
  programmes: ProgrammeFacts[];
  otherValues: OtherValueFacts[];
  /** Notices in force at use and not counted above: what the child had to include. */
  notices: NoticeFacts[];
  /** From the parent's scale version to the child's, or back; null: none on record, or a scale is not stated. */
  scaleMap: ScaleMapFacts | null;
}

/** The day asked about, the knowledge day, and the network's policy. */
export interface Question {
  day: string;
  known: string;
  /** Whether an upstream programme that ends after the use breaks a chain, or is only said (default). */
  programmeEndedAfterUse: 'said' | 'breaks';
}

/** Part of the focus's variance by where it arises. */
export interface ContributionFacts {
  label: string;
  /** A fraction, signed. */
  share: number;
  /** Arises in a root itself or in the scale version it rests on. */
  isTop: boolean;
}

/** A whole chain. */
export interface ChainFacts {
  question: Question;
  focusUid: string;
  /** The focus and every ancestor. */
  values: ValueFacts[];
  links: LinkFacts[];
  /** Shares of the focus's variance by origin; null: not computable. */
  contributions: ContributionFacts[] | null;
  /** Variance of the focus as computed now over the whole chain; null: not computable. */
  varianceNow: number | null;
  /** Uids of a circle, in its order; null: none. */
  circle: string[] | null;
  /** References that a certificate names and the register does not hold. */
  missingReferences: { childUid: string; named: string }[];
}
