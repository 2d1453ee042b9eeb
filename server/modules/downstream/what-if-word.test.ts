import { describe, expect, it } from 'vitest';
import { WORDS, wordOf, type Consequence } from './what-if-word.ts';

const QUIET: Consequence = {
  shift: 0,
  expandedU: 1,
  expandedUAfter: 1,
  isRaised: false,
  isLost: false,
  isBeyondLimit: false,
  before: 'keeps',
  after: 'keeps',
};
const word = (changes: Partial<Consequence>, threshold = 0.1) =>
  WORDS[wordOf({ ...QUIET, ...changes }, threshold)];

describe('wordOf', () => {
  it.each<[string, Partial<Consequence>, string]>([
    ['nothing', {}, 'none'],
    ['a shift of a tenth of U', { shift: -0.1 }, 'none'],
    ['a shift of more', { shift: -0.11 }, 'material'],
    ['a U that grows by more than a tenth', { isRaised: true, expandedUAfter: 1.11 }, 'material'],
    ['a U that grows by less', { isRaised: true, expandedUAfter: 1.09 }, 'none'],
    ['a class lost by the smallest shift', { shift: 0.001, after: 'does not keep' }, 'verdict changes'],
    ['a class gained', { before: 'does not keep', after: 'keeps' }, 'verdict changes'],
    ['a class not judged any more', { after: 'not judged' }, 'none'],
    ['something withdrawn above', { isLost: true, shift: NaN, after: 'not judged' }, 'verdict changes'],
    ['a class limit that no longer covers', { isBeyondLimit: true }, 'material'],
    ['any shift where no U is stated', { shift: 1e-9, expandedU: NaN, expandedUAfter: NaN }, 'material'],
    ['any added u where no U is stated', { isRaised: true, expandedU: NaN, expandedUAfter: NaN }, 'material'],
    ['no change where no U is stated', { expandedU: NaN, expandedUAfter: NaN }, 'none'],
  ])('%s: %s', (_, changes, expected) => {
    expect(word(changes)).toBe(expected);
  });

  it('moves with the threshold, except for a verdict', () => {
    expect(word({ shift: 0.4 }, 0.5)).toBe('none');
    expect(word({ shift: 0.4, after: 'does not keep' }, 0.5)).toBe('verdict changes');
  });
});
