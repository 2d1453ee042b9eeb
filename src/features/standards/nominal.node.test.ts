import { describe, expect, it } from 'vitest';
import { nominalText, nominalUnit } from '#shared/numbers/nominal.ts';
import { isGrams, isHeavy, nominalEntry, nominalMarking, readNominal, usualShape } from './nominal.ts';

const grams = (typed: string) => {
  const read = readNominal(typed, '.');
  return read.kind === 'nominal' ? read.grams : read.kind;
};

describe('readNominal', () => {
  it.each([
    ['1 kg', '1000'],
    ['500 mg', '0.5'],
    ['1 000 g', '1000'],
    ['0.05 mg', '0.00005'],
    ['2g', '2'],
    ['50 ug', '0.00005'],
  ])('reads "%s" as %s g', (typed, expected) => {
    expect(grams(typed)).toBe(expected);
  });

  it.each(['500', '1 kg ± 2 mg', '1 kgg', '1 m3', 'kilo', '1,000 kg 3'])(
    'does not guess at "%s"',
    (typed) => {
      expect(grams(typed)).toBe('unreadable');
    },
  );

  it('says what it wants', () => {
    const read = readNominal('500', '.');
    expect(read.kind === 'unreadable' && read.why).toContain('such as 1 kg or 500 mg; received "500"');
  });
});

describe('what a form holds of a nominal', () => {
  it('is grams, or an entry that no schema takes for grams', () => {
    expect(nominalEntry('20 kg', '.')).toBe('20000');
    expect(['20', '20 k', ' 1 kgg '].map((typed) => nominalEntry(typed, '.'))).toEqual([
      '20 ?',
      '20 k',
      '1 kgg',
    ]);
    expect(['20', '20 ?', '0', ''].map(isGrams)).toEqual([true, false, false, false]);
  });
});

describe('a nominal said again', () => {
  it('is in the unit engraved on the weight', () => {
    expect(['0.5', '1', '999', '1000'].map(nominalUnit)).toEqual(['mg', 'g', 'g', 'kg']);
    expect(nominalText('0.002')).toBe('2\u2009mg');
    expect(nominalText('20000')).toBe('20\u2009kg');
    expect(nominalMarking('500')).toBe('500 g');
  });

  it('is read as the same nominal', () => {
    for (const text of ['0.001', '0.5', '1', '200', '1000', '50000']) {
      expect(grams(nominalMarking(text))).toBe(text);
      expect(grams(nominalText(text))).toBe(text);
    }
  });
});

it('proposes a knob from 1 g and calls 10 kg heavy', () => {
  expect(['0.5', '1', '10000'].map((text) => usualShape(text))).toEqual(['wire', 'knob', 'knob']);
  expect(usualShape('0.5', 'sheet')).toBe('sheet');
  expect([isHeavy('9999.9'), isHeavy('10000')]).toEqual([false, true]);
});
