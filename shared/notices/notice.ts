/** A published act that maps one version of the mass scale to another, as rules and numbers read it. */
export interface Notice {
  id: string;
  number: string;
  title: string;
  /** The laboratory whose values it covers: the national institute that published it. */
  issuerId: string;
  /** Names of scale versions; `toScale` null: the scale stays. */
  fromScale: string;
  toScale: string | null;
  effectiveOn: string;
  madeKnownOn: string;
  /** When the register learnt of it: ISO instant, UTC. */
  recordedAt: string;
  /** Id of the notice that this one ends. */
  replacesId: string | null;
  terms: readonly NoticeTermFacts[];
}

/** Which values a notice covers, and what it brings to each kilogram of nominal. Null: any. Grams. */
export interface NoticeTermFacts {
  quantity: 'mass' | 'conventional mass' | null;
  performedFrom: string | null;
  performedTo: string | null;
  nominalFrom: string | null;
  nominalTo: string | null;
  /** Added standard uncertainty. */
  addedU: number;
  /** By day of calibration, in order: linear between the days, constant outside. */
  shifts: readonly { on: string; shift: string }[];
}
