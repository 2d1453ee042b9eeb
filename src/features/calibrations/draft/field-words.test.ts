import { describe, expect, it } from 'vitest';
import { DraftContent, DraftLine } from '#shared/contracts/drafts.ts';
import { fieldWord, fieldWords, lineOf } from './field-words.ts';

describe('fieldWords', () => {
  it('names a field of a line by the line, the weight and the field', () => {
    expect(fieldWords('lines.1.expandedU', () => '200 g*')).toBe('Line 2, 200 g*: U');
    expect(fieldWords('lines.0.references.0.sensitivity', () => null)).toBe('Line 1: Sensitivity');
    expect(fieldWords('certificateNo', () => null)).toBe('Certificate number');
  });

  it('has a word for every field of the draft', () => {
    const fields = [...Object.keys(DraftContent.shape), ...Object.keys(DraftLine.shape)];
    expect(fields.filter((field) => field !== 'key' && fieldWord(field) === field && field !== 'k')).toEqual(
      [],
    );
  });

  it('knows the line of a path', () => {
    expect([lineOf('lines.12.value'), lineOf('lines'), lineOf('method')]).toEqual([12, null, null]);
  });
});
