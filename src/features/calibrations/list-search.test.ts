import { describe, expect, it } from 'vitest';
import { changeListSearch, isNarrowed, readListSearch, writeListSearch } from './list-search.ts';

const read = (text: string) => readListSearch(new URLSearchParams(text));

describe('the address of the list', () => {
  it('comes back as it was written', () => {
    const text = 'q=TV&issuedFrom=2024-01-01&state=withdrawn&sort=certificateNo&pages=3';
    expect(writeListSearch(read(text)).toString()).toBe(text);
    expect(writeListSearch(read('')).toString()).toBe('');
  });

  it('leaves out what it does not understand, part by part', () => {
    const search = read('laboratory=7&issuedFrom=2024-02-31&issuedTo=2024-02-29&state=best&sort=x&pages=0');
    expect(search).toEqual({ issuedTo: '2024-02-29', sort: '-issuedOn', pages: 1 });
  });

  it('goes back to the first page for another question, and not for another row', () => {
    const open = '0190f0aa-1111-7abc-8000-000000000001';
    const search = { ...read('q=TV&pages=4'), open };
    expect(changeListSearch(search, { state: 'superseded' })).toMatchObject({ pages: 1, open: undefined });
    expect(changeListSearch(search, { open: undefined })).toMatchObject({ q: 'TV', pages: 4 });
  });

  it('knows an empty register from an empty answer', () => {
    expect(isNarrowed(read('sort=issuedOn&pages=2'))).toBe(false);
    expect(isNarrowed(read('q=TV'))).toBe(true);
  });
});
