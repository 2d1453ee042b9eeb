import type { Coded, GoldenCall } from './coding.ts';

type Call = Omit<GoldenCall, 'result'>;

const call = (name: string, ...args: Coded[]): Call => ({ function: name, arguments: args });
const decimal = (text: string): Coded => ({ $decimal: text });
const made = (name: string, ...args: Coded[]): Coded => ({ $call: call(name, ...args) as unknown as Coded });
const INFINITE: Coded = { $number: 'Infinity' };

const air: Coded = { temperature: 21.3, pressure: 99_870, relativeHumidity: 0.43 };
const weights: Coded = { carbonDioxide: 1e-5, temperature: 0.05, pressure: 8, relativeHumidity: 0.01 };

/** Two references of one design, a volume they share, a working standard, and a weight through a class limit. */
const network: Coded = {
  values: [
    { id: 'reference 1', local: null },
    { id: 'reference 2', local: null },
    { id: 'standard', local: 0.3, degreesOfFreedom: 9, estimate: 'balance' },
    { id: 'weight', local: 0.8, degreesOfFreedom: 9, estimate: 'balance' },
    { id: 'by class', local: 2 },
  ],
  sources: [{ id: 'volume', standardUncertainty: 0.05, degreesOfFreedom: 20 }],
  groups: [
    { members: ['reference 1', 'reference 2'], covariance: [[0.09, 0.03], [0.03, 0.16]], degreesOfFreedom: 6 }, // prettier-ignore
  ],
  links: [
    { child: 'reference 1', parent: 'volume', sensitivity: 1.2 },
    { child: 'standard', parent: 'reference 1', sensitivity: 0.5 },
    { child: 'standard', parent: 'reference 2', sensitivity: 0.5 },
    { child: 'standard', parent: 'volume', sensitivity: -1.1 },
    { child: 'weight', parent: 'standard', sensitivity: 0.5 },
    { child: 'by class', parent: 'weight', sensitivity: 1, classLimit: { standardUncertainty: 1.7 } },
  ],
};
const arrays: Coded = {
  local: { $float64: [0.5, 0.2, 0.3] },
  child: { $int32: [1, 2, 2, 1] },
  parent: { $int32: [0, 0, 1, 3] },
  sensitivity: { $float64: [1, 0.4, 0.6, -2] },
  sourceUncertainty: { $float64: [0.1] },
};
const changes: Coded = [
  { kind: 'shift', value: 'reference 2', delta: -0.4 },
  { kind: 'raise', value: 'standard', addedStandardUncertainty: 0.2 },
  { kind: 'replace', value: 'reference 1', by: 'reference 2', delta: 0.7 },
  { kind: 'notice', id: 'scale', standardUncertainty: 0.02, terms: [{ value: 'reference 2', shift: -0.007, sensitivity: 1 }] }, // prettier-ignore
];

const history: Coded = [
  { date: '2016-03-01', value: 212, standardUncertainty: 8 },
  { date: '2018-02-14', value: 221, standardUncertainty: 6 },
  { date: '2020-06-30', value: 230, standardUncertainty: 6 },
  { date: '2023-01-10', value: 244, standardUncertainty: 5 },
];
const stepped: Coded = [0, 1, 2, 30, 31, 32].map((value, i) => ({
  date: `${2010 + i}-06-01`,
  value,
  standardUncertainty: 1,
}));

const results: Coded = {
  values: [0.012, -0.03, 0.051, 0.2, -0.008, 0.017],
  uncertainties: [0.02, 0.03, 0.025, 0.04, 0.02, 0.05],
};
const correlated: Coded = {
  values: [0.012, -0.03, 0.051],
  covariance: [[0.0004, 0.0003, 0], [0.0003, 0.0009, 0], [0, 0, 0.0006]], // prettier-ignore
  counts: [true, true, false],
};
const design: Coded = [[1, -1, 0], [1, 0, -1], [0, 1, -1]]; // prettier-ignore

const visit = (standard: string, time: number, value: number): Coded => {
  return { participant: 'P', standard, time, value };
};
const loop = (participant: string, standard: string, time: number, value: number): Coded => {
  return { participant, standard, time, value, standardUncertainty: 0.04 };
};
const circulation: Coded = {
  pilot: 'P',
  pilotRepeatability: 0.01,
  pilotSystematic: 0.03,
  transport: 0.005,
  observations: [
    visit('S', 0, 0.1), loop('A', 'S', 20, 0.14), loop('B', 'S', 55, 0.12), visit('S', 80, 0.16),
    loop('C', 'S', 100, 0.21), visit('S', 140, 0.19), visit('T', 0, -0.2), loop('D', 'T', 60, -0.17), visit('T', 90, -0.21),
  ], // prettier-ignore
};

