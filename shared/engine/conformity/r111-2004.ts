/** Accuracy classes of weights, finest first (OIML R 111-1:2004, 2.2). */
export const WEIGHT_CLASSES = ['E1', 'E2', 'F1', 'F2', 'M1', 'M1-2', 'M2', 'M2-3', 'M3'] as const;

/** An accuracy class of weights. */
export type WeightClass = (typeof WEIGHT_CLASSES)[number];

/**
 * Where a table of limits comes from and how it was seen: `reproduction`, read in a full copy of the table;
 * `memory`, not seen in print, so not to be presented as an official figure without saying so.
 */
export interface LimitsSource {
  /** Version of the table here. */
  version: string;
  /** Document and edition. */
  edition: string;
  /** Clause and table. */
  clause: string;
  /** How it was seen. */
  evidence: 'reproduction' | 'memory';
}

const EDITION = 'OIML R 111-1:2004 (E)';

/** Source of the maximum permissible errors. */
export const MPE_SOURCE: LimitsSource = {
  version: '2004-1',
  edition: EDITION,
  clause: '5.1, Table 1',
  evidence: 'reproduction',
};

/**
 * Maximum permissible errors in mg by nominal value in g. A class that is missing from a row is not defined there:
 * neither zero nor unlimited.
 */
export const MPE_TABLE: Readonly<Record<string, Readonly<Partial<Record<WeightClass, string>>>>> = {
  '5000000': {
    F1: '25000',
    F2: '80000',
    M1: '250000',
    'M1-2': '500000',
    M2: '800000',
    'M2-3': '1600000',
    M3: '2500000',
  },
  '2000000': {
    F1: '10000',
    F2: '30000',
    M1: '100000',
    'M1-2': '200000',
    M2: '300000',
    'M2-3': '600000',
    M3: '1000000',
  },
  '1000000': {
    E2: '1600',
    F1: '5000',
    F2: '16000',
    M1: '50000',
    'M1-2': '100000',
    M2: '160000',
    'M2-3': '300000',
    M3: '500000',
  },
  '500000': {
    E2: '800',
    F1: '2500',
    F2: '8000',
    M1: '25000',
    'M1-2': '50000',
    M2: '80000',
    'M2-3': '160000',
    M3: '250000',
  },
  '200000': {
    E2: '300',
    F1: '1000',
    F2: '3000',
    M1: '10000',
    'M1-2': '20000',
    M2: '30000',
    'M2-3': '60000',
    M3: '100000',
  },
  '100000': {
    E2: '160',
    F1: '500',
    F2: '1600',
    M1: '5000',
    'M1-2': '10000',
    M2: '16000',
    'M2-3': '30000',
    M3: '50000',
  },
  '50000': {
    E1: '25',
    E2: '80',
    F1: '250',
    F2: '800',
    M1: '2500',
    'M1-2': '5000',
    M2: '8000',
    'M2-3': '16000',
    M3: '25000',
  },
  '20000': { E1: '10', E2: '30', F1: '100', F2: '300', M1: '1000', M2: '3000', M3: '10000' },
  '10000': { E1: '5.0', E2: '16', F1: '50', F2: '160', M1: '500', M2: '1600', M3: '5000' },
  '5000': { E1: '2.5', E2: '8.0', F1: '25', F2: '80', M1: '250', M2: '800', M3: '2500' },
  '2000': { E1: '1.0', E2: '3.0', F1: '10', F2: '30', M1: '100', M2: '300', M3: '1000' },
  '1000': { E1: '0.5', E2: '1.6', F1: '5.0', F2: '16', M1: '50', M2: '160', M3: '500' },
  '500': { E1: '0.25', E2: '0.8', F1: '2.5', F2: '8.0', M1: '25', M2: '80', M3: '250' },
  '200': { E1: '0.10', E2: '0.3', F1: '1.0', F2: '3.0', M1: '10', M2: '30', M3: '100' },
  '100': { E1: '0.05', E2: '0.16', F1: '0.5', F2: '1.6', M1: '5.0', M2: '16', M3: '50' },
  '50': { E1: '0.03', E2: '0.10', F1: '0.3', F2: '1.0', M1: '3.0', M2: '10', M3: '30' },
  '20': { E1: '0.025', E2: '0.08', F1: '0.25', F2: '0.8', M1: '2.5', M2: '8.0', M3: '25' },
  '10': { E1: '0.020', E2: '0.06', F1: '0.20', F2: '0.6', M1: '2.0', M2: '6.0', M3: '20' },
  '5': { E1: '0.016', E2: '0.05', F1: '0.16', F2: '0.5', M1: '1.6', M2: '5.0', M3: '16' },
  '2': { E1: '0.012', E2: '0.04', F1: '0.12', F2: '0.4', M1: '1.2', M2: '4.0', M3: '12' },
  '1': { E1: '0.010', E2: '0.03', F1: '0.10', F2: '0.3', M1: '1.0', M2: '3.0', M3: '10' },
  '0.5': { E1: '0.008', E2: '0.025', F1: '0.08', F2: '0.25', M1: '0.8', M2: '2.5' },
  '0.2': { E1: '0.006', E2: '0.020', F1: '0.06', F2: '0.20', M1: '0.6', M2: '2.0' },
  '0.1': { E1: '0.005', E2: '0.016', F1: '0.05', F2: '0.16', M1: '0.5', M2: '1.6' },
  '0.05': { E1: '0.004', E2: '0.012', F1: '0.04', F2: '0.12', M1: '0.4' },
  '0.02': { E1: '0.003', E2: '0.010', F1: '0.03', F2: '0.10', M1: '0.3' },
  '0.01': { E1: '0.003', E2: '0.008', F1: '0.025', F2: '0.08', M1: '0.25' },
  '0.005': { E1: '0.003', E2: '0.006', F1: '0.020', F2: '0.06', M1: '0.20' },
  '0.002': { E1: '0.003', E2: '0.006', F1: '0.020', F2: '0.06', M1: '0.20' },
  '0.001': { E1: '0.003', E2: '0.006', F1: '0.020', F2: '0.06', M1: '0.20' },
};

