import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Decimal } from '#shared/decimal.ts';
import { classConformity } from '#shared/engine/conformity/class-conformity.ts';
import { judgeClassOf } from './class-verdict.ts';
import { GraphArrays, type GraphValueRow } from './graph-arrays.ts';
import { graphValue } from './example-graph.ts';

function verdict(changes: Partial<GraphValueRow>, shift = 0, addedVariance = 0) {
  const graph = new GraphArrays();
  graph.addValue(graphValue(1, changes));
  return judgeClassOf(graph)(0, shift, addedVariance);
}

describe('judgeClassOf', () => {
  it('is what classConformity gives, by either rule, for weights near and far from their limits', () => {
    fc.assert(
      fc.property(
        fc.constantFrom('guarded' as const, 'simple' as const),
        fc.integer({ min: -2000, max: 2000 }),
        fc.integer({ min: 1, max: 700 }),
        fc.integer({ min: -500, max: 500 }),
        (decisionRule, deviation, expandedU, shift) => {
          // Thousandths of a milligram at 1 kg of class E2, whose limit is 1.6 mg.
          const found = verdict(
            {
              decisionRule,
              deviation: deviation / 1e6,
              expandedU: expandedU / 1e6,
              u: expandedU / 2e6,
              uPlace: -6,
            },
            shift / 1e6,
          );
          const engine = classConformity({
            class: 'E2',
            nominal: new Decimal(1000),
            deviation: new Decimal(deviation + shift).div(1000),
            expandedUncertainty: expandedU / 1000,
            decisionRule,
            uncertaintyDecimals: 3,
          });
          const keeps = engine.conforms === true && engine.uncertaintyAllowed !== false;
          expect(found).toBe(keeps ? 'keeps' : 'does not keep');
        },
      ),
      { numRuns: 400 },
    );
  });

  it('includes the limit itself to the last digit', () => {
    const onLimit = { deviation: 0.0011, expandedU: 0.0005, u: 0.00025 };
    expect(verdict(onLimit)).toBe('keeps');
    expect(verdict({ ...onLimit, deviation: 0.001100000001 })).toBe('does not keep');
    expect(verdict({ ...onLimit, deviation: 0.001 }, 0.0001)).toBe('keeps');
  });

  it('loses the class with an uncertainty above a third of its limit', () => {
    expect(verdict({ deviation: 0 }, 0, 0)).toBe('keeps');
    expect(verdict({ deviation: 0 }, 0, 0.0001 ** 2)).toBe('does not keep');
    expect(verdict({ deviation: 0 }, 0, 1e-20)).toBe('keeps');
  });

  it('judges nothing without a class, an uncertainty or a conventional mass', () => {
    expect(verdict({ class: null })).toBe('not judged');
    expect(verdict({ expandedU: null, u: null })).toBe('not judged');
    expect(verdict({ quantity: 'mass' })).toBe('not judged');
    expect(verdict({ nominal: '300' })).toBe('not judged');
    expect(verdict({}, NaN)).toBe('not judged');
  });
});
