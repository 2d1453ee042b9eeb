import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Decimal } from '#shared/decimal.ts';
import { conventionalMass, massFromConventional } from './conventional-mass.ts';

describe('conventionalMass', () => {
  it.each([
    // D28-formula. OIML D 28:2004, clauses 4 and 5, formula read in a reproduction; recomputed, 1e-12.
    [2700, -0.0002944886],
    [7840, -3.061684e-6],
    [7950, -9.435378e-7],
    [8000, 0],
    [8400, 7.143929e-6],
    [21450, 9.407005e-5],
    [21500, 9.420018e-5],
  ])('D28-formula: density %s kg/m3', (density, expected) => {
    const relative = conventionalMass({ mass: new Decimal(1000), density })
      .div(1000)
      .minus(1)
      .toNumber();
    // The check prints seven significant digits.
    expect(Math.abs(relative - expected)).toBeLessThanOrEqual(1e-12 + Math.abs(expected) * 1e-6);
  });

  it('is the mass itself, to the last digit, at 8000 kg/m3', () => {
    const mass = new Decimal('1000.000000123456789');
    expect(conventionalMass({ mass, density: 8000 }).toFixed()).toBe(mass.toFixed());
  });

  it('agrees with the published anchors: about -3e-4 for aluminium, +1e-4 for platinum', () => {
    // Quoted from OIML D 28 by a third party (second-hand), one digit.
    const relative = (density: number) =>
      conventionalMass({ mass: new Decimal(1), density })
        .minus(1)
        .toNumber();
    expect(Math.round(relative(2700) * 1e4)).toBe(-3);
    expect(Math.round(relative(21500) * 1e4)).toBe(1);
  });

  it('there and back gives every digit', () => {
    fc.assert(
      fc.property(
        fc.bigInt({ min: 1n, max: 10n ** 24n }),
        fc.double({ min: 100, max: 30_000, noNaN: true }),
        (digits, density) => {
          const mass = new Decimal(digits.toString()).times('1e-18');
          const back = massFromConventional({
            conventionalMass: conventionalMass({ mass, density }),
            density,
          });
          expect(back.div(mass).minus(1).abs().lt('1e-50')).toBe(true);
        },
      ),
    );
  });

  it('scales with the mass', () => {
    const once = conventionalMass({ mass: new Decimal('123.456'), density: 7840 });
    const thrice = conventionalMass({ mass: new Decimal('370.368'), density: 7840 });
    expect(thrice.minus(once.times(3)).abs().lt('1e-50')).toBe(true);
  });

  it('refuses a density in g/cm3, a mass of zero and a double', () => {
    expect(() => conventionalMass({ mass: new Decimal(1), density: 8 })).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'density' }),
    );
    expect(() => conventionalMass({ mass: new Decimal(1), density: 30_001 })).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'density' }),
    );
    expect(() => conventionalMass({ mass: new Decimal(0), density: 8000 })).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'mass' }),
    );
    expect(() => massFromConventional({ conventionalMass: 5 as unknown as Decimal, density: 8000 })).toThrow(
      expect.objectContaining({ code: 'not-finite', field: 'conventionalMass' }),
    );
  });
});
