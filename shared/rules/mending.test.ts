import { describe, expect, it } from 'vitest';
import { MENDED_RULES, mendingOf } from './mending.ts';
import { RULES } from './rule-set.ts';

const asked = (
  rule: string,
  sentence: string | null,
  outcome: 'fails' | 'cannot be judged' | 'holds' | 'does not apply' = 'fails',
  type: 'link' | 'value' | 'chain' = 'link',
) => mendingOf({ rule, sentence, outcome, subject: { type } });

describe('what would mend a finding', () => {
  it('is nothing where nothing is amiss', () => {
    expect(asked('B-14', 'in date', 'holds')).toBeNull();
    expect(asked('B-14', 'no interval', 'does not apply')).toBeNull();
  });

  it.each([
    ['B-14', 'late', 'new calibration'],
    ['B-14', 'ended since', 'calibration of the reference'],
    ['B-14', 'no programme', 'programme'],
    ['B-15', 'withdrawn since', 'new calibration'],
    ['B-81', 'older', 'new calibration'],
    ['B-16', 'mixed', 'weight of the reference'],
    ['B-45', 'not recorded', 'laboratory'],
    ['B-21', 'deficit', 'certificate'],
    ['B-21', 'reference without uncertainty', 'new calibration'],
    ['B-03', 'none', 'weight'],
  ])('%s, %s: %s', (rule, sentence, place) => {
    expect(asked(rule, sentence)?.place).toBe(place);
  });

  it('keeps to the rule where the words are another laboratory’s', () => {
    expect(asked('B-15', null)?.place).toBe('certificate of the reference');
  });

  it('has a way on for every rule, and for one that is not there yet', () => {
    for (const { id, scope, sentences } of RULES) {
      for (const sentence of Object.keys(sentences)) {
        expect(asked(id, sentence, 'fails', scope)?.step).toMatch(/\.$/);
      }
    }
    expect(asked('Z-99', 'anything')?.place).toBe('certificate');
    expect(asked('Z-99', 'anything', 'cannot be judged', 'chain')?.place).toBe('chain');
  });

  it('names no rule and no sentence that is not in the rule set', () => {
    const rules = new Map(RULES.map((rule) => [rule.id, rule]));
    for (const [rule, sentences] of MENDED_RULES) {
      expect(rules.has(rule), rule).toBe(true);
      expect(Object.keys(rules.get(rule)!.sentences)).toEqual(expect.arrayContaining([...sentences]));
    }
  });
});
