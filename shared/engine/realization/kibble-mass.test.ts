import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Decimal } from '#shared/decimal.ts';
import {
  ELEMENTARY_CHARGE,
  JOSEPHSON_CONSTANT,
  PLANCK_CONSTANT,
  VON_KLITZING_CONSTANT,
} from './constants.ts';
import { kibbleMass, type KibbleRun, type KibbleUncertainties } from './kibble-mass.ts';

/** Decimal arithmetic on numbers of at most 17 digits: a closed loop is right to a double's rounding. */
const LOOP = 1e-14;

/** A run in round figures, about what 1 kg asks for: 1 V on both sides, 2 mm/s. */
const run: KibbleRun = {
  weighing: { junctions: 20000, frequency: 24e9 },
  moving: { junctions: 20000, frequency: 24e9 },
  resistance: { plateau: 2, ratio: 0.0077 },
  velocity: 0.002,
  gravity: 9.81,
};
const none: KibbleUncertainties = { velocity: 0, gravity: 0 };

describe('exact constants', () => {
  it('agree with the printed values of the electrical constants', () => {
    // CODATA 2018 listing, seen in a reproduction; the printed digits are cut off, not rounded:
    // 483 597.848 4... GHz/V, 25 812.807 45... ohm, 2.067 833 848... e-15 Wb.
    expect(JOSEPHSON_CONSTANT.div(1e9).toFixed(4, Decimal.ROUND_DOWN)).toBe('483597.8484');
    expect(VON_KLITZING_CONSTANT.toFixed(5, Decimal.ROUND_DOWN)).toBe('25812.80745');
    const fluxQuantum = PLANCK_CONSTANT.div(ELEMENTARY_CHARGE.times(2));
    expect(fluxQuantum.times(1e15).toFixed(9, Decimal.ROUND_DOWN)).toBe('2.067833848');
  });
});

