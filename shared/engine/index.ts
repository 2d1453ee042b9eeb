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