/** Source of the density limits. */
export const DENSITY_SOURCE: LimitsSource = {
  version: '2004-1',
  edition: EDITION,
  clause: '10, Table 5',
  evidence: 'memory',
};

/** A density interval in kg/m3; null means no upper limit. */
export type DensityInterval = readonly [lower: number, upper: number | null];

/**
 * Density limits in kg/m3 by nominal value in g; the row of 100 g holds from 100 g up. A class missing from a row
 * has no limit there. The entry of M2-3 is left out: what is remembered of it does not follow from the rule of
 * clause 10.1.
 */
export const DENSITY_TABLE: Readonly<
  Record<string, Readonly<Partial<Record<WeightClass, DensityInterval>>>>
> = {
  '100': {
    E1: [7934, 8067],
    E2: [7810, 8210],
    F1: [7390, 8730],
    F2: [6400, 10700],
    M1: [4400, null],
    'M1-2': [3000, null],
    M2: [2300, null],
  },
  '50': { E1: [7920, 8080], E2: [7740, 8280], F1: [7270, 8890], F2: [6000, 12000], M1: [4000, null] },
  '20': { E1: [7840, 8170], E2: [7500, 8570], F1: [6600, 10100], F2: [4800, 24000], M1: [2600, null] },
  '10': { E1: [7740, 8280], E2: [7270, 8890], F1: [6000, 12000], F2: [4000, null], M1: [2000, null] },
  '5': { E1: [7620, 8420], E2: [6900, 9600], F1: [5300, 16000], F2: [3000, null] },
  '2': { E1: [7270, 8890], E2: [6000, 12000], F1: [4000, null], F2: [2000, null] },
  '1': { E1: [6900, 9600], E2: [5300, 16000], F1: [3000, null] },
  '0.5': { E1: [6300, 10900], E2: [4400, null], F1: [2200, null] },
  '0.2': { E1: [5300, 16000], E2: [3000, null] },
  '0.1': { E1: [4400, null] },
  '0.05': { E1: [3400, null] },
  '0.02': { E1: [2300, null] },
};

/** Source of the polarization limits. */
export const POLARIZATION_SOURCE: LimitsSource = {
  version: '2004-1',
  edition: EDITION,
  clause: '9.1, Table 3',
  evidence: 'reproduction',
};

/** Largest magnetic polarization, mu0 times M, in microtesla. */
export const POLARIZATION_TABLE: Readonly<Record<WeightClass, number>> = {
  E1: 2.5,
  E2: 8,
  F1: 25,
  F2: 80,
  M1: 250,
  'M1-2': 500,
  M2: 800,
  'M2-3': 1600,
  M3: 2500,
};

/** Source of the susceptibility limits. */
export const SUSCEPTIBILITY_SOURCE: LimitsSource = {
  version: '2004-1',
  edition: EDITION,
  clause: '9.1, Table 4',
  evidence: 'reproduction',
};

/** Largest magnetic susceptibility by range of nominal values, the range's largest nominal in g; no limit where missing. */
export const SUSCEPTIBILITY_TABLE: readonly {
  /** Nominal values up to and including this one, in g. */
  upTo: number;
  /** Limits by class. */
  limits: Readonly<Partial<Record<WeightClass, number>>>;
}[] = [
  { upTo: 1, limits: { E1: 0.25, E2: 0.9, F1: 10 } },
  { upTo: 10, limits: { E1: 0.06, E2: 0.18, F1: 0.7, F2: 4 } },
  { upTo: Infinity, limits: { E1: 0.02, E2: 0.07, F1: 0.2, F2: 0.8 } },
];
