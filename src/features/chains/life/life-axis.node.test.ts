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

describe('the axis of a life', () => {
  it('begins before the first event and ends at the last day that something counts from', () => {
    expect(axis).toEqual({ from: '2020-01-02', to: '2020-12-26', today: '2020-12-01' });
    expect([placeOf(axis, '2019-01-01'), placeOf(axis, '2020-01-02'), placeOf(axis, '2020-12-26')]).toEqual([
      0, 0, 1,
    ]);
  });

  it('finds the day of a place, and never a day of knowledge after today', () => {
    expect(dayAt(axis, 0.5, 'day')).toBe('2020-06-30');
    expect(dayAt(axis, 7, 'day')).toBe('2020-12-26');
    expect(dayAt(axis, 7, 'known')).toBe('2020-12-01');
    expect(daysLater(axis, '2020-12-01', 1, 'known')).toBe('2020-12-01');
    expect(daysLater(axis, '2020-12-01', 1, 'day')).toBe('2020-12-02');
  });

  it('stops at each event by the clock: when it counts, or when it was recorded', () => {
    expect(stopsOf(axis, [event()], 'day')).toEqual(['2020-01-02', '2020-04-10', '2020-12-01', '2020-12-26']);
    const known = stopsOf(axis, [event()], 'known');
    expect(known).toEqual(['2020-01-02', '2020-09-07', '2020-12-01']);
    expect(nextStop(known, '2020-12-01', -1)).toBe('2020-09-07');
    expect(nextStop(known, '2020-09-07', 1)).toBe('2020-12-01');
    expect(nextStop(known, '2020-12-01', 1)).toBe('2020-12-01');
    expect(snapped(known, '2020-09-04', 3)).toBe('2020-09-07');
    expect(snapped(known, '2020-09-03', 3)).toBe('2020-09-03');
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
