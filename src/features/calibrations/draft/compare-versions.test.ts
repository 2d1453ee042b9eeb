import { describe, expect, it } from 'vitest';
import { DraftContent } from '#shared/contracts/drafts.ts';
import { compareVersions, mergeVersions } from './compare-versions.ts';

const content = (head: object, lines: object[] = []) => DraftContent.parse({ ...head, lines });
const base = content({ certificateNo: 'C 1', method: 'ABBA' }, [
  { key: 'a', value: '1' },
  { key: 'b', value: '2' },
]);
const mine = content({ certificateNo: 'C 2', method: 'ABBA' }, [
  { key: 'a', value: '1.5' },
  { key: 'b', value: '2' },
  { key: 'mine', value: '8' },
]);
const theirs = content({ certificateNo: 'C 1', method: 'ABA' }, [
  { key: 'a', value: '1', expandedU: '0.5' },
  { key: 'theirs', value: '9' },
]);

describe('compareVersions', () => {
  it('finds nothing between equals, whatever the order of members', () => {
    const turned = DraftContent.parse(JSON.parse(JSON.stringify(mine)));
    expect(compareVersions(mine, turned, base)).toEqual([]);
  });

  it('names each differing part and suggests who changed it', () => {
    const found = compareVersions(mine, theirs, base).map(({ id, suggested }) => [id, suggested]);
    expect(found).toEqual([
      ['certificateNo', 'mine'],
      ['method', 'theirs'],
      ['line:a.value', 'mine'],
      ['line:a.expandedU', 'theirs'],
      ['line:b', 'theirs'],
      ['line:mine', 'mine'],
      ['line:theirs', 'theirs'],
    ]);
  });

  it('suggests what was typed here where nobody knows what both began from', () => {
    const sides = compareVersions(mine, theirs, null).map(({ suggested }) => suggested);
    expect(sides.slice(0, 4)).toEqual(['mine', 'mine', 'mine', 'mine']);
  });
});

describe('mergeVersions', () => {
  it('takes the suggested parts: both persons keep their work', () => {
    const suggested = new Map(compareVersions(mine, theirs, base).map((one) => [one.id, one.suggested]));
    const merged = mergeVersions(mine, theirs, ({ id }) => suggested.get(id) ?? 'mine');
    expect(merged).toMatchObject({ certificateNo: 'C 2', method: 'ABA' });
    expect(merged.lines.map(({ key, value, expandedU }) => [key, value, expandedU])).toEqual([
      ['a', '1.5', '0.5'],
      ['mine', '8', ''],
      ['theirs', '9', ''],
    ]);
  });

  it('gives either version whole', () => {
    expect(
      compareVersions(
        mergeVersions(mine, theirs, () => 'mine'),
        mine,
        null,
      ),
    ).toEqual([]);
    expect(
      compareVersions(
        mergeVersions(mine, theirs, () => 'theirs'),
        theirs,
        null,
      ),
    ).toEqual([]);
  });
});
