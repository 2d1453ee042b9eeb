import { describe, expect, it } from 'vitest';
import { Decimal } from '#shared/decimal.ts';
import { requireChoice, requireDecimal, requireNumber } from './domain.ts';

describe('requireNumber', () => {
  it('lets the ends through and nothing beyond them', () => {
    expect(requireNumber(15, 't', { min: 15, max: 27 })).toBe(15);
    expect(requireNumber(27, 't', { min: 15, max: 27 })).toBe(27);
    expect(() => requireNumber(14.99, 't', { min: 15, max: 27, unit: 'degC' })).toThrow(
      't: received 14.99. A number of at least 15 and of at most 27 degC is expected.',
    );
    expect(() => requireNumber(27.01, 't', { min: 15, max: 27 })).toThrow('received 27.01');
  });

  it('keeps the ends out where the domain is open', () => {
    expect(() => requireNumber(0, 'p', { above: 0, below: 1 })).toThrow(
      'p: received 0. A number above 0 and below 1 is expected.',
    );
    expect(() => requireNumber(1, 'p', { above: 0, below: 1 })).toThrow('received 1');
    expect(() => requireNumber(1, 'p', { below: 1 })).toThrow('p: received 1. A number below 1 is expected.');
    expect(requireNumber(0.5, 'p', { above: 0, below: 1 })).toBe(0.5);
  });

  it.each([NaN, Infinity, '5', undefined])('refuses %s as no finite number', (value) => {
    expect(() => requireNumber(value, 'p')).toThrow(
      expect.objectContaining({ code: 'not-finite', field: 'p' }),
    );
  });
});

describe('requireDecimal', () => {
  it('refuses a double and a mass that is not positive', () => {
    expect(() => requireDecimal(1000, 'mass')).toThrow(expect.objectContaining({ code: 'not-finite' }));
    for (const text of ['0', '-1']) {
      expect(() => requireDecimal(new Decimal(text), 'mass', 'positive')).toThrow(
        expect.objectContaining({ code: 'out-of-range', field: 'mass' }),
      );
    }
    expect(requireDecimal(new Decimal(-1), 'deviation').toFixed()).toBe('-1');
  });
});

describe('requireChoice', () => {
  it('names what is allowed', () => {
    expect(() => requireChoice('x', 'kind', ['mass', 'conventional'])).toThrow(
      'kind: received "x". One of mass, conventional is expected.',
    );
  });
});
