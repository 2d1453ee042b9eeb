import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Decimal } from '#shared/decimal.ts';
import { classConformity, type DecisionRule } from './class-conformity.ts';
import { maximumPermissibleError } from './maximum-permissible-error.ts';
import type { WeightClass } from './r111-2004.ts';

const judge = (
  weightClass: WeightClass,
  nominal: string,
  deviation: string,
  expandedUncertainty: number,
  decisionRule?: DecisionRule,
  uncertaintyDecimals?: number,
) =>
  classConformity({
    class: weightClass,
    nominal: new Decimal(nominal),
    deviation: new Decimal(deviation),
    expandedUncertainty,
    decisionRule,
    uncertaintyDecimals,
  });

describe('classConformity: U <= MPE/3', () => {
  it.each([
    // R111-5.2. OIML R 111-1:2004, 5.2, second-hand: exact ratios, so the tolerance is a double's noise.
    ['E1' as const, '1000', 0.16666666666666666],
    ['F1' as const, '100', 0.16666666666666666],
    ['M1' as const, '20000', 333.3333333333333],
  ])('R111-5.2: %s %s g allows %s mg and not 1 % more', (weightClass, nominal, limit) => {
    expect(judge(weightClass, nominal, '0', limit).uncertaintyAllowed).toBe(true);
    expect(judge(weightClass, nominal, '0', limit * 1.01).uncertaintyAllowed).toBe(false);
    expect(maximumPermissibleError(weightClass, new Decimal(nominal))?.div(3).toNumber()).toBeCloseTo(
      limit,
      9,
    );
  });

  it('J106-8.2.3: U of a third gives a capability index of 3 and is allowed', () => {
    // JCGM 106:2012, 8.2.3 and 7.6.5, read in the document. Exact: 1 g of M1 has a limit of 1 mg.
    expect(judge('M1', '1', '0', 1 / 3, 'simple').uncertaintyAllowed).toBe(true);
    expect(judge('M1', '1', '1', 1 / 3, 'simple').conforms).toBe(true);
    expect(judge('M1', '1', '1.0001', 1 / 3, 'simple').conforms).toBe(false);
  });

  it('takes a printed 0.17 mg as 0.1666 mg rounded, and no more than that', () => {
    expect(judge('E1', '1000', '0', 0.17).uncertaintyAllowed).toBe('within rounding');
    expect(judge('E1', '1000', '0', 0.18).uncertaintyAllowed).toBe(false);
    expect(judge('E1', '1000', '0', 0.16).uncertaintyAllowed).toBe(true);
  });

  it('knows that a printed 0.170 mg is above the limit when told its decimals', () => {
    expect(judge('E1', '1000', '0', 0.17, 'guarded', 3).uncertaintyAllowed).toBe(false);
  });

  it('holds an unrounded number against the exact limit', () => {
    expect(judge('E1', '1000', '0', 0.17000000000000004).uncertaintyAllowed).toBe(false);
    // 5/3 as a double lies above the exact third.
    expect(judge('F1', '1000', '0', 5 / 3).uncertaintyAllowed).toBe(true);
  });
});

describe('classConformity: the decision', () => {
  it.each([
    // R111-5.3. OIML R 111-1:2004, 5.3.1, equation 5.3-1, from memory: E1 1 kg, U = 0.166 666 7 mg.
    ['0.3', true],
    ['0.33', true],
    ['0.34', false],
    ['-0.33', true],
    ['-0.34', false],
  ])('R111-5.3: a deviation of %s mg, guarded: %s', (deviation, conforms) => {
    expect(judge('E1', '1000', deviation, 0.1666667).conforms).toBe(conforms);
  });

  it('includes the limit itself, to the last digit', () => {
    expect(judge('E1', '1000', '0.37', 0.13).conforms).toBe(true);
    expect(judge('E1', '1000', '0.370000000001', 0.13).conforms).toBe(false);
    expect(judge('E1', '1000', '0.5', 0.13, 'simple').conforms).toBe(true);
    expect(judge('E1', '1000', '-0.500000000001', 0.13, 'simple').conforms).toBe(false);
  });

  it('shows where the two rules disagree, and names the one applied', () => {
    const guarded = judge('E1', '1000', '0.45', 0.1);
    const simple = judge('E1', '1000', '0.45', 0.1, 'simple');
    expect([guarded.conforms, simple.conforms]).toEqual([false, true]);
    expect(guarded.rule).toContain('R 111-1:2004, 5.3.1');
    expect(simple.rule).toContain('JCGM 106:2012, 8.2.3');
  });

  it('accepts nothing by the simple rule with too large an uncertainty, save rounding', () => {
    expect(judge('E1', '1000', '0', 0.3, 'simple').conforms).toBe(false);
    expect(judge('E1', '1000', '0', 0.17, 'simple').conforms).toBe(true);
  });

  it('says nothing where the class is not defined', () => {
    expect(judge('M3', '0.5', '0', 0.1)).toMatchObject({
      conforms: null,
      mpe: null,
      uncertaintyAllowed: false,
    });
  });

  it('what the guarded rule accepts with an allowed uncertainty, the simple one accepts too', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -0.8, max: 0.8, noNaN: true }),
        fc.double({ min: 0, max: 0.16, noNaN: true }),
        (deviation, u) => {
          const text = deviation.toFixed(6);
          if (judge('E1', '1000', text, u).conforms !== true) return;
          expect(judge('E1', '1000', text, u, 'simple').conforms).toBe(true);
        },
      ),
    );
  });

  it('the sign of the deviation does not matter', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 800 }), (thousandths) => {
        const text = (thousandths / 1000).toFixed(3);
        expect(judge('E1', '1000', `-${text}`, 0.1)).toEqual(judge('E1', '1000', text, 0.1));
      }),
    );
  });

  it('names the argument that is outside its domain', () => {
    expect(() => judge('E1', '1000', '0', -0.1)).toThrow(
      expect.objectContaining({ code: 'out-of-range', field: 'expandedUncertainty' }),
    );
    expect(() => judge('E1', '1000', 'NaN', 0.1)).toThrow(
      expect.objectContaining({ code: 'not-finite', field: 'deviation' }),
    );
    expect(() => judge('E1', '1000', '0', 0.1, 'lenient' as 'simple')).toThrow(
      expect.objectContaining({ code: 'unknown-choice', field: 'decisionRule' }),
    );
  });
});
