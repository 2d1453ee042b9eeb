import { describe, expect, it } from 'vitest';
import * as engine from './index.ts';
import { Decimal } from './index.ts';

/*
 * The public face as its callers know it: each function is called once with the fields its contract names, and gives the
 * fields its contract names. The types are held by the compiler, since nothing here is cast.
 */

const nominal = new Decimal(1000);
const air = { temperature: 20, pressure: 101_325, relativeHumidity: 0.5 };
const airU = { temperature: 0.1, pressure: 10, relativeHumidity: 0.02 };
const history = [
  { date: '2016-03-01', value: 212, standardUncertainty: 8 },
  { date: '2018-02-14', value: 221, standardUncertainty: 6 },
  { date: '2020-06-30', value: 230, standardUncertainty: 6 },
];
const network: engine.Network = {
  values: [{ id: 'a', local: 1, degreesOfFreedom: 9, estimate: 'balance' }, { id: 'b', local: 2 }, { id: 'c', local: null }], // prettier-ignore
  sources: [{ id: 's', standardUncertainty: 0.1, degreesOfFreedom: 5, estimate: 'volume' }],
  groups: [{ members: ['b'], covariance: [[4]], degreesOfFreedom: 3, estimate: 'design' }],
  links: [
    { child: 'b', parent: 'a', sensitivity: 0.5 },
    { child: 'b', parent: 's', sensitivity: -1 },
    { child: 'c', parent: 'b', sensitivity: 1, classLimit: { standardUncertainty: 1 } },
  ],
};
const results: engine.Results = { values: [1, 2, 4], uncertainties: [1, 1, 2], counts: [true, true, false] };
const design = [[1, -1, 0], [1, 0, -1], [0, 1, -1]]; // prettier-ignore
const restraint = { weights: [1, 0, 0], value: 0, standardUncertainty: 0.1 };
const circulation = {
  pilot: 'P',
  pilotRepeatability: 1,
  pilotSystematic: 2,
  observations: [
    { participant: 'P', standard: 'S', time: 0, value: 1 },
    { participant: 'A', standard: 'S', time: 5, value: 2, standardUncertainty: 1 },
    { participant: 'P', standard: 'S', time: 9, value: 1 },
  ],
};
const kibble = {
  weighing: { junctions: 20000, frequency: 24e9 },
  moving: { junctions: 20000, frequency: 24e9 },
  resistance: { plateau: 2, ratio: 0.0077 },
  velocity: 0.002,
  gravity: 9.81,
};
const sphere = {
  volume: 4.3e-4,
  latticeParameter: 5.431e-10,
  isotopes: [{ fraction: 1, relativeAtomicMass: 27.977 }],
  surfaceLayer: 8e-8,
  pointDefects: 4e-9,
  constants: { rydberg: 10973731.57, fineStructure: 7.297e-3, electronRelativeMass: 5.486e-4 },
};
const sphereU = { ...sphere, isotopes: [{ fraction: 0, relativeAtomicMass: 0 }], constants: undefined };

type Shape = 'number' | 'decimal' | string[];

