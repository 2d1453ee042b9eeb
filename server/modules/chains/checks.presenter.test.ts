import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { isToldInWords } from './checks.presenter.ts';

const RULES = new URL('../../../shared/rules/', import.meta.url);

/** Rules of one value whose file reads the weight's other calibrations, by themselves or through a shared question. */
function rulesThatReadHistory(): string[] {
  return readdirSync(RULES)
    .filter((file) => /^[a-z]-\d+.*(?<!\.test)\.ts$/.test(file))
    .map((file) => readFileSync(new URL(file, RULES), 'utf8'))
    .filter((text) => text.includes("scope: 'value'") && /\.history\b|\.duplicates\b|odd-one-out/.test(text))
    .map((text) => /id: '([A-Z]-\d+)'/.exec(text)![1]!);
}

describe('isToldInWords', () => {
  it('keeps to the holder what any rule says from the weight’s history', () => {
    const rules = rulesThatReadHistory();
    expect(rules).toContain('B-19');
    expect(rules.filter((rule) => isToldInWords(rule, { full: true, history: false }))).toEqual([]);
    expect(rules.filter((rule) => !isToldInWords(rule, { full: true, history: true }))).toEqual([]);
  });

  it('tells who issued the certificate what rests on it alone, and nobody else', () => {
    expect(isToldInWords('B-21', { full: true, history: false })).toBe(true);
    expect(isToldInWords('B-21', { full: false, history: false })).toBe(false);
  });
});
