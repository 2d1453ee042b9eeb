import { act, render } from '@testing-library/react';
import { afterEach, describe, expect, it } from 'vitest';
import { setPreferences } from '#src/lib/preferences.ts';
import { Coverage, Quantity } from './quantity.tsx';

const text = (element: HTMLElement): string => element.textContent.replace(/\u2009/g, '_');

afterEach(() => act(() => setPreferences({ decimalMark: '.', uncertainty: 'plus-minus' })));

describe('Quantity', () => {
  it('sets the digits beyond the standard uncertainty in the lightest ink, and no others', () => {
    const { container } = render(
      <Quantity value="1000.000212" expandedUncertainty="0.00008" coverageFactor="2" />,
    );
    expect(text(container)).toBe('1_000.000_212 ± 0.000_080_g');
    const pale = Array.from(container.querySelectorAll('.text-ink-3'), (element) => element.textContent);
    expect(pale).toEqual(['12', '80']);
  });

  it('repeats the unit in the value of record', () => {
    const { container } = render(<Quantity value="1000.000212" expandedUncertainty="0.00008" isOfRecord />);
    expect(text(container)).toBe('1_000.000_212_g ± 0.000_080_g');
  });

  it('follows the reader’s preferences at once', () => {
    const { container } = render(
      <Quantity value="1000.0000123" expandedUncertainty="0.000003" coverageFactor="2" />,
    );
    act(() => setPreferences({ uncertainty: 'concise', decimalMark: ',' }));
    expect(text(container)).toBe('1_000,000_012_3(15)_g');
  });

  it('rounds the value by a U that stands in a column of its own', () => {
    const { container } = render(
      <Quantity
        value="0.00004127"
        expandedUncertainty="0.000045"
        kind="deviation"
        shownIn="ug"
        hidesUncertainty
      />,
    );
    expect(text(container)).toBe('+41_µg');
  });

  it('sets exponents as such', () => {
    const { container } = render(<Quantity value="7998.6" unit="kg/m3" />);
    expect(container.querySelector('sup')?.textContent).toBe('3');
    expect(text(container)).toBe('7_998.6_kg/m3');
  });
});

describe('Coverage', () => {
  it('says what the number beside the value is', () => {
    const { container } = render(<Coverage coverageFactor="2.0" />);
    expect(text(container)).toBe('k = 2.0, 95_%');
    act(() => setPreferences({ uncertainty: 'concise' }));
    expect(text(container)).toBe('standard uncertainty in brackets');
  });
});
