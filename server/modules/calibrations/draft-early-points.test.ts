import { describe, expect, it } from 'vitest';
import { DraftContent } from '#shared/contracts/drafts.ts';
import { dayPoints } from './draft-early-points.ts';

const fieldsOf = (days: Partial<Record<'performedBegin' | 'performedEnd' | 'issuedOn', string>>) =>
  dayPoints(DraftContent.parse(days), '2025-03-01').map(({ field }) => field);

describe('dayPoints', () => {
  it('names a day of issue in the future while everything else is empty', () => {
    expect(fieldsOf({ issuedOn: '2025-03-02' })).toEqual(['issuedOn']);
    expect(fieldsOf({ issuedOn: '2025-03-01' })).toEqual([]);
  });

  it('names an end before the beginning, and an issue before the end', () => {
    expect(fieldsOf({ performedBegin: '2025-02-02', performedEnd: '2025-02-01' })).toEqual(['performedEnd']);
    expect(fieldsOf({ performedEnd: '2025-02-02', issuedOn: '2025-02-01' })).toEqual(['issuedOn']);
  });

  it('says nothing about a day that is half typed', () => {
    expect(fieldsOf({ performedBegin: '2025-02-02', performedEnd: '2025-02', issuedOn: '' })).toEqual([]);
    expect(fieldsOf({})).toEqual([]);
  });
});
