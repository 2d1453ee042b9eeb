import { Decimal } from '#shared/decimal.ts';
import type { CalibrationInput, CalibrationLine } from '#shared/contracts/calibration-input.ts';
import { inferLocal } from '#shared/engine/network/infer-local.ts';
import type { LocalOrigin } from './calibrations.model.ts';

/** The uncertainties of a result as they are frozen at issue, in g. */
export interface FrozenUncertainty {
  /** U/k as stated; null where the certificate states none. */
  u: number | null;
  /** The part that is its own; null where it cannot be known. */
  local: number | null;
  origin: LocalOrigin;
  /** Of the local part; null = infinite or not stated. */
  degreesOfFreedom: number | null;
  /** Name of the variance estimate behind the local part, where it is one. */
  estimate: string | null;
}

const POWER_OF_GRAM = { kg: 3, g: 0, mg: -3, ug: -6 } as const;

/**
 * The local part of a result, taken once at issue: from the covariance of its group, from its budget, or
 * inferred from what its certificate states less what it carries.
 * @param carried variance brought by what it leaned on, g2; null where it cannot be known
 */
export function frozenUncertainty(
  line: CalibrationLine,
  at: number,
  group: CalibrationInput['group'],
  carried: number | null,
): FrozenUncertainty {
  const u = statedU(line);
  if (group) {
    const variance = group.covariance[at]?.[at] ?? 0;
    return {
      u,
      local: Math.sqrt(Math.max(0, variance)),
      origin: 'group',
      degreesOfFreedom: group.degreesOfFreedom,
      estimate: group.estimate,
    };
  }
  if (line.components.length > 0) return { u, ...fromComponents(line.components) };
  const unknown = { u, local: null, origin: 'unknown', degreesOfFreedom: null, estimate: null } as const;
  if (line.rootKind === 'earlier definition' && u === null) {
    // The prototype was the unit itself, from 1889 until 2019-05-19: its uncertainty was zero by definition.
    return { ...unknown, u: 0, local: 0, origin: 'agreed' };
  }
  if (u === null || line.expandedU === null || line.k === null || carried === null) return unknown;
  const { local } = inferLocal({
    expandedUncertainty: asPrinted(line.expandedU, line),
    coverageFactor: Number(line.k),
    carriedVariance: carried,
  });
  return {
    u,
    local,
    origin: line.rootKind === 'consensus value' ? 'agreed' : 'inferred',
    degreesOfFreedom: line.rootKind === null ? null : line.degreesOfFreedom,
    estimate: null,
  };
}

/** U/k, g; null where no U is stated. */
function statedU(line: CalibrationLine): number | null {
  if (line.expandedU === null || line.k === null) return null;
  return new Decimal(line.expandedU).div(line.k).toNumber();
}

/** U in grams with the zeros the certificate printed: its last digit is what its rounding is judged by. */
function asPrinted(expandedU: string, line: CalibrationLine): string {
  if (line.reportedUDecimals === null) return expandedU;
  const decimals = line.reportedUDecimals - POWER_OF_GRAM[line.reportedUnit];
  const value = new Decimal(expandedU);
  return value.toFixed(Math.max(value.decimalPlaces(), decimals, 0));
}

/** Root sum of squares, with Welch-Satterthwaite over distinct estimates (JCGM 100:2008, G.4). */
function fromComponents(components: CalibrationLine['components']): Omit<FrozenUncertainty, 'u'> {
  let variance = 0;
  const estimates = new Map<string, { variance: number; degreesOfFreedom: number }>();
  for (const [at, component] of components.entries()) {
    const part = (component.standardUncertainty * component.sensitivity) ** 2;
    variance += part;
    if (component.degreesOfFreedom === null) continue;
    const name = component.estimate ?? `#${at}`;
    const before = estimates.get(name)?.variance ?? 0;
    estimates.set(name, { variance: before + part, degreesOfFreedom: component.degreesOfFreedom });
  }
  let sum = 0;
  for (const one of estimates.values()) sum += one.variance ** 2 / one.degreesOfFreedom;
  const named = [...estimates.keys()];
  const only = named.length === 1 && !named[0]?.startsWith('#') ? (named[0] ?? null) : null;
  return {
    local: Math.sqrt(variance),
    origin: 'components',
    degreesOfFreedom: sum > 0 ? variance ** 2 / sum : null,
    estimate: only,
  };
}
