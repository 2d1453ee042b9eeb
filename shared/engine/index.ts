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
