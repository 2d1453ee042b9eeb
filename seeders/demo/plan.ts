import type { CalibrationLine } from '#shared/contracts/calibration-input.ts';
import type { z } from 'zod';
import type { CatalogueEntry } from './catalogue.ts';
import type { Weight } from './weight.ts';

type LineInput = z.input<typeof CalibrationLine>;
type Reference = NonNullable<LineInput['references']>[number];

/** A line as the services take it, with weights, values and sources named by the plan's own keys. */
export type PlannedLine = Omit<LineInput, 'standardId' | 'scaleVersionId' | 'references' | 'sources'> & {
  registryNo: string;
  scale: string | null;
  references: (Omit<Reference, 'valueUid'> & { value: string })[];
  /** `V:<registry number>` for a volume, `S:<scale>` for a scale version. */
  sources: { source: string; sensitivity: number }[];
};

/** A certificate as the services take it. */
export interface PlannedCertificate {
  issuer: string;
  registeredBy: string;
  /** Who at the issuer: rightly its signatory. */
  signedBy: 'signatory' | 'metrologist';
  certificateNo: string;
  performedBegin: string;
  performedEnd: string;
  issuedOn: string;
  method: string;
  decisionRule: 'guarded' | 'simple' | null;
  lines: PlannedLine[];
  /** Covariance of the local parts, g2. */
  group: { covariance: number[][]; degreesOfFreedom: number | null; estimate: string | null } | null;
}

/** A property of a weight beside its density, with its U where it is known. */
export interface StatedProperty {
  kind: 'susceptibility' | 'polarisation';
  /** 1, or uT. */
  value: string;
  expandedU: string;
  k: '2';
  origin: 'measured';
}

/** One thing that somebody in the network did on a day. */
export type Step = { day: string } & (
  | { does: 'register set'; registryNo: string; name: string; weights: Weight[] }
  | { does: 'register weight'; weight: Weight }
  | { does: 'open epoch'; registryNo: string; reason: 'adjusted' | 'damaged'; note: string }
  | { does: 'state property'; registryNo: string; property: StatedProperty }
  | { does: 'issue'; certificate: PlannedCertificate; keys: string[] }
  | { does: 'revise'; certificate: PlannedCertificate; reason: string; effectiveOn: string; keys: string[] }
  | { does: 'withdraw'; laboratory: string; certificateNo: string; reason: string; effectiveOn: string }
  | { does: 'suspend scope'; laboratory: string; from: string; to: string }
);

/** Everything that will be in the register, in the order it was done, and what is wrong with it on purpose. */
export interface DemoPlan {
  /** By day; within a day in the order of the list. */
  steps: Step[];
  catalogue: CatalogueEntry[];
}
