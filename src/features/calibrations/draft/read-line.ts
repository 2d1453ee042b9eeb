import { Decimal, decimalText } from '#shared/decimal.ts';
import type { DraftLine } from '#shared/contracts/drafts.ts';
import type { MassUnit, WeightClass } from '#shared/contracts/common.ts';
import { maximumPermissibleError } from '#shared/engine/conformity/maximum-permissible-error.ts';
import { EngineError } from '#shared/engine/errors.ts';
import { parseQuantity } from '#shared/engine/quantity/parse-quantity.ts';
import { convertUnit } from '#shared/engine/quantity/units.ts';
import type { KnownStandard } from './known.ts';

/** How a number is written: in which unit, with how many decimals. */
interface Written {
  unit: MassUnit;
  decimals: number;
}

/** What a line says by its entries alone, all in grams as text; null where it says nothing that can be read. */
export interface LineReading {
  deviation: string | null;
  /** Unit and decimals in which the value is written. */
  written: Written;
  expandedU: string | null;
  /** The same of U. */
  writtenU: Written;
  k: string | null;
  /** Deviation minus the weight's last value, and its size in the U of the change where both are stated. */
  change: { deviation: string; ratio: number | null } | null;
  /** U at k = 2 held against a third of the limit of the class (OIML R 111-1:2004, 5.2). */
  third: { class: WeightClass; limit: string; isWithin: boolean } | null;
}

/** Reads a line as the server will: the same numbers, so that the preview and the register agree. */
export function readLine(line: DraftLine, standard: KnownStandard | undefined): LineReading {
  const read = readWritten(line.value, line.unit);
  const value = read?.grams ?? null;
  const isDeviation = line.valueIs === 'deviation';
  const nominal = standard ? new Decimal(standard.nominal) : null;
  const deviation = value === null ? null : isDeviation ? value : nominal && value.minus(nominal);
  const readU = line.uNotStated ? null : readWritten(line.expandedU, line.uUnit);
  const expandedU = readU?.grams ?? null;
  const k = line.uNotStated ? null : readFactor(line.k);
  return {
    deviation: deviation && decimalText(deviation),
    written: { unit: read?.unit ?? line.unit, decimals: read?.decimals ?? 0 },
    writtenU: { unit: readU?.unit ?? line.uUnit, decimals: readU?.decimals ?? 0 },
    expandedU: expandedU?.gt(0) ? decimalText(expandedU) : null,
    k: k && decimalText(k),
    change: deviation && standard ? changeSince(deviation, expandedU, standard) : null,
    third: expandedU?.gt(0) && k?.gte(1) ? thirdOfLimit(line, expandedU.times(2).div(k), standard) : null,
  };
}

/** A mass as typed, in grams; a unit written beside the number wins over the one chosen. */
export function readMass(text: string, unit: MassUnit): Decimal | null {
  return readWritten(text, unit)?.grams ?? null;
}

function readWritten(text: string, unit: MassUnit): (Written & { grams: Decimal }) | null {
  if (text.trim() === '') return null;
  try {
    const options = { field: 'value', units: ['kg', 'g', 'mg', 'ug'] as const, defaultUnit: unit };
    const parsed = parseQuantity(text, options);
    if (parsed.uncertainty) return null;
    const own = (parsed.unit ?? unit) as MassUnit;
    return { unit: own, decimals: parsed.decimals, grams: convertUnit(parsed.value, own, 'g') };
  } catch (error) {
    if (error instanceof EngineError) return null;
    throw error;
  }
}

function readFactor(text: string): Decimal | null {
  return /^\s*\d+([.,]\d+)?\s*$/.test(text) ? new Decimal(text.trim().replace(',', '.')) : null;
}

function changeSince(
  deviation: Decimal,
  expandedU: Decimal | null,
  { lastValue }: KnownStandard,
): LineReading['change'] {
  if (!lastValue) return null;
  const change = deviation.minus(lastValue.deviation);
  const before = lastValue.expandedU;
  const U =
    expandedU?.gt(0) && before !== null ? expandedU.pow(2).plus(new Decimal(before).pow(2)).sqrt() : null;
  return { deviation: decimalText(change), ratio: U ? change.abs().div(U).toNumber() : null };
}

function thirdOfLimit(
  line: DraftLine,
  uAtTwo: Decimal,
  standard: KnownStandard | undefined,
): LineReading['third'] {
  const weightClass = line.class ?? standard?.class ?? null;
  if (!standard || !weightClass || line.quantity !== 'conventional mass') return null;
  const limit = maximumPermissibleError(weightClass, new Decimal(standard.nominal))?.div(1000).div(3);
  if (!limit) return null;
  return { class: weightClass, limit: limit.toFixed(), isWithin: uAtTwo.lte(limit) };
}
