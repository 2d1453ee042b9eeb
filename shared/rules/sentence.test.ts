import { expect, it } from 'vitest';
import { fillSentence, placesOf } from './sentence.ts';

it('fills every place, also twice', () => {
  expect(fillSentence('{a} before {b}, and {a} again', { a: '1', b: '2' })).toBe('1 before 2, and 1 again');
});

it('names the parameter that is missing', () => {
  expect(() => fillSentence('due on {due}', {})).toThrow('needs the parameter due');
});

it('knows the places of a sentence, each once', () => {
  expect(placesOf('{a} before {b}, and {a} again')).toEqual(['a', 'b']);
  expect(placesOf('none')).toEqual([]);
});
