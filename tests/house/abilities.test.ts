import { describe, expect, it } from 'vitest';
import { abilitiesFor, type Permission } from '#server/policy/permission.ts';
import type { LaboratoryRole, User } from '#server/policy/user.ts';

/**
 * The whole matrix of who may do what, permission by permission, over things of one laboratory ("home") that
 * the institute calibrated. A new permission fails here until it has its row.
 */
const policies = import.meta.glob<Record<string, unknown>>('/server/modules/*/*.policy.ts', { eager: true });

const permissions = Object.values(policies)
  .flatMap((exported) => Object.values(exported))
  .filter((one): one is Permission<unknown> => typeof one === 'object' && one !== null && 'allows' in one);

const HOME = 'home';
const INSTITUTE = 'institute';

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

const PEOPLE = {
  registrar: person({ isRegistrar: true }),
  administrator: worksAt(HOME, 'laboratory administrator'),
  metrologist: worksAt(HOME, 'metrologist'),
  signatory: worksAt(HOME, 'signatory'),
  reader: worksAt(HOME, 'reader'),
  assessor: person({ assessedLaboratoryIds: [HOME] }),
  pilot: person({ isPilot: true }),
  'signatory elsewhere': worksAt('elsewhere', 'signatory'),
  'administrator elsewhere': worksAt('elsewhere', 'laboratory administrator'),
  'metrologist of the institute': worksAt(INSTITUTE, 'metrologist'),
  'signatory of the institute': worksAt(INSTITUTE, 'signatory'),
  'account without a role': person({}),
} satisfies Record<string, User>;
type Who = keyof typeof PEOPLE;

/** One subject that answers every permission's question: a thing of home, calibrated by the institute. */
const OF_HOME = {
  laboratoryId: HOME,
  laboratoryIds: [HOME],
  ownerId: HOME,
  custodianId: HOME,
  holderIds: [HOME],
  issuerId: INSTITUTE,
  registeredById: HOME,
  isAuthorised: true,
  role: 'reader',
  view: 'none',
};

const READERS: Who[] = ['registrar', 'administrator', 'metrologist', 'signatory', 'reader', 'assessor'];
const WRITERS: Who[] = ['registrar', 'administrator', 'metrologist'];
const INSTITUTE_PEOPLE: Who[] = ['metrologist of the institute', 'signatory of the institute'];

/** Who may, of a thing of home; everybody else may not. */
const MAY: Record<string, Who[]> = {
  'membership:assert': ['registrar', 'administrator'],
  'laboratory:see-people': READERS,
  'laboratory:manage-people': ['registrar', 'administrator'],
  'document:add': ['registrar', 'administrator', 'metrologist', 'signatory'],
  'document:read': READERS,
  'standard:read': READERS,
  'standard:register': WRITERS,
  'standard:change': WRITERS,
  'calibration:draft': WRITERS,
  'calibration:read': [...READERS, ...INSTITUTE_PEOPLE],
  // Of the entry at home, and of the certificate at the institute that issued it.
  'calibration:withdraw': ['signatory', 'signatory of the institute'],
  'calibration:correct': ['signatory'],
  'calibration:issue': ['signatory'],
  'draft:read': READERS,
  'draft:write': WRITERS,
  'draft:send': [...WRITERS, 'signatory'],
  'reference:find': WRITERS,
  'notice:publish': ['signatory of the institute'],
  'chain:read': [],
  'downstream:read': [],
  'dry-run:save': [...WRITERS, 'signatory'],
  'dry-run:note': [...WRITERS, 'signatory'],
  'audit:begin': READERS,
  'audit:read': READERS,
  'audit:repeat': READERS,
  // Who asked for it besides, which nobody of these has.
  'audit:stop': ['registrar'],
};

describe('the matrix of abilities', () => {
  it('has a row for every permission, and no row without one', () => {
    expect(Object.keys(MAY).sort()).toEqual([...new Set(permissions.map((one) => one.name))].sort());
  });

  it('has each permission once', () => {
    expect(new Set(permissions.map((one) => one.name)).size).toBe(permissions.length);
  });

  it.each(Object.keys(PEOPLE) as Who[])('is exactly this for the %s', (who) => {
    const expected = Object.entries(MAY).map(([name, may]) => [name, may.includes(who)]);
    expect(abilitiesFor(PEOPLE[who], OF_HOME, permissions)).toEqual(Object.fromEntries(expected));
  });
});

const named = (name: string) => permissions.find((one) => one.name === name)!;

describe('what depends on more than the role', () => {
  it('a signatory without authorisation in force neither issues nor corrects', () => {
    for (const name of ['calibration:issue', 'calibration:correct']) {
      expect(named(name).allows(PEOPLE.signatory, { ...OF_HOME, isAuthorised: false })).toBe(false);
    }
  });

  it.each(['metrologist', 'signatory', 'reader'])('an administrator gives the role of %s', (role) => {
    expect(named('membership:assert').allows(PEOPLE.administrator, { ...OF_HOME, role })).toBe(true);
  });

  it.each(['laboratory administrator', 'assessor', 'registrar', 'comparison pilot'])(
    'only the registrar gives the role of %s',
    (role) => {
      const may = (Object.keys(PEOPLE) as Who[]).filter((who) =>
        named('membership:assert').allows(PEOPLE[who], { ...OF_HOME, role }),
      );
      expect(may).toEqual(['registrar']);
    },
  );

  it.each([
    ['full', true],
    ['statement', true],
    ['warning', false],
    ['none', false],
  ])('a chain opens from a value seen as %s: %s', (view, opens) => {
    expect(named('chain:read').allows(PEOPLE.reader, { ...OF_HOME, view })).toBe(opens);
  });

  it('a standard that another laboratory keeps is read by both, and changed by its owner', () => {
    const lent = { ...OF_HOME, custodianId: 'elsewhere' };
    expect(named('standard:read').allows(PEOPLE['administrator elsewhere'], lent)).toBe(true);
    expect(named('standard:change').allows(PEOPLE['administrator elsewhere'], lent)).toBe(false);
    expect(named('standard:change').allows(PEOPLE.administrator, lent)).toBe(true);
  });
});
