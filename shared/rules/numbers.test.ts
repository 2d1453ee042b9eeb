import { describe, expect, it } from 'vitest';
import { historyFacts, valueFacts } from './example-facts.ts';
import {
  amountText,
  certificateText,
  decimalsOfU,
  expandedUText,
  halfDigit,
  halfDigitOfU,
  isUDecimalsKept,
  percentText,
  printedU,
  statedU,
  uOfDifference,
  valueText,
} from './numbers.ts';

describe('decimals of U', () => {
  it('are those kept, else the fewest that write it', () => {
    expect(decimalsOfU(valueFacts())).toBe(2);
    expect(printedU(valueFacts())).toBe('0.30');
    expect(decimalsOfU(valueFacts({ reportedUDecimals: null }))).toBe(1);
    expect(isUDecimalsKept(valueFacts({ reportedUDecimals: null }))).toBe(false);
    expect(decimalsOfU(valueFacts({ expandedU: null }))).toBeNull();
  });

  it('are not believed where they cannot write U', () => {
    const value = valueFacts({ expandedU: '0.000305', reportedUDecimals: 2 });
    expect(decimalsOfU(value)).toBe(3);
    expect(isUDecimalsKept(value)).toBe(false);
  });

  it('give half a last digit in grams, whatever the unit', () => {
    expect(halfDigitOfU(valueFacts()).toFixed()).toBe('0.000005');
    expect(halfDigit(valueFacts({ reportedUnit: 'kg', reportedDecimals: 9 })).toFixed()).toBe('0.0000005');
    expect(halfDigitOfU(valueFacts({ expandedU: null })).toFixed()).toBe('0.0005');
  });
});

describe('uOfDifference', () => {
  const value = valueFacts();
  it('adds both variances and the rounding of both values, and takes the covariance off', () => {
    const rounding = (2 * 0.000005 ** 2) / 3;
    expect(uOfDifference(value, historyFacts(), null)).toBeCloseTo(
      Math.sqrt(2 * 0.00015 ** 2 + rounding),
      12,
    );
    const covariance = 0.00006 ** 2;
    expect(uOfDifference(value, historyFacts(), covariance)).toBeCloseTo(
      Math.sqrt(2 * 0.00015 ** 2 - 2 * covariance + rounding),
      12,
    );
  });

  it('does not believe a covariance that leaves nothing, and invents no U', () => {
    expect(uOfDifference(value, historyFacts(), 1)).toBe(uOfDifference(value, historyFacts(), 0));
    expect(uOfDifference(value, historyFacts({ expandedU: null }), null)).toBeNull();
    expect(uOfDifference(valueFacts({ k: null }), historyFacts(), null)).toBeNull();
    expect(statedU(valueFacts({ k: null }))).toBeNull();
  });
});

describe('for reading', () => {
  it('writes a result as its certificate does', () => {
    expect(valueText(valueFacts())).toBe('+0.21\u2009mg');
    expect(expandedUText(valueFacts())).toBe('0.30\u2009mg');
    expect(expandedUText(valueFacts({ expandedU: null }))).toBe('not stated');
    expect(certificateText({ certificateNo: 'A', revisionN: 1 })).toBe('A');
    expect(certificateText({ certificateNo: 'A', revisionN: 2 })).toBe('A, revision 2');
  });

  it('writes computed amounts to two significant digits', () => {
    expect(amountText(0.000123456, { reportedUnit: 'mg' })).toBe('0.12\u2009mg');
    expect(amountText(0.12345, { reportedUnit: 'ug' })).toBe('120\u2009000\u2009µg');
    expect(amountText(0, { reportedUnit: 'mg' })).toBe('0\u2009mg');
    expect(percentText(0.256)).toBe('26 %');
  });
});
