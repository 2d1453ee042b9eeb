import { verify } from '@node-rs/argon2';
import type { Sequelize } from 'sequelize';
import { readRow, readRows } from '#server/db/read.ts';
import type { Clock } from '#server/http/context.ts';
import type { LaboratoryRole, User } from '#server/policy/user.ts';

interface AccountRow {
  id: string;
  email: string;
  name: string;
}

interface RoleRow {
  role: string;
  laboratoryId: string | null;
}

/** argon2id of a password nobody has: an unknown e-mail costs as long as a wrong password. */
const DECOY =
  '$argon2id$v=19$m=19456,t=2,p=1$c29tZSBmaXhlZCBzYWx0$yMmZqkbtz6qjqNMlpPhtyVFYlKS5bPJuiuWk6Ipm7L4';

/**
 * The roles of an account on a day: of each role in each laboratory, the latest recorded assertion that
 * covers the day wins, and it must say "granted".
 */
const ROLES_ON_DAY = `
  SELECT m.role, m.laboratory_id AS laboratoryId
  FROM membership m
  WHERE m.account_id = :accountId AND m.state = 'granted'
    AND m.valid_from <= :day AND (m.valid_to IS NULL OR m.valid_to >= :day)
    AND NOT EXISTS (
      SELECT 1 FROM membership later
      WHERE later.account_id = m.account_id AND later.role = m.role
        AND later.laboratory_id <=> m.laboratory_id AND later.act_seq > m.act_seq
        AND later.valid_from <= :day AND (later.valid_to IS NULL OR later.valid_to >= :day))`;

/** The person behind an account with the roles of today; null for an account that does not exist. */
export async function userByAccountId(
  database: Sequelize,
  clock: Clock,
  accountId: string,
): Promise<User | null> {
  const day = clock.now().toISOString().slice(0, 10);
  const [account, roles] = await Promise.all([
    readRow<AccountRow>(database, 'SELECT id, email, name FROM account WHERE id = :accountId', { accountId }),
    readRows<RoleRow>(database, ROLES_ON_DAY, { accountId, day }),
  ]);
  return account ? userOf(account, roles) : null;
}

/** The person, if e-mail and password are right; null otherwise, after the same time. */
export async function verifyPassword(
  database: Sequelize,
  clock: Clock,
  email: string,
  password: string,
): Promise<User | null> {
  const row = await readRow<{ id: string; email: string; argon2id: string }>(
    database,
    `SELECT a.id, a.email, p.argon2id FROM account a JOIN account_password p ON p.account_id = a.id
     WHERE a.email = :email ORDER BY p.act_seq DESC LIMIT 1`,
    { email },
  );
  const isRight = await verify(row?.argon2id ?? DECOY, password);
  // The column also takes "é" for "e"; failures are counted by what was typed, so only case may differ.
  const isSameEmail = row?.email.toLowerCase() === email.toLowerCase();
  return row && isRight && isSameEmail ? userByAccountId(database, clock, row.id) : null;
}

function userOf(account: AccountRow, roles: RoleRow[]): User {
  const isNetworkRole = (role: string) => ['registrar', 'assessor', 'comparison pilot'].includes(role);
  return {
    accountId: account.id,
    name: account.name,
    email: account.email,
    isRegistrar: roles.some((row) => row.role === 'registrar'),
    isPilot: roles.some((row) => row.role === 'comparison pilot'),
    memberships: roles.flatMap((row) =>
      row.laboratoryId && !isNetworkRole(row.role)
        ? [{ laboratoryId: row.laboratoryId, role: row.role as LaboratoryRole }]
        : [],
    ),
    assessedLaboratoryIds: roles.flatMap((row) =>
      row.role === 'assessor' && row.laboratoryId ? [row.laboratoryId] : [],
    ),
  };
}
