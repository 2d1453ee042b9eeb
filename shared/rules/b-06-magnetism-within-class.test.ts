import { expect, it } from 'vitest';
import { magnetismWithinClass } from './b-06-magnetism-within-class.ts';
import { judgedBy, valueFacts, WEIGHT } from './example-facts.ts';
import type { ValueFacts } from './facts.ts';

/** E2 at 1 kg: susceptibility up to 0.07, polarisation up to 8 uT (OIML R 111-1:2004, Tables 3 and 4). */
const property = (value: string, expandedU: string | null = null) =>
  ({ value, expandedU, k: expandedU && '2', origin: 'measured' }) as const;
const judge = (
  susceptibility: string | null,
  polarisation: string | null,
  changes: Partial<ValueFacts> = {},
  expandedU: string | null = null,
) =>
  judgedBy(
    magnetismWithinClass,
    valueFacts({
      weight: {
        ...WEIGHT,
        susceptibility: susceptibility === null ? null : property(susceptibility, expandedU),
        polarisation: polarisation === null ? null : property(polarisation, expandedU),
      },
      ...changes,
    }),
  );

it('holds up to the limits, for what was measured', () => {
  expect(judge('0.07', '8').outcome).toBe('holds');
  expect(judge(null, '2').text).toContain('a polarisation of 2 µT (limit 8 µT)');
});

it('fails beyond a limit: major for class E, minor below', () => {
  const found = judge('0.5', '2');
  expect(found).toMatchObject({ outcome: 'fails', severity: 'major' });
  expect(found.text).toContain(
    'a susceptibility of 0.5 (limit 0.07), beyond what class E2 allows at 1\u2009kg',
  );
  expect(judge(null, '30', { class: 'F1' })).toMatchObject({ outcome: 'fails', severity: 'minor' });
});

it('cannot be judged where U reaches across', () => {
  expect(judge('0.06', null, {}, '0.02')).toMatchObject({ outcome: 'cannot be judged', sentence: 'reaches' });
  expect(judge('0.08', null, {}, '0.02').sentence).toBe('reaches');
});

it('cannot be judged without measurement, and that weighs little; few M weights are tested', () => {
  expect(judge(null, null)).toMatchObject({ outcome: 'cannot be judged', severity: 'information' });
  expect(judge(null, null, { class: 'M1' })).toMatchObject({
    outcome: 'does not apply',
    sentence: 'seldom tested',
  });
});

it('does not apply without class', () => {
  const weight = { ...WEIGHT, classClaimed: null };
  expect(judgedBy(magnetismWithinClass, valueFacts({ class: null, weight })).sentence).toBe('no class');
});
