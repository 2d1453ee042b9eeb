import { describe, expect, it } from 'vitest';
import { returnPath } from './return-path.ts';

describe('returnPath', () => {
  it('goes back to a path of the application', () => {
    expect(returnPath('/standards?class=E2#x', '/desk')).toBe('/standards?class=E2#x');
  });

  it.each([
    null,
    '',
    '//elsewhere.example',
    '/\\elsewhere.example',
    '/\t/elsewhere.example',
    'https://elsewhere.example',
    'javascript:1',
    '/sign-in?from=/x',
  ])('does not follow %j', (from) => {
    expect(returnPath(from, '/desk')).toBe('/desk');
  });
});
