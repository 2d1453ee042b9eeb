import type { QuantityKind } from '#shared/contracts/common.ts';
import type { StandardResponse } from '#shared/contracts/standards.ts';
import { quantityLine, quantityText } from '#shared/numbers/quantity-text.ts';
import { dateAsKnown } from './days.ts';
import { isSpanSeen, type PlotPoint, type PlotValue } from './plot-geometry.ts';

/** The drawing in sentences, for those who hear it; numbers one by one are in the table. */
export function historySummary(
  sheet: Pick<StandardResponse, 'history' | 'epochs' | 'programme'>,
  kind: QuantityKind,
): string {
  const { history, epochs, programme } = sheet;
  const first = history[0];
  const last = history.at(-1);
  if (!first || !last) return '';
  const sorted = history.toSorted((a, b) => Number(a.deviation) - Number(b.deviation));
  const sentences = [
    history.length === 1
      ? `Deviation from nominal (${kind}), one value of ${dateAsKnown(first)}: ${deviation(first)}.`
      : `Deviation from nominal (${kind}) against time: ${history.length} values from ${dateAsKnown(first)} to ${dateAsKnown(last)}, between ${deviation(sorted[0]!)} and ${deviation(sorted.at(-1)!)}.`,
    ...epochs
      .filter((epoch) => epoch.n > 1)
      .map((epoch) => `New epoch on ${epoch.beginsOn}, ${epoch.reason}.`),
  ];
  if (programme?.dueOn) sentences.push(`Next calibration due ${programme.dueOn}.`);
  sentences.push('The table below holds the same facts.');
  return sentences.join(' ');
}

/** What the signs of the drawing mean; only those that occur. */
export function historyLegend(points: readonly PlotPoint[]): string {
  const values = points.map((point) => point.value);
  const factors = [...new Set(values.flatMap((value) => (value.k === null ? [] : [value.k])))];
  const has = (test: (value: PlotValue) => boolean): boolean => values.some(test);
  const parts = [
    factors.length > 0 && `Bars: U at k = ${factors.join(' or ')}, as stated`,
    has((value) => value.expandedU === null) && 'no bar: U not stated on the certificate',
    points.some(isSpanSeen)
      ? 'a horizontal stroke spans the days in which it was determined'
      : has((value) => value.datePrecision !== 'day') && 'some dates are known to the month or the year only',
    has((value) => value.state === 'superseded') && 'dashed: superseded',
    has((value) => value.state === 'withdrawn') && 'cross: withdrawn',
    values.filter((value) => value.state === 'in force').length > 1 && 'the line joins values of one epoch',
  ].filter((part) => part !== false);
  const text = parts.join('; ');
  return text === '' ? '' : `${text.charAt(0).toUpperCase()}${text.slice(1)}.`;
}

function deviation(value: PlotValue): string {
  const style = { decimalMark: '.', uncertainty: 'plus-minus' } as const;
  return quantityLine(
    quantityText(
      {
        value: value.deviation,
        expandedUncertainty: value.expandedU,
        coverageFactor: value.k,
        kind: 'deviation',
        shownIn: 'auto',
      },
      style,
    ),
  );
}
