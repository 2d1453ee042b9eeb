import { randomInt, randomUUID } from 'node:crypto';
import {
  assertMembership,
  createAccount,
  userByAccountId,
  type RoleName,
} from '#server/modules/identity/index.ts';
import { assertAuthorisation, assertRecognition, createLaboratory } from '#server/modules/network/index.ts';
import type { User } from '#server/policy/user.ts';
import type { TestApp } from './test-app.ts';

export interface TestPerson {
  accountId: string;
  email: string;
  password: string;
  user: User;
}

type LaboratoryKind = 'national institute' | 'calibration laboratory' | 'external institute';

/** Each test makes its own laboratory, so that tests share a database without meeting. */
export async function makeLaboratory(
  app: TestApp,
  kind: LaboratoryKind = 'calibration laboratory',
): Promise<{ id: string; code: string; name: string }> {
  const code = randomUUID().replaceAll('-', '').slice(0, 10).toUpperCase();
  const context = app.context();
  const { id } = await createLaboratory(context, {
    code,
    name: `Laboratory ${code}`,
    kind,
    country: 'XX',
    place: 'Testing',
  });
  await assertRecognition(context, {
    laboratoryId: id,
    kind: kind === 'calibration laboratory' ? 'accreditation' : 'institute arrangement',
    body: 'Accreditation Board of the tests',
    number: `T-${code}`,
    arrangement: 'Test arrangement',
    state: 'granted',
    validFrom: '2000-01-01',
    validTo: null,
  });
  return { id, code, name: `Laboratory ${code}` };
}

/** A person with a role, and with the authorisation to sign where the role is signatory. */
export async function makePerson(
  app: TestApp,
  role: RoleName,
  laboratoryId: string | null = null,
): Promise<TestPerson> {
  const context = app.context();
  const email = `${role.replaceAll(' ', '-')}.${randomUUID().slice(0, 8)}@test.example`;
  const password = 'a long test password';
  const { id: accountId } = await createAccount(context, { email, name: `Test ${role}`, password });
  await assertMembership(context, {
    accountId,
    laboratoryId,
    role,
    state: 'granted',
    validFrom: '2000-01-01',
    validTo: null,
  });
  if (role === 'signatory' && laboratoryId) {
    await assertAuthorisation(context, {
      accountId,
      laboratoryId,
      what: 'sign calibrations',
      state: 'granted',
      validFrom: '2000-01-01',
      validTo: null,
    });
  }
  const user = await userByAccountId(app.database, context.clock, accountId);
  if (!user) throw new Error('The account that was just made is not there');
  return { accountId, email, password, user };
}

/** A registry number that no other test uses. */
export function freeRegistryNo(prefix = 'TT'): string {
  const letters = Array.from({ length: 2 }, () => String.fromCharCode(65 + randomInt(26))).join('');
  return `${prefix}${letters} ${String(randomInt(10_000)).padStart(4, '0')}`;
}
