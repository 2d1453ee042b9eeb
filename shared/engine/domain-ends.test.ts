import { describe, expect, it } from 'vitest';
import * as engine from './index.ts';
import { Decimal } from './index.ts';

/*
 * Where each argument's domain ends: the ends named in the docstring hold, the next number beyond is refused with the
 * field. "Next" is a relative 1e-6, or 1e-9 beyond zero.
 */

const air = { temperature: 20, pressure: 100_000, relativeHumidity: 0.5 };
const airU = { temperature: 0.1, pressure: 10, relativeHumidity: 0.02 };
const both = { value: new Decimal(1000), kind: 'mass' as const, standardUncertainty: 1, volume: 125, volumeUncertainty: 0.1, airDensity: 1.2 }; // prettier-ignore
const buoyancy = { kind: 'mass' as const, referenceVolume: 125, testVolume: 126, airDensity: 1.2 };
const height = { mass: new Decimal(1000), heightDifference: 0.01, relativeGradient: -3e-7 };
const volume = { volume: 125, temperature: 21, expansion: 4.8e-5 };
const sorption = { transfer: 'vacuum-to-air' as const, surfaceArea: 100, coefficient: 0.1 };
const kibble = {
  weighing: { junctions: 20000, frequency: 24e9 },
  moving: { junctions: 20000, frequency: 24e9 },
  resistance: { plateau: 2, ratio: 0.0077 },
  velocity: 0.002,
  gravity: 9.81,
};
const exact = { velocity: 0, gravity: 0 };
const corrected = (corrections: engine.KibbleCorrections) =>
  engine.kibbleMass({ ...kibble, corrections }, exact);
const gradient = { gradient: -3e-6, gradientUncertainty: 0, height: 1, heightUncertainty: 0 };
const staircase = { method: 'staircase' as const, currentMonths: 24, deviation: 0.1, maximumPermissibleError: 1 }; // prettier-ignore
const uses = { method: 'in-use-time' as const, allowedUses: 500, countedUses: 100, countedMonths: 7 };
const history = [{ date: '2020-01-01', value: 1, standardUncertainty: 1 }, { date: '2022-01-01', value: 1, standardUncertainty: 1 }]; // prettier-ignore
const chart = { method: 'control-chart' as const, history, limit: 30 };
const weighing = { readingWithout: 1, readingWith: 11, mass: 10, massUncertainty: 0.003, density: 7960, airDensity: 1.19, readingUncertainty: 0.004 }; // prettier-ignore
const design = { design: [[1, -1], [1, -1]], differences: [1, 1.1], restraint: { weights: [1, 0], value: 0 } }; // prettier-ignore
const pooled = { standardDeviation: 1, degreesOfFreedom: 30 };
const risks = { mean: 0, standardDeviation: 1, standardUncertainty: 0.5, lower: -2, upper: 2, acceptanceLower: -1, acceptanceUpper: 1 }; // prettier-ignore
const guard = { lower: -20, upper: 20, expandedUncertainty: 1, multiplier: 1 };
const conformity = { class: 'E2' as const, nominal: new Decimal(1000), deviation: new Decimal(0), expandedUncertainty: 0.5 }; // prettier-ignore
const consensus = { window: [1], previousPublished: 0, limit: 5, agreedUncertainty: 20 };
const circulation: engine.Circulation = {
  pilot: 'P',
  pilotRepeatability: 1,
  pilotSystematic: 2,
  observations: [
    { participant: 'P', standard: 'S', time: 0, value: 1 },
    { participant: 'A', standard: 'S', time: 5, value: 2, standardUncertainty: 1 },
    { participant: 'P', standard: 'S', time: 9, value: 1 },
  ],
};
const normal = { distribution: 'normal' as const, mean: 0, standardUncertainty: 1 };
const simulated = (options: object) => engine.monteCarlo(([x = 0]) => x, [normal], { seed: 1, digits: 1, maximumTrials: 20_000, ...options }); // prettier-ignore

type Ends = { min?: number; max?: number; above?: number; below?: number };

