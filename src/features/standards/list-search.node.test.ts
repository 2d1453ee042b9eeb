import { describe, expect, it } from 'vitest';
import {
  changeListSearch,
  isNarrowed,
  nextSort,
  readListSearch,
  sortOf,
  writeListSearch,
} from './list-search.ts';

const read = (text: string) => readListSearch(new URLSearchParams(text));
const ID = '019256f8-d100-768f-b25c-537f2ac54de9';

describe('the address of the list of standards', () => {
  it('survives being read and written', () => {
    const text = `q=TV+0300&class=E2&standing=no+value&nominalFrom=0.5&nominalTo=1000&sort=-nominal&pages=3&open=${ID}`;
    expect(writeListSearch(read(text)).toString()).toBe(text);
  });

  it('leaves out what is at its default', () => {
    expect(writeListSearch(read('sort=registryNo&pages=1&q=')).toString()).toBe('');
  });

  it.each([
    'class=E9',
    'kind=spoon',
    'standing=soon',
    'nominalFrom=1%20kg',
    'nominalTo=-5',
    'sort=mass',
    'pages=0',
    'open=7',
    'laboratory=x',
  ])('counts what is not understood as not asked for: %s', (text) => {
    expect(writeListSearch(read(text)).toString()).toBe('');
  });

  it('begins at the first page when the question changes, and not when a row opens', () => {
    const search = read(`pages=4&q=TV&open=${ID}`);
    expect(changeListSearch(search, { class: 'E1' })).toMatchObject({ pages: 1, open: undefined, q: 'TV' });
    expect(changeListSearch(search, { open: undefined })).toMatchObject({ pages: 4, q: 'TV' });
  });

  it('knows whether anything narrows it', () => {
    expect(isNarrowed(read('sort=-nominal&pages=2'))).toBe(false);
    expect(isNarrowed(read('class=E1'))).toBe(true);
  });

  it('turns an order round on the second click', () => {
    expect(nextSort('registryNo', 'nominal')).toBe('nominal');
    expect(nextSort('nominal', 'nominal')).toBe('-nominal');
    expect(nextSort('-nominal', 'nominal')).toBe('nominal');
    expect([sortOf('-nominal', 'nominal'), sortOf('-nominal', 'calibrated')]).toEqual(['descending', 'none']);
  });
});
