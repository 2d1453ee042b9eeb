import { expect, it } from 'vitest';
import { densityIsOnRecord } from './b-03-density-on-record.ts';
import { judgedBy, valueFacts, WEIGHT } from './example-facts.ts';
import type { ValueFacts } from './facts.ts';

const judge = (changes: Partial<ValueFacts>) => judgedBy(densityIsOnRecord, valueFacts(changes));
const density = { value: '7950', expandedU: '140', k: '2', origin: 'assumed' } as const;

it('holds with U, whatever the source, and says which', () => {
  expect(judge({ density }).text).toBe(
    'The density of MI 0007 is on record with its U, assumed: 7950 kg/m³, U 140 kg/m³.',
  );
});

it('holds by a volume where only that is on record', () => {
  const volume = { value: '125', expandedU: '0.01', k: '2', origin: 'measured' } as const;
  const found = judge({ density: null, weight: { ...WEIGHT, volume } });
  expect(found.outcome).toBe('holds');
  expect(found.text).toContain('The volume of MI 0007 is on record with its U, measured: 8000 kg/m³, U 0.64');
});

it('fails without any, and without U: major for E1, minor for the others', () => {
  expect(judge({ density: null })).toMatchObject({ outcome: 'fails', sentence: 'none', severity: 'minor' });
  expect(judge({ density: null, class: 'E1' }).severity).toBe('major');
  expect(judge({ density: { ...density, expandedU: null, k: null } })).toMatchObject({
    outcome: 'fails',
    sentence: 'no uncertainty',
  });
});

it('cannot be judged where it is on record for later days only', () => {
  const found = judge({ density: null, weight: { ...WEIGHT, densityOnlyFrom: '2025-07-01' } });
  expect(found.outcome).toBe('cannot be judged');
  expect(found.text).toContain('from 2025-07-01 on; the one that held on 2025-03-10');
});

it('does not apply to what has no density', () => {
  expect(judge({ density: null, weight: { ...WEIGHT, kind: 'realization' } }).outcome).toBe('does not apply');
});