const DOMAINS: [name: string, call: (x: number) => unknown, field: string, ends: Ends][] = [
  ['CIPM-2007', (temperature) => engine.airDensityCipm2007({ ...air, temperature }), 'temperature', { min: 15, max: 27 }], // prettier-ignore
  ['CIPM-2007', (pressure) => engine.airDensityCipm2007({ ...air, pressure }), 'pressure', { min: 60_000, max: 110_000 }], // prettier-ignore
  ['CIPM-2007', (x) => engine.airDensityCipm2007({ ...air, relativeHumidity: x }), 'relativeHumidity', { min: 0, max: 1 }], // prettier-ignore
  ['CIPM-2007', (x) => engine.airDensityCipm2007({ ...air, carbonDioxide: x }), 'carbonDioxide', { min: 0, max: 0.01 }], // prettier-ignore
  ['air density uncertainty', (x) => engine.airDensityUncertainty(air, { ...airU, pressure: x }), 'u.pressure', { min: 0 }], // prettier-ignore
  ['simplified', (temperature) => engine.airDensitySimplified({ ...air, temperature }), 'temperature', { min: 10, max: 30 }], // prettier-ignore
  ['simplified', (pressure) => engine.airDensitySimplified({ ...air, pressure }), 'pressure', { min: 90_000, max: 110_000 }], // prettier-ignore
  ['simplified', (x) => engine.airDensitySimplified({ ...air, relativeHumidity: x }), 'relativeHumidity', { min: 0, max: 0.8 }], // prettier-ignore
  ['dew point', (dewPoint) => engine.relativeHumidityFromDewPoint({ dewPoint, temperature: 20, pressure: 1e5 }), 'dewPoint', { min: -40, max: 20 }], // prettier-ignore
  ['dew point', (x) => engine.relativeHumidityFromDewPoint({ dewPoint: 5, temperature: x, pressure: 1e5 }), 'temperature', { min: 15, max: 27 }], // prettier-ignore
  ['dew point', (pressure) => engine.relativeHumidityFromDewPoint({ dewPoint: 5, temperature: 20, pressure }), 'pressure', { min: 60_000, max: 110_000 }], // prettier-ignore
  ['conventional mass', (density) => engine.conventionalMass({ mass: new Decimal(1), density }), 'density', { min: 100, max: 30_000 }], // prettier-ignore
  ['buoyancy', (airDensity) => engine.buoyancyCorrection({ ...buoyancy, airDensity }), 'airDensity', { min: 0, max: 2 }], // prettier-ignore
  ['buoyancy', (testVolume) => engine.buoyancyCorrection({ ...buoyancy, testVolume }), 'testVolume', { above: 0, max: 1e9 }], // prettier-ignore
  ['mass and conventional', (x) => engine.massAndConventional({ ...both, volumeUncertainty: x }), 'volumeUncertainty', { min: 0 }], // prettier-ignore
  ['height', (x) => engine.heightCorrection({ ...height, heightDifference: x }), 'heightDifference', { min: -2, max: 2 }], // prettier-ignore
  ['height', (x) => engine.heightCorrection({ ...height, relativeGradient: x }), 'relativeGradient', { min: -1e-6, max: 1e-6 }], // prettier-ignore
  ['volume', (temperature) => engine.volumeAtTemperature({ ...volume, temperature }), 'temperature', { min: 0, max: 50 }], // prettier-ignore
  ['volume', (expansion) => engine.volumeAtTemperature({ ...volume, expansion }), 'expansion', { min: -1e-3, max: 1e-3 }], // prettier-ignore
  ['sorption', (surfaceArea) => engine.sorptionCorrection({ ...sorption, surfaceArea }), 'surfaceArea', { above: 0, max: 1e6 }], // prettier-ignore
  ['sorption', (coefficient) => engine.sorptionCorrection({ ...sorption, coefficient }), 'coefficient', { min: -10, max: 10 }], // prettier-ignore

  ['conformity', (x) => engine.classConformity({ ...conformity, expandedUncertainty: x }), 'expandedUncertainty', { min: 0 }], // prettier-ignore
  ['conformity', (x) => engine.classConformity({ ...conformity, uncertaintyDecimals: x }), 'uncertaintyDecimals', { min: 0, max: 40 }], // prettier-ignore
  ['guard bands', (multiplier) => engine.guardBandedAcceptance({ ...guard, multiplier }), 'multiplier', { min: -10, max: 10 }], // prettier-ignore
  ['conformance', (x) => engine.conformanceProbability({ value: 0, standardUncertainty: x, lower: 0 }), 'standardUncertainty', { min: 0 }], // prettier-ignore
  ['risks', (standardDeviation) => engine.globalRisks({ ...risks, standardDeviation }), 'standardDeviation', { above: 0 }], // prettier-ignore
  ['risks', (standardUncertainty) => engine.globalRisks({ ...risks, standardUncertainty }), 'standardUncertainty', { above: 0 }], // prettier-ignore
  ['risks', (upper) => engine.globalRisks({ ...risks, upper }), 'upper', { above: -2 }],

  ['coverage factor', (x) => engine.coverageFactor(x, 9), 'probability', { above: 0, below: 1 }],
  ['normal quantile', (x) => engine.normalQuantile(x), 'probability', { above: 1e-300, below: 1 }],
  ['half-width', (x) => engine.standardUncertainty({ halfWidth: x, distribution: 'rectangular' }), 'halfWidth', { min: 0 }], // prettier-ignore
  ['coverage of a half-width', (x) => engine.standardUncertainty({ halfWidth: 1, distribution: 'normal', coverageFactor: x }), 'coverageFactor', { above: 0 }], // prettier-ignore
  ['Monte Carlo', (digits) => simulated({ digits }), 'options.digits', { min: 1, max: 2 }],
  ['Monte Carlo', (x) => simulated({ maximumTrials: x }), 'options.maximumTrials', { min: 20_000 }],
  ['tolerance', (x) => engine.numericalTolerance(x, 2), 'standardUncertainty', { min: 0 }],

  ['frequency', (frequency) => engine.kibbleMass({ ...kibble, moving: { junctions: 1, frequency } }, exact), 'moving.frequency', { above: 0 }], // prettier-ignore
  ['ratio', (ratio) => engine.kibbleMass({ ...kibble, resistance: { plateau: 1, ratio } }, exact), 'resistance.ratio', { above: 0 }], // prettier-ignore
  ['velocity', (velocity) => engine.kibbleMass({ ...kibble, velocity }, exact), 'velocity', { above: 0 }],
  ['gravity', (gravity) => engine.kibbleMass({ ...kibble, gravity }, exact), 'gravity', { above: 0 }],
  ['velocity, u', (velocity) => engine.kibbleMass(kibble, { ...exact, velocity }), 'u.velocity', { min: 0 }],
  ['alignment', (relative) => corrected({ alignment: { relative, standardUncertainty: 0 } }), 'corrections.alignment.relative', { above: -1 }], // prettier-ignore
  ['air index', (x) => corrected({ airIndex: { refractiveIndex: x, standardUncertainty: 0 } }), 'corrections.airIndex.refractiveIndex', { min: 1, max: 1.001 }], // prettier-ignore
  ['gradient', (x) => corrected({ gravityGradient: { ...gradient, gradient: x } }), 'corrections.gravityGradient.gradient', { min: -1e-4, max: 1e-4 }], // prettier-ignore
  ['gradient', (x) => corrected({ gravityGradient: { ...gradient, height: x } }), 'corrections.gravityGradient.height', { min: -100, max: 100 }], // prettier-ignore
  ['electron', (rydberg) => engine.electronMass({ rydberg, fineStructure: 1 }), 'constants.rydberg', { above: 0 }], // prettier-ignore
  ['electron', (x) => engine.electronMass({ rydberg: 1, fineStructure: x }), 'constants.fineStructure', { above: 0 }], // prettier-ignore

  ['history', (x) => engine.stepQuestion([{ date: '2020-01-01', value: 1, standardUncertainty: x }]), 'history[0].standardUncertainty', { above: 0 }], // prettier-ignore
  ['prediction', (x) => engine.predictValue(history, '2023-01-01', { probability: x }), 'options.probability', { above: 0, below: 1 }], // prettier-ignore
  ['prediction', (x) => engine.predictValue(history, '2023-01-01', { nextStandardUncertainty: x }), 'options.nextStandardUncertainty', { min: 0 }], // prettier-ignore
  ['interval', (x) => engine.recalibrationInterval({ ...staircase, minimumMonths: x, maximumMonths: 1200 }), 'minimumMonths', { min: 1, max: 1200 }], // prettier-ignore
  ['interval', (x) => engine.recalibrationInterval({ ...staircase, maximumMonths: x }), 'maximumMonths', { min: 1, max: 1200 }], // prettier-ignore
  ['staircase', (x) => engine.recalibrationInterval({ ...staircase, currentMonths: x }), 'currentMonths', { above: 0 }], // prettier-ignore
  ['staircase', (x) => engine.recalibrationInterval({ ...staircase, maximumPermissibleError: x }), 'maximumPermissibleError', { above: 0 }], // prettier-ignore
  ['staircase', (x) => engine.recalibrationInterval({ ...staircase, lengthenWithin: x }), 'lengthenWithin', { min: 0, max: 1 }], // prettier-ignore
  [
    'staircase',
    (x) => engine.recalibrationInterval({ ...staircase, lengthenBy: x }),
    'lengthenBy',
    { min: 1 },
  ],
  ['staircase', (x) => engine.recalibrationInterval({ ...staircase, shortenBy: x }), 'shortenBy', { above: 0, max: 1 }], // prettier-ignore
  ['control chart', (limit) => engine.recalibrationInterval({ ...chart, limit }), 'limit', { above: 0 }],
  ['control chart', (x) => engine.recalibrationInterval({ ...chart, coverageFactor: x }), 'coverageFactor', { min: 0 }], // prettier-ignore
  ['in-use time', (allowedUses) => engine.recalibrationInterval({ ...uses, allowedUses }), 'allowedUses', { above: 0 }], // prettier-ignore
  ['in-use time', (countedUses) => engine.recalibrationInterval({ ...uses, countedUses }), 'countedUses', { min: 0 }], // prettier-ignore
  ['in-use time', (countedMonths) => engine.recalibrationInterval({ ...uses, countedMonths }), 'countedMonths', { above: 0 }], // prettier-ignore

  ['sensitivity', (mass) => engine.sensitivityFromWeight({ ...weighing, mass }), 'mass', { above: 0 }],
  ['sensitivity', (density) => engine.sensitivityFromWeight({ ...weighing, density }), 'density', { above: 1.19 }], // prettier-ignore
  ['sensitivity', (x) => engine.sensitivityFromWeight({ ...weighing, massUncertainty: x }), 'massUncertainty', { min: 0 }], // prettier-ignore
  ['sensitivity', (x) => engine.sensitivityFromWeight({ ...weighing, readingUncertainty: x }), 'readingUncertainty', { min: 0 }], // prettier-ignore
  ['design', (x) => engine.solveWeighingDesign({ ...design, betweenStandardDeviation: x }), 'betweenStandardDeviation', { min: 0 }], // prettier-ignore
  ['design', (x) => engine.solveWeighingDesign({ ...design, restraint: { ...design.restraint, standardUncertainty: x } }), 'restraint.standardUncertainty', { min: 0 }], // prettier-ignore
  ['precision', (x) => engine.precisionTest({ run: { standardDeviation: 1, degreesOfFreedom: x }, history: pooled }), 'run.degreesOfFreedom', { min: 1 }], // prettier-ignore
  ['precision', (x) => engine.precisionTest({ run: pooled, history: { standardDeviation: 1, degreesOfFreedom: x } }), 'history.degreesOfFreedom', { min: 1 }], // prettier-ignore
  ['precision', (x) => engine.precisionTest({ run: { standardDeviation: x, degreesOfFreedom: 3 }, history: pooled }), 'run.standardDeviation', { min: 0 }], // prettier-ignore
  ['precision', (x) => engine.precisionTest({ run: pooled, history: { standardDeviation: x, degreesOfFreedom: 3 } }), 'history.standardDeviation', { above: 0 }], // prettier-ignore
  ['pooling', (x) => engine.pooledStandardDeviation([{ standardDeviation: x, degreesOfFreedom: 1 }]), 'estimates[0].standardDeviation', { min: 0 }], // prettier-ignore
  ['pooling', (x) => engine.pooledStandardDeviation([{ standardDeviation: 1, degreesOfFreedom: x }]), 'estimates[0].degreesOfFreedom', { above: 0 }], // prettier-ignore

  ['chi-squared', (x) => engine.chiSquaredUpperTail(x, 3), 'x', { min: 0 }],
  ['chi-squared', (x) => engine.chiSquaredUpperPoint(x, 3), 'probability', { above: 0, below: 1 }],
  ['results', (x) => engine.pairwise({ values: [1], uncertainties: [x] }), 'uncertainties[0]', { above: 0 }],
  ['consistency', (level) => engine.consistency({ values: [1, 2], uncertainties: [1, 1] }, level), 'level', { min: 1e-100, below: 1 }], // prettier-ignore
  ['scores', (x) => engine.zScore({ value: 1, reference: 0, standardDeviation: x }), 'standardDeviation', { above: 0 }], // prettier-ignore
  ['scores', (x) => engine.zScoreAllowed({ referenceStandardUncertainty: x, standardDeviation: 1 }), 'referenceStandardUncertainty', { min: 0 }], // prettier-ignore
  ['consensus', (limit) => engine.consensusValue({ ...consensus, limit }), 'limit', { min: 0 }],
  ['consensus', (x) => engine.consensusValue({ ...consensus, agreedUncertainty: x }), 'agreedUncertainty', { min: 0 }], // prettier-ignore
  ['consensus', (resolution) => engine.consensusValue({ ...consensus, resolution }), 'resolution', { above: 0 }], // prettier-ignore
  ['circulation', (x) => engine.referToCommonDate({ ...circulation, pilotRepeatability: x }), 'pilotRepeatability', { above: 0 }], // prettier-ignore
  ['circulation', (x) => engine.referToCommonDate({ ...circulation, pilotSystematic: x }), 'pilotSystematic', { above: 0 }], // prettier-ignore
  ['circulation', (transport) => engine.referToCommonDate({ ...circulation, transport }), 'transport', { min: 0 }], // prettier-ignore
  ['circulation', (randomWalk) => engine.referToCommonDate({ ...circulation, randomWalk }), 'randomWalk', { min: 0 }], // prettier-ignore
  ['rounding', (x) => engine.roundResult({ value: new Decimal(1), expandedUncertainty: x }), 'expandedUncertainty', { min: 0 }], // prettier-ignore
  ['inferring', (x) => engine.inferLocal({ expandedUncertainty: '1', coverageFactor: x, carriedVariance: 0 }), 'coverageFactor', { above: 0 }], // prettier-ignore
  ['inferring', (x) => engine.inferLocal({ expandedUncertainty: '1', coverageFactor: 2, carriedVariance: x }), 'carriedVariance', { min: 0 }], // prettier-ignore
];

/** The next number below or above, as far as a test has to see it. */
function beyond(end: number, side: -1 | 1): number {
  return end === 0 ? side * 1e-9 : end + side * Math.abs(end) * 1e-6;
}

describe('where domains end', () => {
  it.each(DOMAINS.map((each, place) => [place, ...each] as const))(
    '%d, %s',
    (_place, _, call, field, { min, max, above, below }) => {
      const refuses = (x: number) =>
        expect(() => call(x)).toThrow(expect.objectContaining({ code: 'out-of-range', field }));
      const accepts = (x: number) => expect(() => call(x)).not.toThrow();
      if (min !== undefined) {
        accepts(min);
        refuses(beyond(min, -1));
      }
      if (max !== undefined) {
        accepts(max);
        refuses(beyond(max, 1));
      }
      if (above !== undefined) {
        refuses(above);
        accepts(beyond(above, 1));
      }
      if (below !== undefined) {
        refuses(below);
        accepts(beyond(below, -1));
      }
    },
  );
});
