import { describe, expect, it } from 'vitest';
import { PublishNoticeBody } from '#shared/contracts/notices.ts';
import {
  bodyOf,
  changesOf,
  EMPTY_TERM,
  emptyNotice,
  entryField,
  noticeOfChange,
  type NoticeEntry,
} from './notice-form.ts';

const ISSUER = '01900000-0000-7000-8000-000000000001';
const SCALE = '01900000-0000-7000-8000-000000000002';
const typed = (changes: Partial<NoticeEntry> = {}): NoticeEntry => ({
  ...emptyNotice(ISSUER, '2025-01-01'),
  number: 'N 4',
  title: 'A correction',
  reason: 'Because.',
  fromScaleId: SCALE,
  terms: [{ ...EMPTY_TERM, performedTo: '2019-05-19', points: [{ on: '', shift: '-7' }], addedU: '10' }],
  ...changes,
});

describe('bodyOf', () => {
  it('makes a request that the contract takes: micrograms become grams, what is empty is left open', () => {
    const body = PublishNoticeBody.parse(bodyOf(typed(), 'secret'));
    expect(body).toMatchObject({ toScaleId: null, newScale: null, threshold: null, replacesId: null });
    expect(body.terms).toEqual([
      {
        quantity: null,
        performedFrom: null,
        performedTo: '2019-05-19',
        nominalFrom: null,
        nominalTo: null,
        shiftPerKilogram: [{ on: '2000-01-01', shift: '-0.000007' }],
        addedUPerKilogram: 0.00001,
      },
    ]);
  });

  it('leads to another scale, or to a new one of its effective day', () => {
    expect(bodyOf(typed({ leadsTo: 'other', toScaleId: ISSUER }), 'secret').toScaleId).toBe(ISSUER);
    const made = bodyOf(typed({ leadsTo: 'new', newName: 'Next', newBasis: 'Agreed' }), 'secret');
    expect(made).toMatchObject({
      toScaleId: null,
      newScale: { name: 'Next', basis: 'Agreed', validFrom: '2025-01-01' },
    });
  });

  it('hands on what cannot be read, so that the contract names it in its field', () => {
    const parsed = PublishNoticeBody.safeParse(
      bodyOf(typed({ terms: [{ ...EMPTY_TERM, points: [{ on: '', shift: 'a lot' }] }] }), 'secret'),
    );
    expect(parsed.error!.issues.map(({ path }) => entryField(path.join('.')))).toEqual([
      'terms.0.points.0.shift',
    ]);
  });
});

describe('entryField', () => {
  it.each([
    ['terms.1.shiftPerKilogram.2.on', 'terms.1.points.2.on'],
    ['terms.0.shiftPerKilogram', 'terms.0.points.0.shift'],
    ['terms.0.addedUPerKilogram', 'terms.0.addedU'],
    ['newScale.name', 'newName'],
    ['effectiveOn', 'effectiveOn'],
  ])('%s stands in %s', (path, field) => {
    expect(entryField(path)).toBe(field);
  });
});

describe('noticeOfChange', () => {
  it('goes on from a dry run, and gives it back', () => {
    const change = changesOf(PublishNoticeBody.parse(bodyOf(typed(), 'secret')))[0]!;
    const { issuerId, term } = noticeOfChange(JSON.stringify(change))!;
    expect(issuerId).toBe(ISSUER);
    expect(term).toEqual({
      ...EMPTY_TERM,
      performedTo: '2019-05-19',
      points: [{ on: '2000-01-01', shift: '-7' }],
      addedU: '10',
    });
  });

  it.each([[null], [''], ['{'], ['{"kind":"withdraw","revisionId":"x"}'], ['[1]']])(
    'takes nothing from %s',
    (text) => {
      expect(noticeOfChange(text)).toBeNull();
    },
  );
});
