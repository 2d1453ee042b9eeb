import { describe, expect, it } from 'vitest';
import { quantitySpans } from './ink-spans.ts';

const T = '\u2009';

describe('a number in pieces', () => {
  it('parts the digits beyond the standard uncertainty, of the value and of U', () => {
    expect(
      quantitySpans({
        value: '0.0012174',
        expandedUncertainty: '0.000022',
        coverageFactor: '2',
        shownIn: 'mg',
      }),
    ).toEqual([
      { text: '1.2' },
      { text: '17', isBeyond: true },
      { text: ' ± 0.0' },
      { text: `22`, isBeyond: true },
      { text: `${T}mg` },
    ]);
  });

  it('puts the unit after value and U where the value is one of record', () => {
    const spans = quantitySpans(
      { value: '1000.0001', expandedUncertainty: '0.002', coverageFactor: '2' },
      { isOfRecord: true },
    );
    expect(spans.map(({ text }) => text).join('')).toBe(`1${T}000.000${T}1${T}g ± 0.002${T}0${T}g`);
  });

  it('raises exponents, with the minus sign proper', () => {
    expect(quantitySpans({ value: '6.5e-7', unit: 'kg/m3', isScientific: true })).toEqual([
      { text: `6.5${T}×${T}10` },
      { text: '\u22127', isRaised: true },
      { text: `${T}kg/m` },
      { text: '3', isRaised: true },
    ]);
  });

  it('leaves out what it is told to', () => {
    const input = {
      value: '-0.000060',
      expandedUncertainty: '0.00011',
      kind: 'deviation' as const,
      shownIn: 'ug' as const,
    };
    const text = quantitySpans(input, { hidesUncertainty: true, hidesUnit: true }).map((span) => span.text);
    expect(text.join('')).toBe('\u221260');
  });
});
