import type { ChainLifeResponse, LifeEvent } from '#shared/contracts/chain-life.ts';

/** The two clocks that a question names. */
export type Clock = 'day' | 'known';

/**
 * The days that the line spans: a little before the first event, to today or the last day that lies ahead. It is not
 * to scale: quiet years give room to crowded weeks, so that a finger can tell the events apart.
 */
export interface LifeAxis {
  from: string;
  to: string;
  today: string;
  /** Days whose places are fixed, in order; between them days are even. */
  knots: { day: number; place: number }[];
}

const MILLISECONDS_PER_DAY = 86_400_000;
/** Room before the first event, as a part of the life: one may ask about the days before it. */
const LEAD = 0.03;

/** How much of the line is shared out evenly among the gaps between events. */
const EVENLY = 0.5;

/** The axis of a life. */
export function axisOf({ from, to, today, events }: ChainLifeResponse): LifeAxis {
  const lead = Math.max(1, Math.round((numberOf(to) - numberOf(from)) * LEAD));
  const first = numberOf(from) - lead;
  const dated = events.flatMap((event) => [event.inForceFrom, event.recordedOn]);
  const days = [first, ...[today, to, ...dated].map(numberOf)];
  const inOrder = [...new Set(days)].sort((a, b) => a - b);
  return { from: dayOf(first), to, today, knots: spread(inOrder) };
}

/** Each gap between events at least as wide as its even share of half the line. */
function spread(days: number[]): LifeAxis['knots'] {
  const whole = Math.max(1, days.at(-1)! - days[0]!);
  const least = EVENLY / Math.max(1, days.length - 1);
  const widths = days.map((day, at) => (at === 0 ? 0 : Math.max(least, (day - days[at - 1]!) / whole)));
  const sum = widths.reduce((total, width) => total + width, 0) || 1;
  let place = 0;
  return days.map((day, at) => ({ day, place: (place += widths[at]! / sum) }));
}

/** Where a day lies on the axis, from 0 to 1; days outside lie at its ends. */
export function placeOf({ knots }: LifeAxis, day: string): number {
  return between(knots, numberOf(day), 'day', 'place');
}

/** The day at a place of the axis; nobody knows today what will be known tomorrow. */
export function dayAt(axis: LifeAxis, place: number, clock: Clock): string {
  const day = Math.round(between(axis.knots, place, 'place', 'day'));
  return dayOf(Math.min(numberOf(lastOf(axis, clock)), day));
}

/** Along the knots, from one of their two numbers to the other. */
function between(knots: LifeAxis['knots'], at: number, from: 'day' | 'place', to: 'day' | 'place'): number {
  const after = knots.findIndex((knot) => knot[from] >= at);
  if (after === -1) return knots.at(-1)![to];
  const [one, other] = [knots[after - 1], knots[after]!];
  if (!one) return other[to];
  const part = (at - one[from]) / (other[from] - one[from]);
  return one[to] + part * (other[to] - one[to]);
}

/** The last day that a clock can be set to. */
export function lastOf({ to, today }: LifeAxis, clock: Clock): string {
  return clock === 'known' ? today : to;
}

/** A day some days later. */
export function daysLater(axis: LifeAxis, day: string, days: number, clock: Clock): string {
  const moved = Math.max(numberOf(axis.from), numberOf(day) + days);
  return dayOf(Math.min(numberOf(lastOf(axis, clock)), moved));
}

/** The day on which an event shows on a clock: when it came into force, or when the register learnt of it. */
export function dayOn(event: LifeEvent, clock: Clock): string {
  return clock === 'day' ? event.inForceFrom : event.recordedOn;
}

/** The days at which the handle stops, in order, each once: the ends, today, and every event. */
export function stopsOf(axis: LifeAxis, events: readonly LifeEvent[], clock: Clock): string[] {
  const last = lastOf(axis, clock);
  const days = [axis.from, axis.today, last, ...events.map((event) => dayOn(event, clock))];
  return [...new Set(days.filter((day) => day <= last))].sort();
}

/** The stop after a day, or before it; the day itself where there is none. */
export function nextStop(stops: readonly string[], day: string, direction: 1 | -1): string {
  const next = direction === 1 ? stops.find((stop) => stop > day) : stops.findLast((stop) => stop < day);
  return next ?? day;
}

/** The stop nearest to a place, where it lies within `reach` of it: what a finger means. Else the day there. */
export function snapped(
  axis: LifeAxis,
  stops: readonly string[],
  place: number,
  reach: number,
  clock: Clock,
): string {
  const distance = (stop: string) => Math.abs(placeOf(axis, stop) - place);
  const nearest = stops.toSorted((a, b) => distance(a) - distance(b))[0];
  return nearest !== undefined && distance(nearest) <= reach ? nearest : dayAt(axis, place, clock);
}

/** A day as a whole number, for `aria-valuenow` and arithmetic. */
export function numberOf(day: string): number {
  return Math.round(Date.parse(day) / MILLISECONDS_PER_DAY);
}

function dayOf(number: number): string {
  return new Date(number * MILLISECONDS_PER_DAY).toISOString().slice(0, 10);
}
