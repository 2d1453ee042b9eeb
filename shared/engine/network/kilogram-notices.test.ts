import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { consensusValue } from '../comparison/consensus-value.ts';
import { applyChanges } from './apply-changes.ts';
import type { Change } from './changes.ts';
import type { Network } from './network.ts';

/**
 * Consensus values of the kilogram, offset from the international prototype in ug (PTB, national prototype page
 * citing CCM-TGPfD-kg; BIPM news 2023): -2 from 2021-02-01, -7 from 2023-03-01, -12 from 2026-03-01, u = 20 agreed.
 */
const WINDOWS = [
  [0, 12.4, -18.8],
  [12.4, -18.8, -15.2],
  [-18.8, -15.2, -10.7],
];

/** A kilogram on the earlier scale, and a 100 g weight three steps below it; ug. */
const chain: Network = {
  values: ['kilogram', 'working standard', 'set', 'weight'].map((id) => ({ id, local: 1 })),
  links: [
    { child: 'working standard', parent: 'kilogram', sensitivity: 1 },
    { child: 'set', parent: 'working standard', sensitivity: 0.5 },
    { child: 'weight', parent: 'set', sensitivity: 0.2 },
  ],
};

function published(): number[] {
  return WINDOWS.reduce<number[]>((values, window) => {
    const previousPublished = values.at(-1) ?? 0;
    const next = consensusValue({
      window,
      previousPublished,
      limit: 5,
      agreedUncertainty: 20,
      resolution: 1,
    });
    return [...values, next.published];
  }, []);
}

describe('KG-cv1, KG-cv2, KG-rule, KG-phases: notices that map one mass-scale version to the next', () => {
  it('carry the published offsets 0, -2, -7, -12 by steps of -2, -5, -5', () => {
    const offsets = [0, ...published()];
    expect(offsets).toEqual([0, -2, -7, -12]);
    const notices = offsets.slice(1).map((offset, i): Change => ({
      kind: 'notice',
      id: `consensus value ${i + 1}`,
      standardUncertainty: 0,
      terms: [{ value: 'kilogram', shift: offset - offsets[i]!, sensitivity: 1 }],
    }));
    expect(notices.map((notice) => 'terms' in notice && notice.terms[0]!.shift)).toEqual([-2, -5, -5]);
    expect(applyChanges(chain, notices).shifts[0]).toBe(-12);
  });

  it('reach a weight with its mass over 1 kg, in shift and in the agreed 20 ug alike, at any depth', () => {
    const before = applyChanges(chain, []);
    const covered = ['kilogram', 'working standard'].map((value) => ({ value, shift: -2, sensitivity: 1 }));
    const weight = { value: 'weight', shift: -0.2, sensitivity: 0.1 };
    const notice: Change = {
      kind: 'notice',
      id: 'scale',
      standardUncertainty: 20,
      terms: [...covered, weight],
    };
    const after = applyChanges(chain, [notice]);
    expect(after.shifts[3]).toBeCloseTo(-0.2, 14);
    expect(after.variances[3]! - before.variances[3]!).toBeCloseTo(4, 12);
    expect(after.variances[0]! - before.variances[0]!).toBeCloseTo(400, 10);
  });

  it('reach a weight with total sensitivity m/1 kg at any depth, by any roads, whichever values the notice names', () => {
    const step = fc.record({
      fraction: fc.integer({ min: 1, max: 10 }).map((tenth) => tenth / 10),
      share: fc.integer({ min: 0, max: 10 }).map((tenth) => tenth / 10),
      isCovered: fc.boolean(),
    });
    fc.assert(
      fc.property(fc.array(step, { minLength: 1, maxLength: 9 }), (steps) => {
        // Each step: a subdivision to `fraction` of the mass, by two standards of one kind in the proportion `share`.
        const masses = steps.reduce((list, { fraction }) => [...list, list.at(-1)! * fraction], [1]);
        const net: Network = { values: [{ id: 'left 0', local: 1 }, { id: 'right 0', local: 0 }], links: [] }; // prettier-ignore
        net.links.push({ child: 'right 0', parent: 'left 0', sensitivity: 1 });
        const terms = [{ value: 'left 0', shift: -12, sensitivity: 1 }];
        steps.forEach(({ fraction, share, isCovered }, i) => {
          for (const side of ['left', 'right']) {
            const child = `${side} ${i + 1}`;
            net.values.push({ id: child, local: 0.5 });
            net.links.push({ child, parent: `left ${i}`, sensitivity: fraction * share });
            net.links.push({ child, parent: `right ${i}`, sensitivity: fraction * (1 - share) });
            const mass = masses[i + 1]!;
            if (isCovered) terms.push({ value: child, shift: -12 * mass, sensitivity: mass });
          }
        });
        const before = applyChanges(net, []);
        const after = applyChanges(net, [{ kind: 'notice', id: 'scale', standardUncertainty: 20, terms }]);
        net.values.forEach(({ id }, node) => {
          const mass = masses[Number(id.split(' ')[1])]!;
          expect(after.shifts[node]! / mass).toBeCloseTo(-12, 10);
          const added = after.variances[node]! - before.variances[node]!;
          expect(added / (20 * mass) ** 2).toBeCloseTo(1, 4);
        });
      }),
    );
  });

  it('before 2019-05-20 the prototype had u = 0 by definition: a notice without uncertainty adds none', () => {
    const terms = [{ value: 'kilogram', shift: 35, sensitivity: 1 }];
    const after = applyChanges(chain, [{ kind: 'notice', id: 'n', standardUncertainty: 0, terms }]);
    expect(after.variances[3]).toBeCloseTo(applyChanges(chain, []).variances[3]!, 14);
    expect(after.shifts[3]).toBeCloseTo(3.5, 14);
  });
});
