import { describe, expect, it } from 'vitest';
import { amountProblem, amountText, readAmount } from './read-amount.ts';

describe('readAmount', () => {
  it('reads a mass with its unit into grams', () => {
    expect(readAmount('20 µg', '.')).toMatchObject({ kind: 'amount', grams: '0.00002' });
    expect(readAmount('-0.02mg', '.')).toMatchObject({ kind: 'amount', grams: '-0.00002' });
    expect(readAmount('0,02 mg', '.')).toMatchObject({ kind: 'amount', grams: '0.00002' });
  });

  it('guesses no unit and takes no other one', () => {
    expect(readAmount('20', '.')).toMatchObject({ kind: 'unreadable', why: expect.stringContaining('unit') });
    expect(readAmount('20 hPa', '.')).toMatchObject({ kind: 'unreadable' });
  });

  it.each([
    ['abc', 'Write a number and its unit, such as 20 µg; received "abc".'],
    ['1e999', 'Write the number without an exponent, such as 20 µg; received "1e999".'],
    ['2e-3 mg', 'Write the number without an exponent, such as 20 µg; received "2e-3 mg".'],
  ])('advises on "%s" what belongs in the field', (typed, why) => {
    expect(readAmount(typed, '.')).toEqual({ kind: 'unreadable', why });
  });

  it('takes neither zero nor an uncertainty beside the amount', () => {
    expect(readAmount('0 mg', '.')).toMatchObject({ kind: 'unreadable' });
    expect(readAmount('1 ± 1 mg', '.')).toMatchObject({ kind: 'unreadable' });
  });

  it('survives the address whatever the decimal sign it was typed with', () => {
    const typed = readAmount('-0,02 mg', ',');
    if (typed.kind !== 'amount') throw new Error('not read');
    expect(readAmount(amountText(typed.shown), '.')).toEqual(typed);
  });
});

describe('amountProblem', () => {
  it('lets a shift go down and an added uncertainty only up', () => {
    expect(amountProblem(readAmount('-1 mg', '.'), 'shift')).toBeUndefined();
    expect(amountProblem(readAmount('-1 mg', '.'), 'raise')).toContain('above zero');
  });

  it('asks for an amount where none was written', () => {
    expect(amountProblem(readAmount(' ', '.'), 'shift')).toContain('20 µg');
  });
});
