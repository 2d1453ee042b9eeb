import { describe, expect, it } from 'vitest';
import { unreadIn, unreadSentence } from './unread-address.ts';

const said = (address: string, read: Record<string, unknown>) =>
  unreadIn(new URLSearchParams(address), read).map(unreadSentence);

describe('what an address names and cannot be read', () => {
  it('is said, with what is shown instead', () => {
    expect(said('day=9999-99-99', { day: undefined })).toEqual([
      'The address names a day that cannot be read: 9999-99-99; today is shown.',
    ]);
    expect(said('changes={zz&beyond=much', { changes: [], beyond: 10 })).toEqual([
      'The address names changes that cannot be read: {zz; none is supposed.',
      'The address names a part of U that cannot be read: much; 10 % is taken.',
    ]);
  });

  it('is nothing where all of it was read, or is no part of the question', () => {
    expect(
      said('day=2026-01-02&beyond=10.0&by=class', { day: '2026-01-02', beyond: 10, by: 'class' }),
    ).toEqual([]);
    expect(said('changes=[1]&from=mail', { changes: [1] })).toEqual([]);
    expect(said('day=', { day: undefined })).toEqual([]);
  });

  it('is shown in part where it is long', () => {
    const [sentence] = said(`changes=${'x'.repeat(5000)}`, { changes: [] });
    expect(sentence!.length).toBeLessThan(150);
  });
});
