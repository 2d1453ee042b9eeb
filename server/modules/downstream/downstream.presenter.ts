import type { z } from 'zod';
import type { DownstreamResponse, FullRow, WarningRow } from '#shared/contracts/downstream.ts';
import { decimalText } from '#shared/decimal.ts';
import type { Downstream, FoundRow } from './downstream.service.ts';
import { groupOrder } from './group-order.ts';
import type { NamedLaboratory, RowDetails } from './row-details.queries.ts';
import { SIGHT } from './sight.ts';

type Laboratories = Map<string, NamedLaboratory>;

/** Who leans on it, in groups and rows: rows of others are told as warnings. */
export function presentDownstream(answer: Downstream): z.input<typeof DownstreamResponse> {
  const { question, groups, page, laboratories } = answer;
  const sum = (of: 'count' | 'warned') => groups.reduce((total, group) => total + group[of], 0);
  return {
    question: { day: question.day, known: question.known, by: question.by },
    total: { count: sum('count'), warned: sum('warned') },
    groups: groups.sort(groupOrder(question.by)).map(({ key, count, warned }) => ({
      key,
      laboratory: laboratories.get(key) ?? null,
      count,
      warned,
    })),
    page: page && { ...page, rows: page.rows.map((row) => presentRow(row, laboratories)) },
  };
}

function presentRow(
  { sight, details }: FoundRow,
  laboratories: Laboratories,
): z.input<typeof FullRow> | z.input<typeof WarningRow> {
  return sight >= SIGHT.issued
    ? fullRow(details, laboratories)
    : warningRow(details, laboratories.get(details.issuerId)!);
}

/** A value in full. */
export function fullRow(details: RowDetails, laboratories: Laboratories): z.input<typeof FullRow> {
  const { id: _, holderId, issuerId, ...shown } = details;
  return {
    ...shown,
    view: 'full',
    class: details.class as z.input<typeof FullRow>['class'],
    deviation: decimalText(details.deviation),
    expandedU: details.expandedU === null ? null : decimalText(details.expandedU),
    k: details.k === null ? null : decimalText(details.k),
    holder: laboratories.get(holderId)!,
    issuer: laboratories.get(issuerId)!,
  };
}

/** A weight, and the laboratory to name beside it; nothing else. */
export function warningRow(details: RowDetails, laboratory: NamedLaboratory): z.input<typeof WarningRow> {
  return {
    view: 'warning',
    laboratory,
    registryNo: details.registryNo,
    nominal: details.nominal,
    class: details.class as z.input<typeof WarningRow>['class'],
  };
}
