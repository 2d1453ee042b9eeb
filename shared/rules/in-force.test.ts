import { describe, expect, it } from 'vitest';
import type { EndFacts, RecognitionFacts } from './facts.ts';
import { periodOf } from './days.ts';
import { endingOf, knownBefore, recognitionOn, recognitionOver, rowInForce } from './in-force.ts';

function row(validFrom: string, validTo: string | null, recordedOn: string, what: string) {
  return { validFrom, validTo, recordedAt: `${recordedOn}T12:00:00.000000Z`, what };
}

describe('rowInForce', () => {
  it('takes the latest recorded of the rows that cover the day', () => {
    const rows = [
      row('2020-01-01', null, '2020-01-01', 'first'),
      row('2022-01-01', null, '2022-01-01', 'second'),
    ];
    expect(rowInForce(rows, '2021-06-01', '2023-01-01')?.what).toBe('first');
    expect(rowInForce(rows, '2022-06-01', '2023-01-01')?.what).toBe('second');
    expect(rowInForce(rows, '2019-06-01', '2023-01-01')).toBeNull();
  });

  it('does not let a change entered later reach back into what was known', () => {
    const rows = [
      row('2020-01-01', null, '2020-01-01', 'granted'),
      row('2021-01-01', null, '2023-05-01', 'back-dated'),
    ];
    expect(rowInForce(rows, '2021-06-01', '2021-06-01')?.what).toBe('granted');
    expect(rowInForce(rows, '2021-06-01', '2023-06-01')?.what).toBe('back-dated');
  });

  it('counts history entered later as it was first entered', () => {
    const rows = [
      row('2010-01-01', null, '2025-01-10', 'granted'),
      row('2018-01-01', '2018-12-31', '2025-01-10', 'suspended'),
      row('2010-01-01', null, '2025-09-01', 'changed afterwards'),
    ];
    expect(rowInForce(rows, '2018-06-01', '2018-06-01')?.what).toBe('suspended');
    expect(rowInForce(rows, '2017-06-01', '2017-06-01')?.what).toBe('granted');
  });
});

describe('recognitionOn', () => {
  const granted: RecognitionFacts = {
    kind: 'accreditation',
    body: 'A',
    number: '1',
    arrangement: 'the arrangement',
    state: 'granted',
    validFrom: '2015-01-01',
    validTo: '2019-12-31',
    recordedAt: '2015-01-01T00:00:00.000000Z',
  };
  const suspended: RecognitionFacts = { ...granted, state: 'suspended', validFrom: '2018-01-01' };
  suspended.recordedAt = '2018-01-01T00:00:00.000000Z';

  it('judges each recognition by its own rows, and takes the best', () => {
    expect(recognitionOn([granted, suspended], '2017-01-01', '2020-01-01').state).toBe('granted');
    expect(recognitionOn([granted, suspended], '2018-06-01', '2020-01-01').state).toBe('suspended');
    expect(
      recognitionOn([suspended, { ...granted, number: '2' }], '2018-06-01', '2020-01-01').row?.number,
    ).toBe('2');
    expect(recognitionOn([granted], '2021-01-01', '2021-01-01')).toEqual({
      state: 'not recorded',
      row: null,
    });
  });

  it('is open over a period in which it changed', () => {
    expect(recognitionOver([granted], periodOf('2015-06-01', 'year'))?.state).toBe('granted');
    expect(recognitionOver([granted, suspended], periodOf('2018-01-01', 'year'))?.state).toBe('suspended');
    expect(
      recognitionOver([{ ...granted, validTo: '2016-06-30' }], periodOf('2016-01-01', 'year')),
    ).toBeNull();
  });
});

describe('endingOf', () => {
  const end = (changes: Partial<EndFacts>): EndFacts => ({
    kind: 'superseded',
    effectiveOn: '2024-05-01',
    madeKnownOn: '2024-05-01',
    recordedAt: '2024-05-01T00:00:00.000000Z',
    changed: 'text',
    replacedBy: null,
    ...changes,
  });
  const any = () => true;

  it('lets a withdrawal speak louder than a supersession', () => {
    expect(endingOf([end({ changed: 'value' }), end({ kind: 'withdrawn' })], any)?.how).toBe('withdrawn');
  });

  it('follows a re-issue in words only to what became of it', () => {
    const next = { uid: 'b', certificateNo: 'N', revisionN: 2, ends: [end({ changed: 'value' })] };
    expect(endingOf([end({ replacedBy: { ...next, ends: [] } })], any)?.how).toBe('unchanged');
    expect(endingOf([end({ replacedBy: next })], any)?.how).toBe('changed');
    expect(endingOf([end({})], any)?.how).toBe('unchanged');
    expect(endingOf([], any)).toBeNull();
  });

  it('counts an end only once in effect and made known, and not on the day itself', () => {
    expect(knownBefore('2024-05-02')(end({}))).toBe(true);
    expect(knownBefore('2024-05-01')(end({}))).toBe(false);
    expect(knownBefore('2024-06-01')(end({ madeKnownOn: '2024-07-01' }))).toBe(false);
  });
});