/** Name, call, and what comes: a number, a decimal, or an object with at least these fields. */
const FACE: [string, () => unknown, Shape][] = [
  ['airDensityCipm2007', () => engine.airDensityCipm2007({ ...air, carbonDioxide: 0.0004 }), 'number'],
  ['airDensitySimplified', () => engine.airDensitySimplified(air), 'number'],
  ['airDensityUncertainty', () => engine.airDensityUncertainty(air, { ...airU, carbonDioxide: 0, formula: 2e-5 }), 'number'], // prettier-ignore
  ['conventionalMass', () => engine.conventionalMass({ mass: nominal, density: 7950 }), 'decimal'],
  ['massFromConventional', () => engine.massFromConventional({ conventionalMass: nominal, density: 7950 }), 'decimal'], // prettier-ignore
  ['buoyancyCorrection', () => engine.buoyancyCorrection({ kind: 'mass', referenceVolume: 125, testVolume: 126, airDensity: 1.2 }), ['correction', 'sensitivities']], // prettier-ignore
  ['massAndConventional', () => engine.massAndConventional({ value: nominal, kind: 'mass', standardUncertainty: 1, volume: 125, volumeUncertainty: 0.1, airDensity: 1.2 }), ['mass', 'conventional', 'covariance']], // prettier-ignore
  ['heightCorrection', () => engine.heightCorrection({ mass: nominal, heightDifference: 0.01, relativeGradient: -3e-7 }), ['correction', 'sensitivities']], // prettier-ignore
  ['volumeAtTemperature', () => engine.volumeAtTemperature({ volume: 125, temperature: 21, expansion: 4.8e-5 }), ['volume', 'sensitivities']], // prettier-ignore
  ['sorptionCorrection', () => engine.sorptionCorrection({ transfer: 'vacuum-to-air', surfaceArea: 100, coefficient: 0.1 }), ['correction', 'sensitivities']], // prettier-ignore

  ['maximumPermissibleError', () => engine.maximumPermissibleError('E1', nominal), 'decimal'],
  ['classConformity', () => engine.classConformity({ class: 'M1-2', nominal, deviation: new Decimal(0), expandedUncertainty: 1, decisionRule: 'simple' }), ['uncertaintyAllowed', 'conforms', 'mpe', 'rule']], // prettier-ignore
  ['globalRisks', () => engine.globalRisks({ mean: 0, standardDeviation: 1, standardUncertainty: 0.5, lower: -2, upper: 2, acceptanceLower: -1, acceptanceUpper: 1 }), ['producer', 'consumer']], // prettier-ignore
  ['conformanceProbability', () => engine.conformanceProbability({ value: 0, standardUncertainty: 1, lower: -1, upper: 1 }), 'number'], // prettier-ignore
  ['guardBandedAcceptance', () => engine.guardBandedAcceptance({ lower: -2, upper: 2, expandedUncertainty: 1, multiplier: 1 }), ['lower', 'upper']], // prettier-ignore

  ['standardUncertainty', () => engine.standardUncertainty({ halfWidth: 1, distribution: 'normal', coverageFactor: 2 }), 'number'], // prettier-ignore
  ['combine', () => engine.combine([{ name: 'a', standardUncertainty: 1, sensitivity: 1, degreesOfFreedom: 5, estimate: 'e' }], [[1]]), ['standardUncertainty', 'degreesOfFreedom']], // prettier-ignore
  ['effectiveDegreesOfFreedom', () => engine.effectiveDegreesOfFreedom([{ contribution: 1, degreesOfFreedom: 5, estimate: 'e' }]), 'number'], // prettier-ignore
  ['monteCarlo', () => engine.monteCarlo(([x = 0]) => x, [{ distribution: 'normal', mean: 0, standardUncertainty: 1 }], { seed: 1, digits: 1, maximumTrials: 20_000 }), ['mean', 'standardUncertainty', 'interval', 'trials']], // prettier-ignore
  ['coverageFactor', () => engine.coverageFactor(0.95, 9), 'number'],
  ['roundResult', () => engine.roundResult({ value: nominal, expandedUncertainty: 0.12, rounding: 'up' }), ['value', 'expandedUncertainty']], // prettier-ignore

  ['substitutionSeries', () => engine.substitutionSeries({ readings: [0, 1, 1, 0, 0, 1, 1, 0], cycle: 'ABBA' }), ['difference', 'standardDeviation', 'degreesOfFreedom', 'drift', 'differences']], // prettier-ignore
  ['solveWeighingDesign', () => engine.solveWeighingDesign({ design, differences: [1, 2, 1], restraint, betweenStandardDeviation: 0 }), ['estimates', 'covariance', 'designCovariance', 'factors', 'residuals', 'residualStandardDeviation', 'degreesOfFreedom', 'sensitivityToObservations', 'sensitivityToRestraints']], // prettier-ignore
  ['solveWeighingDesign, restraints', () => engine.solveWeighingDesign({ design, differences: [1, 2, 1], restraints: [restraint], restraintCovariance: [[1]], observationCovariance: [[1, 0, 0], [0, 1, 0], [0, 0, 1]] }), ['estimates']], // prettier-ignore
  ['weighingDesigns', () => engine.weighingDesigns['1-1-1'], ['nominals', 'design', 'restraint', 'check', 'source']], // prettier-ignore

  ['kibbleMass', () => engine.kibbleMass(kibble, { velocity: 0, gravity: 0 }), ['mass', 'standardUncertainty', 'budget']], // prettier-ignore
  ['crystalDensityMass', () => engine.crystalDensityMass(sphere, sphereU), ['mass', 'standardUncertainty', 'budget']], // prettier-ignore

  ['predictValue', () => engine.predictValue(history, '2024-01-01', { covariance: [[64, 1, 1], [1, 36, 1], [1, 1, 36]] }), ['value', 'standardUncertainty', 'slope', 'slopeUncertainty', 'degreesOfFreedom']], // prettier-ignore
  ['recalibrationInterval', () => engine.recalibrationInterval({ method: 'control-chart', history, limit: 300 }), ['months', 'method', 'reason']], // prettier-ignore

  ['propagate', () => engine.propagate(network, 'b'), ['standardUncertainty', 'missing', 'degreesOfFreedom', 'sensitivities', 'contributions', 'covarianceWithFocus', 'flows', 'localFlows']], // prettier-ignore
  ['networkFromArrays', () => engine.networkFromArrays({ local: Float64Array.of(1, 1), child: Int32Array.of(1), parent: Int32Array.of(0), sensitivity: Float64Array.of(1) }), ['valueCount']], // prettier-ignore
  ['compileNetwork', () => engine.compileNetwork(network), ['valueCount']],
  ['variances', () => engine.variances(network), ['0', '1', '2']],
  ['variances, compiled', () => engine.variances(engine.compileNetwork(network)), ['0', '1', '2']],
  ['covariance', () => engine.covariance(network, 'a', 'b'), 'number'],
  ['covarianceMatrix', () => engine.covarianceMatrix(network, ['a', 'b']), ['0', '1']],
  ['inferLocal', () => engine.inferLocal({ expandedUncertainty: '0.030', coverageFactor: 2, carriedVariance: 0 }), ['local', 'verdict']], // prettier-ignore
  ['shift', () => engine.shift(network, 'a', 1), ['b', 'c']],
  ['applyChanges', () => engine.applyChanges(network, [{ kind: 'shift', value: 'a', delta: 1 }, { kind: 'withdraw', value: 'c' }]), ['shifts', 'variances', 'notComputable']], // prettier-ignore

  ['referenceValue', () => engine.referenceValue(results, 'median', { draws: 1000, seed: 1 }), ['value', 'standardUncertainty', 'coefficients', 'chiSquared', 'degreesOfFreedom', 'pValue', 'birgeRatio', 'betweenVariance', 'interval']], // prettier-ignore
  ['degreesOfEquivalence', () => engine.degreesOfEquivalence(results, engine.referenceValue(results, 'weighted-mean'))[0], ['difference', 'expandedUncertainty', 'en']], // prettier-ignore
  ['pairwise', () => engine.pairwise(results)[0], ['i', 'j', 'difference', 'expandedUncertainty']],
  ['largestConsistentSubset', () => engine.largestConsistentSubset(results, 0.05), ['members', 'value', 'standardUncertainty', 'chiSquared', 'ties', 'exhaustive']], // prettier-ignore
  ['referToCommonDate', () => engine.referToCommonDate(circulation), ['values', 'covariance']],
  ['link', () => engine.link({ reference: results, regional: results, linking: [{ reference: 0, regional: 0, covariance: 0 }] }), ['offset', 'degreesOfEquivalence']], // prettier-ignore
  ['consensusValue', () => engine.consensusValue({ window: [0, 12.4, -18.8], previousPublished: 0, limit: 5, agreedUncertainty: 20 }), ['calculated', 'published', 'standardUncertainty']], // prettier-ignore
  ['enScore', () => engine.enScore({ value: 1, expandedUncertainty: 1, reference: 0, referenceExpandedUncertainty: 1 }), 'number'], // prettier-ignore
  ['zetaScore', () => engine.zetaScore({ value: 1, standardUncertainty: 1, reference: 0, referenceStandardUncertainty: 1 }), 'number'], // prettier-ignore
  ['zScore', () => engine.zScore({ value: 1, reference: 0, standardDeviation: 1 }), 'number'],
];