const run: Coded = {
  weighing: { junctions: 20000, frequency: 24e9 },
  moving: { junctions: 20000, frequency: 24.1e9 },
  resistance: { plateau: 2, ratio: 0.0077 },
  velocity: 0.002,
  gravity: 9.81,
  corrections: {
    alignment: { relative: 3e-9, standardUncertainty: 8e-9 },
    airIndex: { refractiveIndex: 1.00027, standardUncertainty: 2e-9 },
    gravityGradient: { gradient: -3e-6, gradientUncertainty: 1e-7, height: 0.7, heightUncertainty: 0.002 },
  },
};
const sphere: Coded = {
  volume: 4.30891e-4,
  latticeParameter: 5.430996e-10,
  isotopes: [
    { fraction: 0.99998, relativeAtomicMass: 27.97692653465 },
    { fraction: 0.00002, relativeAtomicMass: 28.97649466491 },
  ],
  surfaceLayer: 80e-9,
  pointDefects: 4e-9,
  constants: {
    rydberg: 10973731.56816,
    fineStructure: 7.2973525693e-3,
    electronRelativeMass: 5.48579909065e-4,
  },
};
const sphereUncertainty: Coded = {
  volume: 4e-12,
  latticeParameter: 5e-19,
  isotopes: [{ fraction: 0, relativeAtomicMass: 5e-10 }, { fraction: 1e-8, relativeAtomicMass: 5e-10 }], // prettier-ignore
  surfaceLayer: 9e-9,
  pointDefects: 2e-9,
};

