import { readdirSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { ChainRule } from '#shared/contracts/chains.ts';
import { CLAUSES, clauseOn } from './clauses.ts';
import { RULES, rulesInWords } from './rule-set.ts';

describe('the rule set', () => {
  it('holds every rule file once, in the order of the numbers', () => {
    const files = readdirSync(new URL('.', import.meta.url)).filter((file) =>
      /^[bx]-\d+.*(?<!\.test)\.ts$/.test(file),
    );
    expect(RULES.map((rule) => rule.id.toLowerCase())).toEqual(files.sort().map((file) => file.slice(0, 4)));
  });

  it('has the rules of links, values and chains that are asked for', () => {
    const ids = RULES.map((rule) => rule.id);
    const numbers = [
      1, 2, 3, 4, 6, 8, 9, 10, 11, 12, 13, 14, 15, 16, 17, 18, 19, 20, 21, 22, 23, 24, 25, 26, 27, 28, 29, 30,
      31, 32, 36, 38, 40, 42, 43, 44, 45, 46, 47, 48, 49, 50, 52, 53, 54, 81,
    ];
    expect(ids).toEqual([...numbers.map((n) => `B-${String(n).padStart(2, '0')}`), 'X-01']);
  });

  it('tells each with clause, edition and sentences, as the reply describes them', () => {
    for (const rule of rulesInWords('2026-06-01')) {
      expect(ChainRule.parse(rule)).toEqual(rule);
      expect(rule.clause).not.toBe('');
      expect(rule.edition).toMatch(/from memory|no source/);
    }
  });

  it('never pronounces a verdict of conformity', () => {
    const words = RULES.flatMap((rule) => [rule.title, ...Object.values(rule.sentences)]).join(' ');
    expect(words).not.toMatch(/complian|legal|illegal|nonconform/i);
  });
});

describe('clauses', () => {
  it('belong to the rules, one list each', () => {
    expect(Object.keys(CLAUSES)).toEqual(RULES.map((rule) => rule.id));
  });

  it('are asked for by day, and a rule without one is named', () => {
    expect(clauseOn('B-14', '2020-01-01').clause).toContain('6.4.6');
    expect(() => clauseOn('B-99', '2020-01-01')).toThrow('Rule B-99 has no clause');
  });
});