describe('the public face of the engine', () => {
  it.each(FACE)('%s', (_, call, shape) => {
    const found = call();
    if (shape === 'number') expect(found).toEqual(expect.any(Number));
    else if (shape === 'decimal') expect(Decimal.isDecimal(found)).toBe(true);
    else expect(Object.keys(found as object)).toEqual(expect.arrayContaining(shape));
    expect(JSON.stringify(found)).not.toMatch(/NaN/);
  });

  it.each(engine.WEIGHT_CLASSES)('knows class %s', (weightClass) => {
    expect(engine.maximumPermissibleError(weightClass, new Decimal(100))?.gt(0) ?? true).toBe(true);
  });

  it('exports the classes its callers catch and compute with', () => {
    expect(new engine.EngineError('out-of-range', 'mass', 0, 'A number above 0 is expected.')).toMatchObject({
      name: 'EngineError',
      code: 'out-of-range',
      field: 'mass',
      expected: 'A number above 0 is expected.',
      message: 'mass: received 0. A number above 0 is expected.',
    });
    expect(new Set(engine.ENGINE_ERROR_CODES).size).toBe(engine.ENGINE_ERROR_CODES.length);
    // @ts-expect-error an unknown code does not compile
    expect(new engine.EngineError('no-such-code', 'mass', 0, '')).toBeInstanceOf(Error);
    expect(new Decimal('0.1').plus('0.2').toFixed()).toBe('0.3');
  });
});
