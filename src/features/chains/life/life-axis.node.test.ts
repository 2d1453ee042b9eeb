import { describe, expect, it } from 'vitest';
import type { LifeEvent } from '#shared/contracts/chain-life.ts';
import { axisOf, dayAt, daysLater, nextStop, placeOf, snapped, stopsOf } from './life-axis.ts';
import { sentenceOf, wordOf } from './event-words.ts';
import { placedWords } from './placed-words.ts';

const event = (changes: Partial<LifeEvent> = {}): LifeEvent => ({
  kind: 'withdrawn',
  of: 'chain',
  valueUid: null,
  registryNo: 'R-1',
  what: 'C-1',
  inForceFrom: '2020-04-10',
  madeKnownOn: '2020-09-07',
  recordedOn: '2020-09-07',
  isImported: false,
  ...changes,
});
const life = { valueUid: '', registryNo: 'R-1', from: '2020-01-12', to: '2020-12-26', today: '2020-12-01' };
const axis = axisOf({ ...life, events: [] });
const crowded = axisOf({
  ...life,
  events: [event(), event({ recordedOn: '2020-09-08' }), event({ inForceFrom: '2020-09-09' })],
});

describe('the axis of a life', () => {
  it('begins before the first event and ends at the last day that something counts from', () => {
    expect(axis).toMatchObject({ from: '2020-01-02', to: '2020-12-26', today: '2020-12-01' });
    expect([placeOf(axis, '2019-01-01'), placeOf(axis, '2020-01-02'), placeOf(axis, '2020-12-26')]).toEqual([
      0, 0, 1,
    ]);
  });

  it('finds the day of a place, and never a day of knowledge after today', () => {
    expect(dayAt(axis, -1, 'day')).toBe('2020-01-02');
    expect(dayAt(axis, 7, 'day')).toBe('2020-12-26');
    expect(dayAt(axis, 7, 'known')).toBe('2020-12-01');
    expect(daysLater(axis, '2020-12-01', 1, 'known')).toBe('2020-12-01');
    expect(daysLater(axis, '2020-12-01', 1, 'day')).toBe('2020-12-02');
  });

  it('gives crowded days room, keeps their order, and comes back to the same day', () => {
    const days = ['2020-01-02', '2020-04-10', '2020-09-07', '2020-09-08', '2020-09-09', '2020-12-01'];
    const places = days.map((day) => placeOf(crowded, day));
    expect(places).toEqual(places.toSorted((a, b) => a - b));
    expect(places[3]! - places[2]!).toBeGreaterThan(0.05);
    expect(days.map((day) => dayAt(crowded, placeOf(crowded, day), 'day'))).toEqual(days);
    expect(dayAt(crowded, placeOf(crowded, '2020-07-03'), 'day')).toBe('2020-07-03');
  });

  it('stops at each event by the clock: when it counts, or when it was recorded', () => {
    expect(stopsOf(axis, [event()], 'day')).toEqual(['2020-01-02', '2020-04-10', '2020-12-01', '2020-12-26']);
    const known = stopsOf(axis, [event()], 'known');
    expect(known).toEqual(['2020-01-02', '2020-09-07', '2020-12-01']);
    expect(nextStop(known, '2020-12-01', -1)).toBe('2020-09-07');
    expect(nextStop(known, '2020-09-07', 1)).toBe('2020-12-01');
    expect(nextStop(known, '2020-12-01', 1)).toBe('2020-12-01');
    const at = placeOf(axis, '2020-09-04');
    expect(snapped(axis, known, at, 0.02, 'known')).toBe('2020-09-07');
    expect(snapped(axis, known, at, 0.001, 'known')).toBe('2020-09-04');
  });
});

describe('the words of a life', () => {
  it('give the dates of an event where they differ', () => {
    expect(sentenceOf(event())).toBe('certificate C-1 for R-1 withdrawn (made known on 2020-09-07)');
    const imported = event({ kind: 'issued', madeKnownOn: '2020-04-10', isImported: true });
    expect(sentenceOf(imported)).toBe('certificate C-1 for R-1 issued (imported on 2020-09-07)');
    expect(wordOf(imported)).toBe('issued, imported');
  });

  it('leave out what would lie on a graver word, and keep within the line', () => {
    const events = [
      event({ kind: 'issued' }),
      event({ inForceFrom: '2020-04-14' }),
      event({ inForceFrom: '2020-12-26' }),
    ];
    const words = placedWords(axis, events, 400);
    expect(words.map(({ word }) => word)).toEqual(['withdrawn', 'withdrawn']);
    expect(Math.max(...words.map(({ left }) => left))).toBeLessThanOrEqual(400 - 9 * 6);
    expect(placedWords(axis, events, 0)).toEqual([]);
  });
});
