import { describe, expect, it } from 'vitest';
import { atUseWords, meaningOf } from './meaning-of.ts';

const sound = { sound: 6, caution: 0, broken: 0, notJudged: 0 };
const failing = { sound: 5, caution: 0, broken: 1, notJudged: 0 };
const none = { rules: [], links: 0, isAllThatDiffers: false };
const sign = { rules: ['B-17'], links: 1, isAllThatDiffers: true };

describe('why two verdicts differ', () => {
  it('is a change since only where a question asked at use came out otherwise', () => {
    const summary = { links: 6, conduct: sound, today: failing };
    expect(meaningOf(summary, none)).toContain('something that it rests on has changed since');
    expect(meaningOf(summary, sign)).not.toContain('has changed since');
    expect(meaningOf(summary, sign)).toContain('B-17 is asked today only');
    expect(meaningOf(summary, { ...sign, isAllThatDiffers: false })).toMatch(/has changed since.*B-17/);
  });

  it('tells at how many links the use was not asked', () => {
    expect(atUseWords(none)).not.toContain('not asked');
    expect(atUseWords(sign)).toContain('1 link was not asked at use what B-17 asks.');
  });
});
