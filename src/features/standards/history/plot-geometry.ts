import { Decimal } from '#shared/decimal.ts';
import type { HistoryValue, StandardResponse } from '#shared/contracts/standards.ts';
import type { Unit } from '#shared/engine/quantity/units.ts';
import type { z } from 'zod';
import { convertText, deviationUnit } from '#shared/numbers/format-decimal.ts';
import { dayNumber, possibleDays } from './days.ts';
import { placeLabels, type Mark, type PlacedLabel } from './plot-labels.ts';
import { chooseBand, valueDomain, type Band, type Domain } from './plot-domain.ts';
import { timeTicks, valueTicks, type Tick } from './ticks.ts';

export type PlotValue = z.infer<typeof HistoryValue>;

export interface PlotInput {
  /** Values of one quantity, in the order of their dates. */
  values: readonly PlotValue[];
  epochs: StandardResponse['epochs'];
  /** Maximum permissible error, grams; null where none applies, as for mass. */
  errorLimit: string | null;
  weightClass: string | null;
  dueOn: string | null;
  /** Pixels. */
  width: number;
  height: number;
}

/** A value in the drawing. */
export interface PlotPoint {
  value: PlotValue;
  x: number;
  y: number;
  /** Ends of the bar; null where the certificate states no U. */
  bar: { top: number; bottom: number } | null;
  /** Ends of the stretch of days in which it was determined; null where the day is known. */
  whisker: { left: number; right: number } | null;
  /** Lies beyond the plot and is drawn at its edge. */
  isBeyond: boolean;
}

/** Whether the stretch of days reaches beyond the ring of the point, so that there is something to see. */
export function isSpanSeen({ whisker }: PlotPoint): boolean {
  return whisker !== null && whisker.right - whisker.left > 12;
}

export interface PlotFrame {
  left: number;
  right: number;
  top: number;
  bottom: number;
}

/** Everything the drawing consists of, in pixels. */
export interface PlotGeometry {
  unit: Extract<Unit, 'g' | 'mg' | 'ug'>;
  frame: PlotFrame;
  valueTicks: Tick[];
  timeTicks: Tick[];
  points: PlotPoint[];
  /** Each joins the values of one epoch in one medium; none crosses an intervention. */
  lines: { x: number; y: number }[][];
  band: (Band & { top: number; bottom: number }) | null;
  /** Interventions and the day the next calibration is due. */
  marks: PlacedLabel[];
}

const AXIS_ROOM = 58;
const FOOT_ROOM = 24;
const HEAD_ROOM = 16;
const LABEL_ROW = 17;
const RIGHT_ROOM = 10;
/** Half of a label such as 2030-01: it stands below the end of the axis and must not be cut. */
const HALF_YEAR_LABEL = 26;

/** Where everything of a history stands. Pure; null when there is nothing to draw. */
export function plotGeometry(input: PlotInput): PlotGeometry | null {
  if (input.values.length === 0) return null;
  const unit = unitOf(input.values);
  const inUnit = (grams: string): number => Number(convertText(grams, 'g', unit));
  const domain = valueDomain(input.values, inUnit);
  const band = chooseBand(input.errorLimit, input.weightClass, domain, inUnit);
  const values = band ? widened(domain, band.halfWidth) : domain;
  const days = dayDomain(input);
  const right = input.width - RIGHT_ROOM;
  const x = scale(days, AXIS_ROOM, right);
  const marks = placeLabels(marksOf(input, x), { left: AXIS_ROOM, right });
  const top = HEAD_ROOM + LABEL_ROW * Math.max(0, ...marks.map((mark) => mark.row + 1));
  const frame = { left: AXIS_ROOM, right, top, bottom: input.height - FOOT_ROOM };
  const y = scale(values, frame.bottom, frame.top);
  const points = input.values.map((value) => pointOf(value, { x, y, inUnit, frame }));
  return {
    unit,
    frame,
    valueTicks: labelled(valueTicks(values.low, values.high, (frame.bottom - frame.top) / 46), y),
    timeTicks: timeTicks(days.low, days.high, (right - AXIS_ROOM) / 84)
      .map((tick) => ({ ...tick, at: x(tick.at) }))
      .filter((tick) => tick.at <= right - HALF_YEAR_LABEL + RIGHT_ROOM),
    points,
    lines: linesOf(points),
    band: band && { ...band, top: y(band.halfWidth), bottom: y(-band.halfWidth) },
    marks,
  };
}

