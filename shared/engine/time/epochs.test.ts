import { describe, expect, it } from 'vitest';
import { type Dated, splitByEpochs } from './epochs.ts';

const on = (...dates: string[]): Dated[] => dates.map((date) => ({ date }));
const dates = (entries: Dated[]) => entries.map(({ date }) => date);

describe('splitByEpochs', () => {
  it('keeps one epoch without interventions', () => {
    expect(splitByEpochs(on('2020-01-01', '2019-01-01'), [])).toEqual({
      epochs: [on('2020-01-01', '2019-01-01')],
      undetermined: [],
    });
  });

  it('puts the last good day before, the first bad day after and what lies between nowhere', () => {
    const { epochs, undetermined } = splitByEpochs(
      on('2019-12-31', '2020-01-01', '2020-03-01', '2020-06-01', '2021-01-01'),
      [{ lastGood: '2020-01-01', firstBad: '2020-06-01' }],
    );
    expect(epochs.map(dates)).toEqual([['2019-12-31', '2020-01-01'], ['2020-06-01', '2021-01-01']]); // prettier-ignore
    expect(dates(undetermined)).toEqual(['2020-03-01']);
  });

  it('lets the condition decide on the day of an adjustment', () => {
    const adjusted = [{ lastGood: '2020-01-01', firstBad: '2020-01-01' }];
    const day = (condition?: Dated['condition']): Dated => ({ date: '2020-01-01', condition });
    const { epochs, undetermined } = splitByEpochs([day('as-left'), day('as-found'), day()], adjusted);
    expect(epochs).toEqual([[day('as-found')], [day('as-left')]]);
    expect(undetermined).toEqual([day()]);
  });

  it('takes interventions in any order and leaves empty epochs empty', () => {
    const { epochs } = splitByEpochs(on('2018-01-01', '2023-01-01'), [
      { lastGood: '2022-01-01', firstBad: '2022-02-01' },
      { lastGood: '2020-01-01', firstBad: '2020-01-01' },
    ]);
    expect(epochs.map(dates)).toEqual([['2018-01-01'], [], ['2023-01-01']]);
  });

  it('does not change what it was given', () => {
    const interventions = [
      { lastGood: '2022-01-01', firstBad: '2022-02-01' },
      { lastGood: '2020-01-01', firstBad: '2020-01-01' },
    ];
    const before = structuredClone(interventions);
    splitByEpochs(on('2018-01-01'), interventions);
    expect(interventions).toEqual(before);
  });

  it('refuses interventions that run backwards or overlap', () => {
    expect(() => splitByEpochs([], [{ lastGood: '2020-02-01', firstBad: '2020-01-01' }])).toThrow(
      expect.objectContaining({ code: 'backwards', field: 'interventions[0]' }),
    );
    const overlapping = [
      { lastGood: '2020-01-01', firstBad: '2020-06-01' },
      { lastGood: '2020-05-01', firstBad: '2020-07-01' },
    ];
    expect(() => splitByEpochs([], overlapping)).toThrow(
      expect.objectContaining({ code: 'overlapping-interventions' }),
    );
    expect(() => splitByEpochs(on('2020'), [])).toThrow(
      expect.objectContaining({ code: 'not-a-date', field: 'history[0].date' }),
    );
    expect(() => splitByEpochs([], [{ lastGood: '', firstBad: '2020-01-01' }])).toThrow(
      expect.objectContaining({ code: 'not-a-date', field: 'interventions[0].lastGood' }),
    );
  });
});
