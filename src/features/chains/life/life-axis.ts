import type { ChainLifeResponse, LifeEvent } from '#shared/contracts/chain-life.ts';

/** The two clocks that a question names. */
export type Clock = 'day' | 'known';

/** The days that the line spans: a little before the first event, to today or the last day that lies ahead. */
export interface LifeAxis {
  from: string;
  to: string;
  today: string;
}

const MILLISECONDS_PER_DAY = 86_400_000;
/** Room before the first event, as a part of the life: one may ask about the days before it. */
const LEAD = 0.03;

/** The axis of a life. */
export function axisOf({ from, to, today }: ChainLifeResponse): LifeAxis {
  const lead = Math.max(1, Math.round((numberOf(to) - numberOf(from)) * LEAD));
  return { from: dayOf(numberOf(from) - lead), to, today };
}

/** Where a day lies on the axis, from 0 to 1; days outside lie at its ends. */
export function placeOf({ from, to }: LifeAxis, day: string): number {
  const span = Math.max(1, numberOf(to) - numberOf(from));
  return Math.min(1, Math.max(0, (numberOf(day) - numberOf(from)) / span));
}

/** The day at a place of the axis; nobody knows today what will be known tomorrow. */
export function dayAt(axis: LifeAxis, place: number, clock: Clock): string {
  const [from, to] = [numberOf(axis.from), numberOf(lastOf(axis, clock))];
  const day = from + Math.round(place * (numberOf(axis.to) - from));
  return dayOf(Math.min(to, Math.max(from, day)));
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

/** The stop nearest to a day, where it lies within `reach` days of it: what a finger means. */
export function snapped(stops: readonly string[], day: string, reach: number): string {
  const distance = (stop: string) => Math.abs(numberOf(stop) - numberOf(day));
  const nearest = stops.toSorted((a, b) => distance(a) - distance(b))[0];
  return nearest !== undefined && distance(nearest) <= reach ? nearest : day;
}

/** How many days the axis spans. */
export function spanOf({ from, to }: LifeAxis): number {
  return Math.max(1, numberOf(to) - numberOf(from));
}

/** A day as a whole number, for `aria-valuenow` and arithmetic. */
export function numberOf(day: string): number {
  return Math.round(Date.parse(day) / MILLISECONDS_PER_DAY);
}

function dayOf(number: number): string {
  return new Date(number * MILLISECONDS_PER_DAY).toISOString().slice(0, 10);
}
