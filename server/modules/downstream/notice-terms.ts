import type { WhatIfChange } from '#shared/contracts/downstream.ts';
import { Decimal } from '#shared/decimal.ts';
import { dayNumber } from './day-number.ts';
import type { Covered } from './effects.ts';
import type { GraphArrays } from './graph-arrays.ts';

type Notice = Extract<WhatIfChange, { kind: 'notice' }>;

const GRAMS_PER_KILOGRAM = 1000;

/**
 * The values of `nodes` that a notice covers, with what it brings to each: the shift of their day of calibration and
 * the sensitivity to its one effect, both in proportion to mass.
 */
export function noticeTerms(graph: GraphArrays, nodes: Iterable<number>, notice: Notice): Covered[] {
  const points = notice.shiftPerKilogram.map(({ on, shift }) => ({
    day: dayNumber(on),
    shift: Number(shift),
  }));
  const covers = coverage(graph, notice);
  const covered: Covered[] = [];
  for (const node of nodes) {
    if (!covers(node)) continue;
    const kilograms = Number(graph.nominals.at(graph.nominal[node]!)) / GRAMS_PER_KILOGRAM;
    const shift = kilograms * shiftOn(points, graph.performedDay[node]!);
    covered.push({ node, shift, sensitivity: kilograms });
  }
  return covered;
}

function coverage(graph: GraphArrays, notice: Notice): (node: number) => boolean {
  const from = notice.performedFrom ? dayNumber(notice.performedFrom) : -Infinity;
  const to = notice.performedTo ? dayNumber(notice.performedTo) : Infinity;
  const isNominal = Array.from({ length: graph.nominals.size }, (_, at) => {
    const nominal = new Decimal(graph.nominals.at(at));
    const isTooLight = notice.nominalFrom !== undefined && nominal.lt(notice.nominalFrom);
    return !isTooLight && !(notice.nominalTo !== undefined && nominal.gt(notice.nominalTo));
  });
  const isConventional =
    notice.quantity === undefined ? null : notice.quantity === 'conventional mass' ? 1 : 0;
  return (node) =>
    graph.laboratories.at(graph.issuer[node]!) === notice.issuerId &&
    graph.performedDay[node]! >= from &&
    graph.performedDay[node]! <= to &&
    isNominal[graph.nominal[node]!]! &&
    (isConventional === null || graph.isConventional[node] === isConventional);
}

/** Linear between the days given, constant before the first and after the last. */
function shiftOn(points: readonly { day: number; shift: number }[], day: number): number {
  const next = points.findIndex((point) => point.day >= day);
  if (next === -1) return points.at(-1)!.shift;
  const after = points[next]!;
  const before = points[next - 1];
  if (!before || after.day === day) return after.shift;
  const part = (day - before.day) / (after.day - before.day);
  return before.shift + part * (after.shift - before.shift);
}