/** At least one call of every public function, and one of every branch that gives another kind of result. */
export const REPRESENTATIVE_CALLS: Call[] = [
  call('unitOfText', 'µg'),
  call('convertUnit', decimal('0.0000000123'), 'kg', 'ug'),
  call('convertDecimals', 4, 'mg', 'ug'),
  call('parseQuantity', '1 000.000 012 3(15) g', { field: 'value' }),
  call('parseQuantity', '-0,012 ± 0,003 mg', { field: 'deviation' }),
  call('formatQuantity', { value: decimal('100.02147'), unit: 'g', expandedUncertainty: 0.00079 }),
  call('roundResult', { value: decimal('999.99998765'), expandedUncertainty: 0.0000996, rounding: 'up' }),
  call('roundResult', { value: decimal('12.345'), expandedUncertainty: 0.125 }),

  call('airDensityCipm2007', air),
  call('airDensitySensitivities', air),
  call('airDensityUncertainty', air, weights),
  call('airDensitySimplified', air),
  call('relativeHumidityFromDewPoint', { dewPoint: 9.3, temperature: 20, pressure: 101_325 }),
  call('conventionalMass', { mass: decimal('1000.0000123'), density: 7950 }),
  call('massFromConventional', { conventionalMass: decimal('1000.0000123'), density: 7950 }),
  call('buoyancyCorrection', { kind: 'mass', referenceVolume: 125.3, testVolume: 124.9, airDensity: 1.1873 }),
  call('buoyancyCorrection', { kind: 'conventional', referenceVolume: 125.3, testVolume: 124.9, airDensity: 1.1873 }), // prettier-ignore
  call('massAndConventional', { value: decimal('20000.0123'), kind: 'conventional', standardUncertainty: 0.0016, volume: 2534.7, volumeUncertainty: 22, airDensity: 1.19 }), // prettier-ignore
  call('massAndConventional', { value: decimal('1000.0001'), kind: 'mass', standardUncertainty: 0.0001, volume: 127.2, volumeUncertainty: 0.02, airDensity: 1.19 }), // prettier-ignore
  call('heightCorrection', { mass: decimal('1000'), heightDifference: 0.012, relativeGradient: -3.1e-7 }),
  call('volumeAtTemperature', { volume: 127.4, temperature: 21.7, expansion: 4.8e-5 }),
  call('sorptionCorrection', { transfer: 'air-to-vacuum', surfaceArea: 154, coefficient: 0.12 }),

  call('maximumPermissibleError', 'E2', decimal('1000')),
  call('maximumPermissibleError', 'E1', decimal('100000')),
  call('classConformity', { class: 'E2', nominal: decimal('1000'), deviation: decimal('1.1'), expandedUncertainty: 0.5 }), // prettier-ignore
  call('classConformity', { class: 'F1', nominal: decimal('1'), deviation: decimal('-0.09'), expandedUncertainty: 0.03, decisionRule: 'simple' }), // prettier-ignore
  call('reachableClasses', decimal('1000'), 0.5),
  call('densityLimits', 'E1', decimal('2')),
  call('densityLimitsByRule', decimal('0.5'), decimal('1000')),
  call('polarizationLimit', 'F2'),
  call('susceptibilityLimit', 'E2', decimal('5')),
  call('conformanceProbability', { value: 1.2, standardUncertainty: 0.4, lower: -1.6, upper: 1.6 }),
  call('guardBandedAcceptance', { lower: -1.6, upper: 1.6, expandedUncertainty: 0.5, multiplier: 1 }),
  call('globalRisks', { mean: 0.1, standardDeviation: 0.6, standardUncertainty: 0.25, lower: -1.6, upper: 1.6, acceptanceLower: -1.3, acceptanceUpper: 1.3 }), // prettier-ignore

  call('standardUncertainty', { halfWidth: 0.5, distribution: 'u-shaped' }),
  call('standardUncertainty', { halfWidth: 0.5, distribution: 'normal', coverageFactor: 2 }),
  call('combine', [
    { name: 'reference', standardUncertainty: 0.15, sensitivity: 1, degreesOfFreedom: 12 },
    { name: 'weighing', standardUncertainty: 0.08, sensitivity: 1, degreesOfFreedom: 5, estimate: 'balance' },
    { name: 'drift', standardUncertainty: 0.02, sensitivity: -3, degreesOfFreedom: 5, estimate: 'balance' },
  ]),
  call(
    'combine',
    [{ name: 'a', standardUncertainty: 2, sensitivity: 1 }, { name: 'b', standardUncertainty: 3, sensitivity: -1 }],
    [[1, 0.4], [0.4, 1]],
  ), // prettier-ignore
  call('effectiveDegreesOfFreedom', [{ contribution: 0.3, degreesOfFreedom: 4 }, { contribution: 0.2, degreesOfFreedom: 11.5 }, { contribution: 0.4, degreesOfFreedom: INFINITE }]), // prettier-ignore
  call('truncateDegreesOfFreedom', 18.999),
  call('coverageFactor', 0.9545, 9),
  call('coverageFactor', 0.95, INFINITE),
  call('normalDistribution', -1.3),
  call('normalQuantile', 0.975),
  call('numericalTolerance', 0.0754, 2),
  { function: 'randomSource', arguments: [42], then: ['uniform', 'normal', 'normal', 'uniform'] },
  call(
    'monteCarlo',
    { $model: 'product' },
    [
      { distribution: 'normal', mean: 3, standardUncertainty: 0.1 },
      { distribution: 'student-t', mean: 2, scale: 0.05, degreesOfFreedom: 7 },
      { distribution: 'triangular', lower: 0.9, upper: 1.1 },
    ],
    { seed: 7, digits: 1, maximumTrials: 200_000, interval: 'shortest' },
  ),
  call(
    'monteCarlo',
    { $model: 'sum' },
    [{ distribution: 'rectangular', lower: -1, upper: 2 }, { distribution: 'u-shaped', lower: -1, upper: 1 }],
    { seed: 8, digits: 1, maximumTrials: 200_000 },
  ), // prettier-ignore
  call('isPositiveSemidefinite', [[1, 0.9, 0.9], [0.9, 1, -0.9], [0.9, -0.9, 1]]), // prettier-ignore

  call('substitutionSeries', { readings: [0.01, 1.02, 1.05, 0.06, 0.07, 1.11, 1.1, 0.09], cycle: 'ABBA' }),
  call('substitutionSeries', { readings: [0, 5, 7, 0.3, 0.4, 7.2, 5.5, 0.8], cycle: 'AB1..BnA', testCount: 2, alternating: true, sensitivity: 0.98 }), // prettier-ignore
  call('pooledStandardDeviation', [{ standardDeviation: 3, degreesOfFreedom: 1 }, { standardDeviation: 5, degreesOfFreedom: 3 }]), // prettier-ignore
  call('sensitivityFromWeight', { readingWithout: 1.2, readingWith: 11.3, mass: 10.002, massUncertainty: 0.003, density: 7960, airDensity: 1.19, readingUncertainty: 0.004 }), // prettier-ignore
  call('solveWeighingDesign', { design, differences: [1.2, -0.4, -1.7], restraint: { weights: [1, 0, 0], value: 0.3, standardUncertainty: 0.1 }, betweenStandardDeviation: 0.05 }), // prettier-ignore
  call('solveWeighingDesign', { design: [[1, -1, 0], [0, 1, -1], [1, 0, -1]], differences: [0.1, 0.2, 0.31], restraints: [{ weights: [1, 0, 0], value: 1 }, { weights: [0, 0, 1], value: 0.7 }], restraintCovariance: [[0.01, 0.004], [0.004, 0.02]], observationCovariance: [[0.02, 0.005, 0], [0.005, 0.02, 0], [0, 0, 0.03]] }), // prettier-ignore
  call('designFactors', design as Coded, [1, 0, 0], [0, 1, 1]),
  call('checkStandardTest', { value: 1.7, history: { mean: 1.2, standardDeviation: 0.3, count: 14 } }),
  call('precisionTest', { run: { standardDeviation: 0.9, degreesOfFreedom: 3 }, history: { standardDeviation: 0.5, degreesOfFreedom: 120 } }), // prettier-ignore
  call('outlierQuestions', { values: [1, 1.1, 0.9, 1.05, 3.2] }),
  call('grubbsCriticalValue', 6, 0.05),

  call('kibbleMass', run, { weighing: { frequency: 10 }, velocity: 4e-12, gravity: 5e-8 }),
  call('crystalDensityMass', sphere, sphereUncertainty),
  call('electronMass', { rydberg: 10973731.56816, fineStructure: 7.2973525693e-3 }),

  call('predictValue', history, '2026-07-01', { scatter: 'observed', nextStandardUncertainty: 5 }),
  call('fitLine', [0, 1, 3], [1, 2, 5], [[1, 0.2, 0], [0.2, 1, 0], [0, 0, 2]]), // prettier-ignore
  call('splitByEpochs', [{ date: '2020-01-01' }, { date: '2021-05-05' }, { date: '2022-01-01', condition: 'as-left' }], [{ lastGood: '2021-01-01', firstBad: '2022-01-01' }]), // prettier-ignore
  call('stepQuestion', stepped),
  call('stepQuestion', history),
  call('recalibrationInterval', { method: 'staircase', currentMonths: 24, deviation: 0.3, maximumPermissibleError: 0.5 }), // prettier-ignore
  call('recalibrationInterval', { method: 'control-chart', history, limit: 300 }),
  call('recalibrationInterval', {
    method: 'in-use-time',
    allowedUses: 500,
    countedUses: 120,
    countedMonths: 7,
  }),

  call('groupKey', 3),
  call('compileNetwork', network),
  call('networkFromArrays', arrays),
  call('propagate', network, 'weight'),
  call('propagate', network, 'by class'),
  call('variances', network),
  call('variances', made('networkFromArrays', arrays)),
  call('covariance', network, 'standard', 'reference 1'),
  call('covarianceMatrix', made('compileNetwork', network), ['reference 1', 'standard', 'weight']),
  call('inferLocal', { expandedUncertainty: '0.030', coverageFactor: 2, carriedVariance: 0.0001 }),
  call('inferLocal', { expandedUncertainty: '0.030', coverageFactor: 2, carriedVariance: 0.0003 }),
  call('shift', network, 'reference 1', 0.6),
  call('applyChanges', network, changes),
  call('applyChanges', network, [{ kind: 'withdraw', value: 'standard' }]),
  call('distanceToLimit', { deviation: decimal('0.4'), largest: decimal('1.1'), sensitivity: -0.5 }),

  ...['weighted-mean', 'arithmetic-mean', 'mandel-paule', 'dersimonian-laird', 'algorithm-a', 'q-hampel'].map(
    (estimator) => call('referenceValue', results, estimator),
  ),
  call('referenceValue', results, 'median', { draws: 2000, seed: 3 }),
  call('referenceValue', correlated, 'weighted-mean'),
  call('degreesOfEquivalence', results, made('referenceValue', results, 'weighted-mean')),
  call('degreesOfEquivalence', correlated, made('referenceValue', correlated, 'weighted-mean')),
  call('pairwise', correlated),
  call('consistency', results),
  call('chiSquaredAbout', results, 0.01),
  call('largestConsistentSubset', results),
  call('referToCommonDate', circulation),
  call('link', {
    reference: results,
    regional: { values: [0.5, 0.61, 0.44], uncertainties: [0.03, 0.05, 0.04] },
    linking: [{ reference: 0, regional: 0, covariance: 0.0001 }, { reference: 4, regional: 2, covariance: 0.0002 }], // prettier-ignore
  }),
  call('consensusValue', { window: [-18.8, -15.2, -10.7], previousPublished: -7, limit: 5, agreedUncertainty: 20, resolution: 1 }), // prettier-ignore
  call('enScore', { value: 100.0008, expandedUncertainty: 0.0006, reference: 100.0002, referenceExpandedUncertainty: 0.0004 }), // prettier-ignore
  call('zetaScore', {
    value: 5.1,
    standardUncertainty: 0.3,
    reference: 4.7,
    referenceStandardUncertainty: 0.1,
  }),
  call('zScore', { value: 5.1, reference: 4.7, standardDeviation: 0.15 }),
  call('zPrimeScore', {
    value: 5.1,
    reference: 4.7,
    standardDeviation: 0.15,
    referenceStandardUncertainty: 0.1,
  }),
  call('zScoreAllowed', { referenceStandardUncertainty: 0.1, standardDeviation: 0.15 }),
  call('scoreSignal', 2.6),
  call('chiSquaredUpperTail', 13.2, 9),
  call('chiSquaredUpperPoint', 0.05, 9),
];
