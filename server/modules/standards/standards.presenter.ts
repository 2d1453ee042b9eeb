import { Decimal, decimalText } from '#shared/decimal.ts';
import type { HistoryValue, StandardResponse, StandardRow } from '#shared/contracts/standards.ts';
import { maximumPermissibleError } from '#shared/engine/conformity/maximum-permissible-error.ts';
import type { z } from 'zod';
import type { StandardRecord } from './standard-rows.queries.ts';
import type { HistoryRecord, StandardSheet } from './standard-sheet.queries.ts';

type History = z.infer<typeof HistoryValue>;

/** A row of the list. */
export function presentStandardRow(record: StandardRecord): StandardRow {
  const { id, registryNo, kind, marking, holder, set, dueOn } = record;
  return {
    id,
    registryNo,
    kind,
    nominal: decimalText(record.nominal),
    marking,
    class: record.class,
    holder,
    set,
    value: record.value && {
      ...record.value,
      deviation: decimalText(record.value.deviation),
      expandedU: textOrNull(record.value.expandedU),
      k: textOrNull(record.value.k),
    },
    dueOn,
  };
}

/** A standard's page. */
export function presentStandard(
  sheet: StandardSheet,
  abilities: StandardResponse['abilities'],
): StandardResponse {
  const { standard, programme } = sheet;
  const limit = standard.class && maximumPermissibleError(standard.class, new Decimal(standard.nominal));
  return {
    standard: {
      ...presentStandardRow(standard),
      serial: standard.serial,
      manufacturer: standard.manufacturer,
      shape: standard.shape,
      material: standard.material,
      inServiceFrom: standard.inServiceFrom,
      state: standard.state,
    },
    maximumPermissibleError: limit ? decimalText(limit.div(1000)) : null,
    epochs: sheet.epochs,
    properties: sheet.properties.map((property) => ({
      ...property,
      value: decimalText(property.value),
      expandedU: textOrNull(property.expandedU),
      k: textOrNull(property.k),
    })),
    programme: programme && { ...programme, laboratory: standard.holder, dueOn: standard.dueOn },
    history: presentHistory(sheet.history),
    leansOnThis: sheet.leansOnThis,
    abilities,
  };
}

/**
 * The history with the change of each value since the one before it: of the same epoch, kind and medium, in
 * force, from another calibration. E sets the change against the two U at k = 2 without their covariance; the
 * chain's own check takes that into account.
 */
function presentHistory(records: readonly HistoryRecord[]): History[] {
  const before = new Map<string, HistoryRecord>();
  return records.map((record) => {
    const { calibrationId, issuerId, issuerCode, issuerName, ...value } = record;
    const line = `${record.epochN} ${record.quantity} ${record.medium}`;
    const previous = before.get(line);
    const isComparable = previous && previous.calibrationId !== calibrationId;
    if (record.state === 'in force') before.set(line, record);
    return {
      ...value,
      issuer: { id: issuerId, code: issuerCode, name: issuerName },
      deviation: decimalText(value.deviation),
      expandedU: textOrNull(value.expandedU),
      k: textOrNull(value.k),
      change: isComparable ? changeSince(previous, record) : null,
    };
  });
}

function changeSince(previous: HistoryRecord, record: HistoryRecord): NonNullable<History['change']> {
  const deviation = new Decimal(record.deviation).minus(previous.deviation);
  const variances = [previous, record].map(({ expandedU, k }) =>
    expandedU === null || k === null ? null : new Decimal(expandedU).div(k).pow(2),
  );
  const [a, b] = variances;
  const ratio = a && b ? deviation.abs().div(a.plus(b).sqrt().times(2)).toNumber() : null;
  return { deviation: decimalText(deviation), ratio };
}

function textOrNull(value: string | null): string | null {
  return value === null ? null : decimalText(value);
}