function unitOf(values: readonly PlotValue[]): PlotGeometry['unit'] {
  const largest = (texts: (string | null)[]): string =>
    Decimal.max(0, ...texts.flatMap((text) => (text === null ? [] : [new Decimal(text).abs()]))).toFixed();
  const drawn = values.filter((value) => value.state === 'in force');
  const shown = drawn.length > 0 ? drawn : values;
  return deviationUnit(
    largest(shown.map((value) => value.deviation)),
    largest(shown.map((value) => value.expandedU)),
  ) as PlotGeometry['unit'];
}

function dayDomain({ values, dueOn, epochs }: PlotInput): Domain {
  const known = values.map(possibleDays);
  const low = Math.min(...known.map((days) => days.first));
  const after = [dueOn, ...epochs.map((epoch) => epoch.beginsOn)].flatMap((day) =>
    day ? [dayNumber(day)] : [],
  );
  const high = Math.max(...known.map((days) => days.last), ...after);
  const room = Math.max(60, (high - low) * 0.06);
  return { low: low - room, high: high + room };
}

interface Scales {
  x: (day: number) => number;
  y: (value: number) => number;
  inUnit: (grams: string) => number;
  frame: PlotFrame;
}

function pointOf(value: PlotValue, { x, y, inUnit, frame }: Scales): PlotPoint {
  const { first, last } = possibleDays(value);
  const inside = (place: number): number => Math.min(frame.bottom, Math.max(frame.top, place));
  const deviation = inUnit(value.deviation);
  const middle = y(deviation);
  const isBeyond = inside(middle) !== middle;
  const halfBar = value.expandedU === null ? null : inUnit(value.expandedU);
  return {
    value,
    x: x((first + last) / 2),
    y: inside(middle),
    bar:
      halfBar === null || isBeyond
        ? null
        : { top: inside(y(deviation + halfBar)), bottom: inside(y(deviation - halfBar)) },
    whisker: first === last ? null : { left: x(first), right: x(last) },
    isBeyond,
  };
}

function linesOf(points: readonly PlotPoint[]): { x: number; y: number }[][] {
  const byStretch = new Map<string, { x: number; y: number }[]>();
  for (const { value, x, y, isBeyond } of points) {
    if (value.state !== 'in force' || isBeyond) continue;
    const key = `${value.epochN} ${value.medium}`;
    byStretch.set(key, [...(byStretch.get(key) ?? []), { x, y }]);
  }
  return [...byStretch.values()].filter((line) => line.length > 1);
}

/** The first epoch begins with the weight itself and needs no mark. */
function marksOf({ epochs, dueOn }: PlotInput, x: (day: number) => number): Mark[] {
  const interventions = epochs
    .filter((epoch) => epoch.n > 1)
    .map((epoch): Mark => {
      const text = `${epoch.reason} ${epoch.beginsOn}`;
      return {
        kind: 'epoch',
        day: epoch.beginsOn,
        x: x(dayNumber(epoch.beginsOn)),
        texts: [`${text}, new epoch`, text],
      };
    });
  if (!dueOn) return interventions;
  return [...interventions, { kind: 'due', day: dueOn, x: x(dayNumber(dueOn)), texts: [`due ${dueOn}`] }];
}

/** All marks of an axis with as many decimals as the finest needs. */
function labelled(marks: readonly number[], y: (value: number) => number): Tick[] {
  const decimals = Math.max(0, ...marks.map((mark) => new Decimal(mark).decimalPlaces()));
  return marks.map((mark) => ({
    at: y(mark),
    label: mark === 0 ? '0' : new Decimal(mark).toFixed(decimals),
  }));
}

function widened(domain: Domain, halfWidth: number): Domain {
  const room = halfWidth * 1.22;
  return { low: Math.min(domain.low, -room), high: Math.max(domain.high, room) };
}

function scale({ low, high }: Domain, from: number, to: number): (value: number) => number {
  const round = (place: number): number => Math.round(place * 10) / 10;
  return (value) => round(from + ((value - low) / (high - low)) * (to - from));
}
