export { Decimal } from '#shared/decimal.ts';
export { EngineError, ENGINE_ERROR_CODES } from './errors.ts';
export { ENGINE_VERSION } from './version.ts';
export type { EngineErrorCode } from './errors.ts';

// quantities
export { UNITS, UNIT_DEFINITIONS, unitOfText, convertUnit, convertDecimals } from './quantity/units.ts';
export { roundResult, ROUNDINGS } from './quantity/round-result.ts';
export { parseQuantity } from './quantity/parse-quantity.ts';
export { formatQuantity, THIN_SPACE, MINUS_SIGN } from './quantity/format-quantity.ts';
export type { Unit, UnitDefinition, Dimension } from './quantity/units.ts';
export type { Rounding } from './quantity/round-result.ts';
export type { ParsedQuantity, ParsedUncertainty, ParseOptions } from './quantity/parse-quantity.ts';
export type { QuantityParts } from './quantity/format-quantity.ts';

// classes and conformity
export { WEIGHT_CLASSES, MPE_SOURCE, DENSITY_SOURCE } from './conformity/r111-2004.ts';
export { POLARIZATION_SOURCE, SUSCEPTIBILITY_SOURCE } from './conformity/r111-2004.ts';
export { maximumPermissibleError } from './conformity/maximum-permissible-error.ts';
export { classConformity, DECISION_RULES } from './conformity/class-conformity.ts';
export { reachableClasses } from './conformity/reachable-classes.ts';
export { densityLimits, densityLimitsByRule } from './conformity/density-limits.ts';
export { polarizationLimit, susceptibilityLimit } from './conformity/magnetic-limits.ts';
export type { WeightClass, LimitsSource, DensityInterval } from './conformity/r111-2004.ts';
export type { ClassConformity, DecisionRule, UncertaintyAllowed } from './conformity/class-conformity.ts';

// air and buoyancy
export { airDensityCipm2007, airDensitySensitivities } from './air/air-density-cipm2007.ts';
export { airDensityUncertainty, CIPM2007_FORMULA_UNCERTAINTY } from './air/air-density-cipm2007.ts';
export { relativeHumidityFromDewPoint } from './air/moist-air.ts';
export { airDensitySimplified } from './air/air-density-simplified.ts';
export { conventionalMass, massFromConventional } from './air/conventional-mass.ts';
export { buoyancyCorrection } from './air/buoyancy-correction.ts';
export { massAndConventional } from './air/mass-and-conventional.ts';
export { heightCorrection } from './air/height-correction.ts';
export { volumeAtTemperature } from './air/volume-at-temperature.ts';
export { sorptionCorrection } from './air/sorption-correction.ts';
export type { AirState, AirStateUncertainty, AirDensitySensitivities } from './air/air-density-cipm2007.ts';
export type { BuoyancyCorrection } from './air/buoyancy-correction.ts';
export type { MassKind } from './air/convention.ts';
export type { MassAndConventional } from './air/mass-and-conventional.ts';
export type { HeightCorrection } from './air/height-correction.ts';
export type { VolumeAtTemperature } from './air/volume-at-temperature.ts';
export type { SorptionCorrection, Transfer } from './air/sorption-correction.ts';

// the network
export { propagate } from './network/propagate.ts';
export { compileNetwork } from './network/compile-network.ts';
export { networkFromArrays } from './network/network-from-arrays.ts';
export { variances } from './network/variances.ts';
export { covariance, covarianceMatrix } from './network/covariance.ts';
export { inferLocal } from './network/infer-local.ts';
export { shift } from './network/shift.ts';
export { applyChanges } from './network/apply-changes.ts';
export { distanceToLimit } from './network/distance-to-limit.ts';
export { groupKey } from './network/network.ts';
export type { Network, NetworkValue, NetworkSource, NetworkGroup, NetworkLink } from './network/network.ts';
export type { Propagation } from './network/propagate.ts';
export type { CompiledNetwork } from './network/compiled-network.ts';
export type { NetworkArrays } from './network/network-from-arrays.ts';
export type { Change, Notice } from './network/changes.ts';

// conformity under uncertainty
export { conformanceProbability } from './conformity/conformance-probability.ts';
export { guardBandedAcceptance } from './conformity/guard-bands.ts';
export { globalRisks } from './conformity/global-risks.ts';
export type { GlobalRiskInput, GlobalRisks } from './conformity/global-risks.ts';

// uncertainty
export { standardUncertainty, HALF_WIDTH_DISTRIBUTIONS } from './uncertainty/standard-uncertainty.ts';
export { combine } from './uncertainty/combine.ts';
export { effectiveDegreesOfFreedom } from './uncertainty/effective-degrees-of-freedom.ts';
export { truncateDegreesOfFreedom } from './uncertainty/effective-degrees-of-freedom.ts';
export { coverageFactor } from './uncertainty/coverage-factor.ts';
export { monteCarlo, numericalTolerance } from './uncertainty/monte-carlo.ts';
export { randomSource } from './uncertainty/random.ts';
export { normalDistribution, normalQuantile } from './uncertainty/normal-distribution.ts';
export type { HalfWidthDistribution } from './uncertainty/standard-uncertainty.ts';
export type { BudgetComponent, CombinedUncertainty } from './uncertainty/combine.ts';
export type { EffectiveComponent } from './uncertainty/effective-degrees-of-freedom.ts';
export type { Distribution } from './uncertainty/input-distribution.ts';
export type { MonteCarloOptions, MonteCarloResult } from './uncertainty/monte-carlo.ts';
export type { IntervalKind } from './uncertainty/coverage-interval.ts';
export type { RandomSource } from './uncertainty/random.ts';