describe('kibbleMass', () => {
  it('closes the loop: the frequency that 1 kg would need gives 1 kg back', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 500, max: 5000 }),
        fc.integer({ min: 97800, max: 98400 }),
        fc.integer({ min: 1, max: 6 }),
        (micrometres, centigal, plateau) => {
          const velocity = micrometres / 1e6;
          const gravity = centigal / 1e4;
          // m g v = U I = U2 U1 / R, solved for the weighing voltage by way of volts, ohms and 2e/h.
          const movingVolts = new Decimal(run.moving.junctions)
            .times(run.moving.frequency)
            .div(JOSEPHSON_CONSTANT);
          const ohms = VON_KLITZING_CONSTANT.div(plateau).times(run.resistance.ratio);
          const weighingVolts = new Decimal(gravity).times(velocity).times(ohms).div(movingVolts);
          const frequency = weighingVolts.times(JOSEPHSON_CONSTANT).div(run.weighing.junctions).toNumber();
          const { mass } = kibbleMass(
            {
              ...run,
              weighing: { ...run.weighing, frequency },
              resistance: { ...run.resistance, plateau },
              velocity,
              gravity,
            },
            none,
          );
          expect(Math.abs(mass.minus(1).toNumber())).toBeLessThan(LOOP);
        },
      ),
    );
  });

  it('has the sensitivities of its own formula', () => {
    const full: KibbleRun = {
      ...run,
      corrections: {
        alignment: { relative: 2e-8, standardUncertainty: 1e-9 },
        magnetNonLinearity: { relative: -3e-8, standardUncertainty: 1e-9 },
        airIndex: { refractiveIndex: 1.00027, standardUncertainty: 1e-8 },
        gravityGradient: {
          gradient: -3.1e-6,
          gradientUncertainty: 1e-8,
          height: 0.45,
          heightUncertainty: 1e-3,
        },
      },
    };
    const { mass, budget } = kibbleMass(full, none);
    const moved: [string, (delta: number) => KibbleRun, number][] = [
      [
        'frequency of the weighing voltage',
        (d) => ({ ...full, weighing: { ...full.weighing, frequency: 24e9 + d } }),
        1e4,
      ],
      [
        'frequency of the moving voltage',
        (d) => ({ ...full, moving: { ...full.moving, frequency: 24e9 + d } }),
        1e4,
      ],
      ['resistance ratio', (d) => ({ ...full, resistance: { plateau: 2, ratio: 0.0077 + d } }), 1e-9],
      ['velocity', (d) => ({ ...full, velocity: 0.002 + d }), 1e-9],
      ['acceleration of free fall', (d) => ({ ...full, gravity: 9.81 + d }), 1e-6],
      [
        'alignment',
        (d) => withCorrection(full, 'alignment', { relative: 2e-8 + d, standardUncertainty: 0 }),
        1e-8,
      ],
      ['non-linearity of the magnet', (d) => withCorrection(full, 'magnetNonLinearity', { relative: -3e-8 + d, standardUncertainty: 0 }), 1e-8], // prettier-ignore
      ['refractive index of the air', (d) => withCorrection(full, 'airIndex', { refractiveIndex: 1.00027 + d, standardUncertainty: 0 }), 1e-8], // prettier-ignore
      ['vertical gradient of free fall', (d) => withGradient(full, -3.1e-6 + d, 0.45), 1e-8],
      ['height of the weight', (d) => withGradient(full, -3.1e-6, 0.45 + d), 1e-3],
    ];
    expect(budget.map(({ name }) => name)).toEqual(moved.map(([name]) => name));
    moved.forEach(([name, change, delta]) => {
      const slope = kibbleMass(change(delta), none).mass.minus(mass).div(delta).toNumber();
      const line = budget.find((candidate) => candidate.name === name);
      expect(line?.sensitivity, name).toBeDefined();
      expect(Math.abs((line?.sensitivity ?? 0) / slope - 1), name).toBeLessThan(2e-6);
    });
  });

  it('applies each correction with its sign', () => {
    const plain = kibbleMass(run, none).mass;
    const ratio = (changed: KibbleRun) => kibbleMass(changed, none).mass.div(plain).toNumber();
    expect(ratio(withCorrection(run, 'alignment', { relative: 1e-6, standardUncertainty: 0 }))).toBeCloseTo(
      1.000001,
      14,
    );
    expect(
      ratio(withCorrection(run, 'airIndex', { refractiveIndex: 1.00027, standardUncertainty: 0 })),
    ).toBeCloseTo(1.00027, 14);
    // 0.3 m above the point where g holds it is smaller by 0.93e-6 m/s2, so the same force holds more mass.
    expect(ratio(withGradient(run, -3.1e-6, 0.3))).toBeCloseTo(1 + 0.93e-6 / 9.81, 12);
  });

  it('adds the contributions in quadrature', () => {
    const { mass, standardUncertainty, budget } = kibbleMass(
      { ...run, corrections: { alignment: { relative: 0, standardUncertainty: 4e-9 } } },
      {
        velocity: 0.002 * 3e-9,
        gravity: 9.81 * 12e-9,
        weighing: { frequency: 0 },
        moving: {},
        resistance: { ratio: 0.0077 * 84e-9 },
      },
    );
    expect(standardUncertainty / mass.toNumber()).toBeCloseTo(Math.hypot(3e-9, 12e-9, 4e-9, 84e-9), 18);
    expect(budget.find(({ name }) => name === 'velocity')?.contribution).toBeCloseTo(
      -mass.toNumber() * 3e-9,
      16,
    );
  });

  it.each<[string, KibbleRun, string, string]>([
    [
      'half a junction',
      { ...run, weighing: { junctions: 1.5, frequency: 1e9 } },
      'not-whole',
      'weighing.junctions',
    ],
    ['no junction', { ...run, moving: { junctions: 0, frequency: 1e9 } }, 'out-of-range', 'moving.junctions'],
    ['no frequency', { ...run, moving: { junctions: 1, frequency: 0 } }, 'out-of-range', 'moving.frequency'],
    ['no plateau', { ...run, resistance: { plateau: 0, ratio: 1 } }, 'out-of-range', 'resistance.plateau'],
    ['no ratio', { ...run, resistance: { plateau: 2, ratio: 0 } }, 'out-of-range', 'resistance.ratio'],
    ['no velocity', { ...run, velocity: 0 }, 'out-of-range', 'velocity'],
    ['no gravity', { ...run, gravity: Number.NaN }, 'not-finite', 'gravity'],
    ['a correction that eats the mass', withCorrection(run, 'alignment', { relative: -1, standardUncertainty: 0 }), 'out-of-range', 'corrections.alignment.relative'], // prettier-ignore
    ['an index below vacuum', withCorrection(run, 'airIndex', { refractiveIndex: 0.99, standardUncertainty: 0 }), 'out-of-range', 'corrections.airIndex.refractiveIndex'], // prettier-ignore
    [
      'a gradient of another planet',
      withGradient(run, 1, 1),
      'out-of-range',
      'corrections.gravityGradient.gradient',
    ],
    ['a mountain', withGradient(run, -3e-6, 4000), 'out-of-range', 'corrections.gravityGradient.height'],
    ['a negative uncertainty', withCorrection(run, 'alignment', { relative: 0, standardUncertainty: -1 }), 'out-of-range', 'corrections.alignment.standardUncertainty'], // prettier-ignore
  ])('refuses %s', (_, input, code, field) => {
    expect(() => kibbleMass(input, none)).toThrow(expect.objectContaining({ code, field }));
  });

  it('refuses an uncertainty that is none', () => {
    expect(() => kibbleMass(run, { velocity: -1, gravity: 0 })).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'u.velocity' }),
    );
    expect(() => kibbleMass(run, { ...none, resistance: { ratio: Number.NaN } })).toThrow(
      expect.objectContaining({ code: 'not-finite', field: 'u.resistance.ratio' }),
    );
  });
});

function withCorrection(
  base: KibbleRun,
  name: 'alignment' | 'magnetNonLinearity' | 'airIndex',
  correction: object,
): KibbleRun {
  return { ...base, corrections: { ...base.corrections, [name]: correction } };
}

function withGradient(base: KibbleRun, gradient: number, height: number): KibbleRun {
  const gravityGradient = { gradient, gradientUncertainty: 0, height, heightUncertainty: 0 };
  return { ...base, corrections: { ...base.corrections, gravityGradient } };
}
