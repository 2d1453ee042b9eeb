import { expect, it } from 'vitest';
import type { WeightClass } from '#shared/contracts/common.ts';
import type { Shape } from '#shared/contracts/standards.ts';
import { shapeOfClass } from './b-09-shape-of-class.ts';
import { judgedBy, valueFacts, WEIGHT } from './example-facts.ts';

const judge = (shape: Shape, nominal: string, weightClass: WeightClass | null) =>
  judgedBy(
    shapeOfClass,
    valueFacts({ nominal, class: weightClass, weight: { ...WEIGHT, shape, classClaimed: null } }),
  );

it('holds for the shapes of the classes, both for 1 g', () => {
  for (const shape of ['knob', 'cylinder', 'wire', 'sheet'] as const)
    expect(judge(shape, '1', 'E1').outcome).toBe('holds');
  expect(judge('sheet', '0.5', 'E1').outcome).toBe('holds');
  expect(judge('block', '20000', 'M2').outcome).toBe('holds');
  expect(judge('block', '500000', 'F1').outcome).toBe('holds');
});

it('fails for a block of a fine class, a sheet above and a knob below one gram', () => {
  const found = judge('block', '1000', 'E2');
  expect(found).toMatchObject({ outcome: 'fails', severity: 'major' });
  expect(found.text).toContain('MI 0007 is on record as a block; class E2 has no such shape at 1\u2009kg');
  expect(judge('block', '20000', 'F1')).toMatchObject({ outcome: 'fails', severity: 'minor' });
  expect(judge('sheet', '2', 'F2').outcome).toBe('fails');
  expect(judge('knob', '0.5', 'M1').outcome).toBe('fails');
});

it('cannot be judged for other shapes, nor for small blocks of class M', () => {
  expect(judge('other', '1000', 'E2').outcome).toBe('cannot be judged');
  expect(judge('sphere', '1000', 'E1').outcome).toBe('cannot be judged');
  expect(judge('block', '1000', 'M3').outcome).toBe('cannot be judged');
});

it('does not apply without class', () => {
  expect(judge('block', '1000', null).outcome).toBe('does not apply');
});
