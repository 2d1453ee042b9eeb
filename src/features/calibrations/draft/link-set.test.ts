import { describe, expect, it } from 'vitest';
import type { StandardRow } from '#shared/contracts/standards.ts';
import { knownFromRow } from './known.ts';
import { partnerOf, referenceOfPiece } from './link-set.ts';

const piece = (
  id: string,
  nominal: string,
  marking: string,
  quantity?: 'mass' | 'conventional mass',
): StandardRow => ({
  id,
  registryNo: `TV 0100-${id}`,
  kind: 'weight',
  nominal,
  marking,
  class: 'E2',
  holder: { id: 'h', code: 'TV', name: 'Laboratory' },
  set: { id: 's', registryNo: 'TV 0100' },
  value: quantity
    ? {
        uid: `v${id}`,
        revisionId: 'r',
        quantity,
        deviation: '0.0001',
        expandedU: '0.0002',
        k: '2',
        performedEnd: '2024-01-01',
        datePrecision: 'day',
        certificateNo: 'C 1',
      }
    : null,
  dueOn: null,
});
const SET = [
  piece('01', '500', '500 g'),
  piece('02', '200', '200 g'),
  piece('03', '200.000', '200 g*'),
  piece('04', '100', '100 g', 'conventional mass'),
];
const partner = (nominal: string, marking: string) =>
  partnerOf(knownFromRow(piece('99', nominal, marking)), SET)?.id ?? null;

describe('partnerOf', () => {
  it('is the piece of the same nominal, whatever its marking', () => {
    expect(partner('500.000000', 'knob 7')).toBe('01');
  });

  it('is the one with the same marking among duplicates, and none where no marking fits', () => {
    expect(partner('200', '200g')).toBe('02');
    expect(partner('200', '200 g \u2217')).toBe('03');
    expect(partner('200', '200 g **')).toBeNull();
  });

  it('is nothing where the set has no such nominal, and never the weight itself', () => {
    expect(partner('50', '50 g')).toBeNull();
    expect(partnerOf(knownFromRow(SET[0]!), SET)).toBeNull();
  });
});

it('a piece is a reference by its value in force of the same kind only', () => {
  expect(referenceOfPiece(SET[3]!, 'conventional mass')).toMatchObject({
    valueUid: 'v04',
    state: 'in force',
  });
  expect(referenceOfPiece(SET[3]!, 'mass')).toBeNull();
  expect(referenceOfPiece(SET[0]!, 'mass')).toBeNull();
});
