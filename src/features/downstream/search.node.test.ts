import { describe, expect, it } from 'vitest';
import { readSearch, withChange } from './search.ts';
import { supposedChange } from './supposed-change.ts';

const at = (text: string) => readSearch(new URLSearchParams(text));

describe('the question in the address', () => {
  it('is the same after it was written and read again', () => {
    const search = at('day=2025-03-01&by=class&group=E2&suppose=shift&amount=0.02+mg&beyond=5&sort=ratio');
    expect(at(new URLSearchParams(withChange(search, {})).toString())).toEqual(search);
  });

  it('leaves out what it cannot read', () => {
    expect(at('day=yesterday&by=colour&suppose=melt&beyond=-3&sort=size')).toEqual(at(''));
  });

  it('leaves out what is at its default', () => {
    expect(withChange(at(''), { by: 'laboratory', beyond: 10, sort: 'word' })).toEqual({});
  });

  it('closes the open group when it is grouped otherwise, and only then', () => {
    const search = at('by=class&group=E2');
    expect(withChange(search, { by: 'nominal' })).toEqual({ by: 'nominal' });
    expect(withChange(search, { sort: 'shift' })).toEqual({ by: 'class', group: 'E2', sort: 'shift' });
  });
});

describe('supposedChange', () => {
  const subject = { uid: 'value', revisionId: 'revision' };

  it('makes each supposition the change that is asked', () => {
    expect(supposedChange(at('suppose=shift&amount=-20+ug'), subject)).toEqual({
      kind: 'shift',
      valueUid: 'value',
      shift: '-0.00002',
    });
    expect(supposedChange(at('suppose=raise&amount=0.5+mg'), subject)).toEqual({
      kind: 'raise',
      valueUid: 'value',
      addedU: 0.0005,
    });
    expect(supposedChange(at('suppose=withdraw'), subject)).toEqual({
      kind: 'withdraw',
      revisionId: 'revision',
    });
  });

  it('asks nothing where the address cannot be asked', () => {
    expect(supposedChange(at(''), subject)).toBeNull();
    expect(supposedChange(at('suppose=shift&amount=20'), subject)).toBeNull();
    expect(supposedChange(at('suppose=raise&amount=-1+mg'), subject)).toBeNull();
    expect(supposedChange(at('suppose=withdraw'), { ...subject, revisionId: null })).toBeNull();
  });
});
