import { describe, expect, it } from 'vitest';
import { decimalSignOf, matchWeight, readPastedRows, readPastedTable } from './read-paste.ts';

const READER = { unit: 'mg', uUnit: 'mg', decimalMark: '.' } as const;
const rowsOf = (text: string, decimalMark: '.' | ',' = '.') =>
  readPastedRows(readPastedTable(text), { ...READER, decimalMark });

describe('readPastedTable', () => {
  it('takes weight, value, U and k in this order where there is no head', () => {
    const table = readPastedTable('500 g\t-0.012\t0.031\t2\r\n200 g\t+0.004\t0.016\t2\r\n');
    expect(table.columns).toEqual(['weight', 'value', 'U', 'k']);
    expect(table.rows).toHaveLength(2);
  });

  it('takes columns and units from the head, wherever they stand', () => {
    const text = 'No.\tU (k=2) / µg\tRemark\tDeviation (mg)\nTV 0300-01\t31\tclean\t0.087';
    expect(readPastedTable(text)).toMatchObject({
      columns: ['weight', 'U', 'nothing', 'value'],
      units: [null, 'ug', null, 'mg'],
      isCorrection: false,
    });
    expect(rowsOf(text)).toEqual([
      {
        weight: 'TV 0300-01',
        value: { text: '0.087', unit: 'mg' },
        expandedU: { text: '31', unit: 'ug' },
        k: '',
      },
    ]);
  });

  it('notes that a correction was pasted', () => {
    expect(readPastedTable('Weight\tCorrection mg\tU mg\n1 kg\t0.1\t0.2').isCorrection).toBe(true);
  });

  it('splits text set with semicolons, and fills short rows', () => {
    const table = readPastedTable('1 kg;0.1;0.5\n500 g;0.2');
    expect(table.rows).toEqual([
      ['1 kg', '0.1', '0.5'],
      ['500 g', '0.2', ''],
    ]);
  });

  it('makes nothing of nothing', () => {
    expect(readPastedTable(' \n').rows).toEqual([]);
  });
});

describe('readPastedRows', () => {
  it('keeps every digit, zeros included, and a unit in the cell wins', () => {
    const [row] = rowsOf('1 kg\t\u22120.412 180 mg\t25 µg');
    expect(row?.value).toEqual({ text: '-0.412180', unit: 'mg' });
    expect(row?.expandedU).toEqual({ text: '25', unit: 'ug' });
  });

  it('reads a comma by the reader’s own decimal sign', () => {
    expect(rowsOf('1 kg\t0,41218\t0,5', ',')[0]?.value).toEqual({ text: '0.41218', unit: 'mg' });
  });

  it('takes U from behind the plus-minus sign, and refuses digits in brackets as U', () => {
    expect(rowsOf('1 kg\t0.41 ± 0.05 mg')[0]?.expandedU).toEqual({ text: '0.05', unit: 'mg' });
    expect(rowsOf('1 kg\t0.410(25) mg')[0]?.expandedU).toHaveProperty('problem');
  });

  it('says why a cell cannot be read', () => {
    expect(rowsOf('1 kg\tn/a\t0.5')[0]?.value).toMatchObject({
      problem: expect.stringContaining('"n/a"') as unknown,
    });
  });
});

describe('decimalSignOf', () => {
  it.each([
    ['1 kg\t0,12\t0,050', ','],
    ['1 kg\t1,234\t5,678\n500 g\t0,1\t0,05', ','],
    ['1 kg\t1,234\t5,678', 'ambiguous'],
    ['1 kg\t1.234\t5,6', '.'],
    ['1 kg\t1,234,567\t5', '.'],
    ['1 kg\t12\t5\t2,00', null],
    ['200 g\t200,000 016 g\t5', ','],
  ])('of "%s" is %s', (text, sign) => {
    expect(decimalSignOf(readPastedTable(text))).toBe(sign);
  });
});

describe('matchWeight', () => {
  const set = [
    { id: 'a', registryNo: 'TV 0300-01', marking: '500 g', nominal: '500' },
    { id: 'b', registryNo: 'TV 0300-02', marking: '200 g', nominal: '200' },
    { id: 'c', registryNo: 'TV 0300-03', marking: '200 g*', nominal: '200' },
    { id: 'd', registryNo: 'TV 0300-04', marking: 'knob 7', nominal: '100' },
  ];
  it.each([
    ['tv0300-03', 'c'],
    ['200 g', 'b'],
    ['200g ∗', 'c'],
    ['0.5 kg', 'a'],
    ['0,5 kg', 'a'],
    ['100 g', 'd'],
  ])('finds the weight for "%s"', (name, id) => {
    expect(matchWeight(name, set)?.id).toBe(id);
  });

  it('does not choose between equals, nor where nothing fits', () => {
    const twins = [...set, { id: 'e', registryNo: 'TV 0400', marking: '500 g', nominal: '500' }];
    expect(matchWeight('500 g', twins)).toBeNull();
    expect(matchWeight('50 g', set)).toBeNull();
    expect(matchWeight('', set)).toBeNull();
  });
});