// weighing
export { substitutionSeries } from './weighing/substitution-series.ts';
export { pooledStandardDeviation } from './weighing/pooled-standard-deviation.ts';
export { sensitivityFromWeight } from './weighing/sensitivity-weight.ts';
export { solveWeighingDesign, designFactors } from './weighing/weighing-design.ts';
export { weighingDesigns } from './weighing/weighing-designs.ts';
export { checkStandardTest, precisionTest } from './weighing/check-standard.ts';
export { outlierQuestions, grubbsCriticalValue } from './weighing/outlier-questions.ts';
export type { SubstitutionCycle, SubstitutionSeries } from './weighing/substitution-series.ts';
export type { SubstitutionResult } from './weighing/substitution-series.ts';
export type { PrecisionEstimate } from './weighing/pooled-standard-deviation.ts';
export type { SensitivityWeighing } from './weighing/sensitivity-weight.ts';
export type { Restraint, WeighingDesignInput } from './weighing/design-input.ts';
export type { WeighingDesignResult } from './weighing/weighing-design.ts';
export type { PublishedDesign } from './weighing/weighing-designs.ts';
export type { HistoryTest } from './weighing/check-standard.ts';
export type { OutlierQuestion } from './weighing/outlier-questions.ts';

// realization
export { kibbleMass } from './realization/kibble-mass.ts';
export { crystalDensityMass, electronMass } from './realization/crystal-density-mass.ts';
export { PLANCK_CONSTANT, ELEMENTARY_CHARGE, SPEED_OF_LIGHT } from './realization/constants.ts';
export { JOSEPHSON_CONSTANT, VON_KLITZING_CONSTANT } from './realization/constants.ts';
export type { KibbleRun, KibbleUncertainties, JosephsonVoltage } from './realization/kibble-mass.ts';
export type { KibbleCorrections, RelativeCorrection } from './realization/kibble-corrections.ts';
export type { CrystalSphere, CrystalUncertainties, Isotope } from './realization/crystal-density-mass.ts';
export type { BudgetLine, RealizedMass } from './realization/budget.ts';

// time
export { predictValue } from './time/predict-value.ts';
export { fitLine } from './time/fit-line.ts';
export { splitByEpochs } from './time/epochs.ts';
export { stepQuestion } from './time/step-question.ts';
export { recalibrationInterval } from './time/recalibration-interval.ts';
export type { HistoryEntry } from './time/history.ts';
export type { Prediction, PredictionOptions } from './time/predict-value.ts';
export type { LinearFit } from './time/fit-line.ts';
export type { Intervention, Dated, EpochSplit } from './time/epochs.ts';
export type { StepAnswer, StepQuestion } from './time/step-question.ts';
export type { IntervalProposal, IntervalBounds } from './time/recalibration-interval.ts';
export type { Staircase, ControlChart, InUseTime } from './time/recalibration-interval.ts';

// matrices
export { isPositiveSemidefinite } from './linear/matrix.ts';
export type { Matrix } from './linear/matrix.ts';

// comparisons
export { referenceValue, ESTIMATORS } from './comparison/reference-value.ts';
export { degreesOfEquivalence, pairwise } from './comparison/degrees-of-equivalence.ts';
export { consistency, chiSquaredAbout } from './comparison/consistency.ts';
export { largestConsistentSubset } from './comparison/largest-consistent-subset.ts';
export { referToCommonDate } from './comparison/refer-to-common-date.ts';
export { link } from './comparison/link.ts';
export { consensusValue } from './comparison/consensus-value.ts';
export { enScore, zetaScore, zScore, zPrimeScore } from './comparison/scores.ts';
export { zScoreAllowed, scoreSignal } from './comparison/scores.ts';
export { chiSquaredUpperTail, chiSquaredUpperPoint } from './comparison/chi-squared.ts';
export type { Results } from './comparison/results.ts';
export type { Estimator, ReferenceValue, ReferenceWarning } from './comparison/reference-value.ts';
export type { DegreeOfEquivalence } from './comparison/degrees-of-equivalence.ts';
export type { Consistency } from './comparison/consistency.ts';
export type { ConsistentSubset } from './comparison/largest-consistent-subset.ts';
export type { Observation, Circulation, CommonDateResults } from './comparison/refer-to-common-date.ts';
export type { DriftModel } from './comparison/drift-models.ts';
export type { DriftFit } from './comparison/drift-fit.ts';
export type { Link, LinkingParticipant } from './comparison/link.ts';
