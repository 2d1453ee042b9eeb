import { describe, expect, it } from 'vitest';
import { stateAt } from '#shared/state-at.ts';
import { dayNumber, yearOf } from './day-number.ts';
import { GraphArrays } from './graph-arrays.ts';
import { inForceOn } from './in-force-on.ts';
import { graphValue } from './example-graph.ts';

const DAYS = ['2025-01-14', '2025-01-15', '2025-02-01', '2025-03-14', '2025-03-15', '2025-03-16'];
const ENDS = [
  { name: 'no end', ends: [] },
  { name: 'withdrawn back-dated', ends: [{ kind: 'withdrawn' as const, effectiveOn: '2025-02-01' }] },
  { name: 'superseded later', ends: [{ kind: 'superseded' as const, effectiveOn: '2025-03-16' }] },
  {
    name: 'both',
    ends: [
      { kind: 'superseded' as const, effectiveOn: '2025-03-16' },
      { kind: 'withdrawn' as const, effectiveOn: '2025-02-01' },
    ],
  },
];

describe('inForceOn', () => {
  it.each(ENDS)('is stateAt on every pair of days: $name', ({ ends }) => {
    const recordedAt = '2025-01-15T23:59:59.999999Z';
    const recorded = ends.map((end) => ({ ...end, recordedAt: '2025-03-15T00:00:00.000000Z' }));
    const graph = new GraphArrays();
    graph.addValue(
      graphValue(7, { effectiveDay: dayNumber('2025-01-15'), recordedDay: dayNumber('2025-01-15') }),
    );
    for (const end of recorded) {
      graph.addEnd({
        valueId: 7,
        effectiveDay: dayNumber(end.effectiveOn),
        recordedDay: dayNumber('2025-03-15'),
      });
    }
    for (const day of DAYS) {
      for (const known of DAYS) {
        const { state } = stateAt({ effectiveFrom: '2025-01-15', recordedAt }, recorded, day, known);
        expect([day, known, inForceOn(graph, 0, dayNumber(day), dayNumber(known))]).toEqual([
          day,
          known,
          state === 'in force',
        ]);
      }
    }
  });
});

describe('dayNumber', () => {
  it('numbers days as TO_DAYS does, and gives their year back', () => {
    // MariaDB manual, TO_DAYS: '2007-10-07' is 733321.
    expect(dayNumber('2007-10-07')).toBe(733_321);
    expect(yearOf(dayNumber('1889-09-28'))).toBe(1889);
    expect(yearOf(dayNumber('2024-12-31'))).toBe(2024);
  });
});
