import type { z } from 'zod';
import type { Stage, WeightClass } from '#shared/contracts/common.ts';
import type { Shape } from '#shared/contracts/standards.ts';
import type { RootKind, UsedAs } from '#shared/contracts/calibration-input.ts';
import type { Assertion } from './facts.ts';

/*
 * What the rules read beside results and their links: the weight itself, how its certificate was issued, and what a
 * result's uncertainty is made of.
 */

/** A property of a weight as asserted for a day. */
export interface PropertyFacts {
  /** kg/m3 for a density, cm3 for a volume, 1 for a susceptibility, uT for a polarisation. */
  value: string;
  /** In the same unit; null: not stated. */
  expandedU: string | null;
  k: string | null;
  origin: 'measured' | 'assumed' | 'manufacturer';
}

/** What the register holds of a weight, as of the last day of the weighing. */
export interface WeightFacts {
  kind: 'weight' | 'prototype' | 'silicon sphere' | 'realization' | 'consensus value';
  serial: string | null;
  shape: Shape;
  /** Class claimed for the weight itself, whatever its certificates state. */
  classClaimed: WeightClass | null;
  isInSet: boolean;
  /** The other weights of its sets with the same nominal value. */
  alike: { registryNo: string; marking: string; serial: string | null }[];
  volume: PropertyFacts | null;
  susceptibility: PropertyFacts | null;
  polarisation: PropertyFacts | null;
  /** Where no density and no volume covers that day: the first later day for which one is on record. */
  densityOnlyFrom: string | null;
  /** Drift declared for it as a source of its own: standard uncertainty of the rate, g per year. */
  driftRates: { u: number; determinedOn: string | null }[];
}

/** An authorisation to sign calibrations. */
export interface AuthorisationFacts extends Assertion {
  state: 'granted' | 'ended';
}

/** How the certificate of a value came to be. */
export interface SheetFacts {
  /** False for a line of a draft: who signs it, and when, is not decided. */
  isIssued: boolean;
  /** The issuer's authorisations of whoever signed; null: the signatory is not on record. */
  signatory: AuthorisationFacts[] | null;
  /** Whether the register holds any authorisation to sign for the issuer. */
  hasAuthorisations: boolean;
  /** Of a further revision: what it says it changes and why. */
  amendmentReason: string | null;
  /** Stages of all its results for this weight and kind, its own among them. */
  stages: (z.infer<typeof Stage> | null)[];
  /** The epoch the value belongs to. */
  epoch: { n: number; reason: string; beginsOn: string };
}

/** A shared effect that a result leans on. */
export interface EffectFacts {
  kind: 'volume' | 'air' | 'drift' | 'apparatus' | 'scale version';
  /** The weight it belongs to; null: none. */
  standardId: string | null;
  /** For reading: that weight's registry number, else the effect's name. */
  of: string;
  /** g per unit of the effect. */
  sensitivity: number;
  /** Standard uncertainty in the effect's unit. */
  u: number;
  determinedOn: string | null;
  /** For a volume: what is on record of its weight's density and volume, and which row this effect comes from. */
  onRecord: (Assertion & { kind: 'density' | 'volume'; isThis: boolean })[];
}

/** A reference as a result leans on it. */
export interface LeaningFacts {
  registryNo: string;
  standardId: string;
  kind: WeightFacts['kind'];
  rootKind: RootKind | null;
  usedAs: z.infer<typeof UsedAs>;
}

/** What the uncertainty of a result is made of. */
export interface BudgetFacts {
  /** Names of the components, in their order; none where no budget is on record. */
  components: readonly string[];
  effects: EffectFacts[];
  references: LeaningFacts[];
  /** Effective degrees of freedom as the certificate states them. */
  nuEff: number | null;
  /** The laboratory's own part, g, and its degrees of freedom; null: not known. */
  ownU: number | null;
  ownDegreesOfFreedom: number | null;
}
