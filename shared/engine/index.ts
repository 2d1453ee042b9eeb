export { Decimal } from '#shared/decimal.ts';
export { EngineError } from './errors.ts';
export { ENGINE_VERSION } from './version.ts';

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
