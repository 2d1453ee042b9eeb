import { describe, expect, it } from 'vitest';
import type { LaboratoryRole, User } from './user.ts';
import { seesHistory, valueView, type Relation, type ValueView } from './value-view.ts';

const HOME = 'home';
const INSTITUTE = 'institute';
const OTHER = 'other';

function person(parts: Partial<User>): User {
  return {
    accountId: 'a',
    name: 'A person',
    email: 'a@test.example',
    isRegistrar: false,
    isPilot: false,
    memberships: [],
    assessedLaboratoryIds: [],
    ...parts,
  };
}

const worksAt = (laboratoryId: string, role: LaboratoryRole) =>
  person({ memberships: [{ laboratoryId, role }] });

const PEOPLE: Record<string, User> = {
  registrar: person({ isRegistrar: true }),
  'laboratory administrator at home': worksAt(HOME, 'laboratory administrator'),
  'metrologist at home': worksAt(HOME, 'metrologist'),
  'signatory at home': worksAt(HOME, 'signatory'),
  'reader at home': worksAt(HOME, 'reader'),
  'assessor of home': person({ assessedLaboratoryIds: [HOME] }),
  'assessor of another': person({ assessedLaboratoryIds: [OTHER] }),
  'comparison pilot': person({ isPilot: true }),
  'metrologist of another': worksAt(OTHER, 'metrologist'),
  'metrologist of the institute': worksAt(INSTITUTE, 'metrologist'),
  'account without a role': person({}),
};

const RELATIONS: Relation[] = ['upstream', 'downstream', 'unrelated'];

/** Views by relation, in the order of RELATIONS. */
type Row = [who: string, views: [ValueView, ValueView, ValueView]];

const FULL: Row[1] = ['full', 'full', 'full'];
const BY_RELATION: Row[1] = ['statement', 'warning', 'none'];

describe('a value of home, calibrated by the institute', () => {
  const value = { holderId: HOME, issuerId: INSTITUTE };
  const rows: Row[] = [
    ['registrar', FULL],
    ['laboratory administrator at home', FULL],
    ['metrologist at home', FULL],
    ['signatory at home', FULL],
    ['reader at home', FULL],
    ['assessor of home', FULL],
    ['metrologist of the institute', FULL],
    ['assessor of another', BY_RELATION],
    ['comparison pilot', BY_RELATION],
    ['metrologist of another', BY_RELATION],
    ['account without a role', BY_RELATION],
  ];
  it('has a row for every kind of person', () => {
    expect(rows.map(([who]) => who).sort()).toEqual(Object.keys(PEOPLE).sort());
  });
  it.each(rows)('%s', (who, views) => {
    expect(RELATIONS.map((relation) => valueView(PEOPLE[who]!, value, relation))).toEqual(views);
  });
});

describe('a value held and issued by another laboratory', () => {
  const value = { holderId: OTHER, issuerId: OTHER };
  const rows: Row[] = [
    ['registrar', FULL],
    ['assessor of another', FULL],
    ['metrologist of another', FULL],
    ['laboratory administrator at home', BY_RELATION],
    ['metrologist at home', BY_RELATION],
    ['signatory at home', BY_RELATION],
    ['reader at home', BY_RELATION],
    ['assessor of home', BY_RELATION],
    ['comparison pilot', BY_RELATION],
    ['metrologist of the institute', BY_RELATION],
    ['account without a role', BY_RELATION],
  ];
  it('has a row for every kind of person', () => {
    expect(rows.map(([who]) => who).sort()).toEqual(Object.keys(PEOPLE).sort());
  });
  it.each(rows)('%s', (who, views) => {
    expect(RELATIONS.map((relation) => valueView(PEOPLE[who]!, value, relation))).toEqual(views);
  });
});

describe('what else befell a weight of home', () => {
  it('is seen by who reads home in full, and not by who issued one of its certificates', () => {
    const seeing = Object.entries(PEOPLE).filter(([, who]) => seesHistory(who, { holderId: HOME }));
    expect(seeing.map(([who]) => who)).toEqual([
      'registrar',
      'laboratory administrator at home',
      'metrologist at home',
      'signatory at home',
      'reader at home',
      'assessor of home',
    ]);
  });
});
