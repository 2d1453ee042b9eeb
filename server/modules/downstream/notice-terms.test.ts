import { describe, expect, it } from 'vitest';
import { dayNumber } from './day-number.ts';
import { GraphArrays, type GraphValueRow } from './graph-arrays.ts';
import { noticeTerms } from './notice-terms.ts';
import { graphValue } from './example-graph.ts';

function graphWith(rows: Partial<GraphValueRow>[]): GraphArrays {
  const graph = new GraphArrays();
  rows.forEach((row, at) => graph.addValue(graphValue(at + 1, { issuerId: 'institute', ...row })));
  return graph;
}
const NOTICE = {
  kind: 'notice' as const,
  issuerId: 'institute',
  shiftPerKilogram: [{ on: '2003-01-01', shift: '0' }],
  addedUPerKilogram: 0.00001,
};
const performed = (day: string) => ({ performedDay: dayNumber(day) });

describe('noticeTerms', () => {
  it('expresses a correction that runs linearly with the day of calibration', () => {
    // The maintained unit found 35 ug off in 2014: corrections from about -4 ug (calibrations of 2003) to -35 ug
    // (2013); BIPM notes of 2015, second-hand.
    const graph = graphWith([performed('2000-05-01'), performed('2008-01-01'), performed('2016-05-01')]);
    const terms = noticeTerms(graph, [0, 1, 2], {
      ...NOTICE,
      shiftPerKilogram: [
        { on: '2003-01-01', shift: '-0.000004' },
        { on: '2013-01-01', shift: '-0.000035' },
      ],
    });
    expect(terms.map((term) => term.shift * 1e6)).toEqual([
      -4,
      expect.closeTo(-4 - 31 * (1826 / 3653), 9),
      -35,
    ]);
  });

  it('goes with mass, in shift and in sensitivity to its one effect', () => {
    // 26th CGPM: values unchanged at the redefinition, 10 ug at 1 kg added to earlier certificates.
    const graph = graphWith([{ nominal: '1000' }, { nominal: '200' }]);
    const notice = { ...NOTICE, shiftPerKilogram: [{ on: '2021-02-01', shift: '-0.000002' }] };
    expect(noticeTerms(graph, [0, 1], notice)).toEqual([
      { node: 0, shift: -2e-6, sensitivity: 1 },
      { node: 1, shift: expect.closeTo(-4e-7, 18), sensitivity: 0.2 },
    ]);
  });

  it('covers what it names and nothing else', () => {
    const graph = graphWith([
      performed('2019-05-19'),
      performed('2019-05-20'),
      { ...performed('2019-01-01'), issuerId: 'another' },
      { ...performed('2019-01-01'), quantity: 'mass' },
      { ...performed('2019-01-01'), nominal: '100' },
    ]);
    const covered = noticeTerms(graph, [0, 1, 2, 3, 4], {
      ...NOTICE,
      quantity: 'conventional mass',
      performedTo: '2019-05-19',
      nominalFrom: '1000',
    });
    expect(covered.map((term) => term.node)).toEqual([0]);
  });
});
