import { describe, expect, it } from 'vitest';
import type { Question } from '#shared/rules/facts.ts';
import { fateOf } from './fate.ts';
import type { StandardDossier, StoredEnd, StoredHistoryValue, StoredValue } from './stored.ts';

const end = (changes: Partial<StoredEnd> = {}): StoredEnd => ({
  kind: 'superseded',
  effectiveOn: '2025-03-01',
  madeKnownOn: '2025-04-01',
  recordedAt: '2025-04-01T09:00:00.000000Z',
  changed: 'value',
  reason: '',
  replacedById: 2,
  replacedByCertificate: null,
  ...changes,
});
const row = (id: number, ends: StoredEnd[] = [], changes: Partial<StoredHistoryValue> = {}) =>
  ({
    id,
    certificateNo: 'C-1',
    revisionN: id,
    quantity: 'mass',
    medium: 'air',
    ends,
    ...changes,
  }) as StoredHistoryValue;
const fate = (history: StoredHistoryValue[], day = '2025-06-01', known = '2025-06-01') =>
  fateOf(
    { id: 1 } as StoredValue,
    { registryNo: 'R-1', history } as StandardDossier,
    { day, known } as Question,
  );
const withdrawal = end({ kind: 'withdrawn', effectiveOn: '2025-02-01', replacedById: null });

describe('what became of a value', () => {
  it('is that it stands before its end takes effect, and before the end was recorded', () => {
    const history = [row(1, [end()]), row(2)];
    expect(fate(history, '2025-02-28')).toEqual({ kind: 'stands' });
    expect(fate(history, '2025-06-01', '2025-03-31')).toEqual({ kind: 'stands' });
    expect(fate(history, '2025-03-01', '2025-04-01')).toEqual({ kind: 'replaced', byId: 2 });
  });

  it('is its last successor, as far as those are known and have taken effect', () => {
    const history = [
      row(1, [end()]),
      row(2, [
        end({ replacedById: 3, effectiveOn: '2025-05-01', recordedAt: '2025-05-01T09:00:00.000000Z' }),
      ]),
      row(3),
    ];
    expect(fate(history)).toEqual({ kind: 'replaced', byId: 3 });
    expect(fate(history, '2025-04-30')).toEqual({ kind: 'replaced', byId: 2 });
    expect(fate(history, '2025-06-01', '2025-04-30')).toEqual({ kind: 'replaced', byId: 2 });
  });

  it('is lost where it was withdrawn, or what took its place was; the certificate is named', () => {
    expect(fate([row(1, [withdrawal])])).toEqual({
      kind: 'lost',
      because: 'certificate C-1 for R-1 was withdrawn on 2025-02-01, and nothing has taken its place',
    });
    expect(fate([row(1, [end()]), row(2, [withdrawal])])).toMatchObject({
      because: expect.stringContaining('certificate C-1, revision 2 for R-1 was withdrawn'),
    });
  });

  it('is mended by a new revision after a mistaken withdrawal', () => {
    expect(fate([row(1, [withdrawal, end()]), row(2)])).toEqual({ kind: 'replaced', byId: 2 });
  });

  it('is lost where the result turned out to be of another kind, or of another weight', () => {
    expect(fate([row(1, [end()]), row(2, [], { quantity: 'conventional mass' })])).toMatchObject({
      kind: 'lost',
    });
    expect(fate([row(1, [end()])])).toMatchObject({
      because: expect.stringContaining('another weight or kind'),
    });
  });
});
