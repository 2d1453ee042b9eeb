import type { SessionResponse } from '#shared/contracts/identity.ts';
import type { z } from 'zod';
import { readRow, readRows } from '#server/db/read.ts';
import type { Context } from '#server/http/context.ts';
import type { User } from '#server/policy/user.ts';

type Session = z.input<typeof SessionResponse>;
type Person = NonNullable<Session['person']>;
type RoleHeld = Person['roles'][number];

/** The policy whose adoption marks a register as the demo network. */
const DEMO_POLICY = 'demo network';

/** Who is signed in, with roles and laboratories, and whether this is the demo network. */
export async function currentSession(context: Context): Promise<Session> {
  const [demo, person] = await Promise.all([
    readRow(context.database, 'SELECT id FROM policy_version WHERE name = :name LIMIT 1', {
      name: DEMO_POLICY,
    }),
    context.user ? personOf(context, context.user) : null,
  ]);
  return { person, isDemo: demo !== null };
}

async function personOf(context: Context, user: User): Promise<Person> {
  const held: { role: RoleHeld['role']; laboratoryId: string | null }[] = [
    ...(user.isRegistrar ? [{ role: 'registrar' as const, laboratoryId: null }] : []),
    ...user.memberships,
    ...user.assessedLaboratoryIds.map((laboratoryId) => ({ role: 'assessor' as const, laboratoryId })),
    ...(user.isPilot ? [{ role: 'comparison pilot' as const, laboratoryId: null }] : []),
  ];
  const laboratories = await laboratoriesById(
    context,
    held.flatMap(({ laboratoryId }) => laboratoryId ?? []),
  );
  const roles = held.map(({ role, laboratoryId }) => ({
    role,
    laboratory: (laboratoryId && laboratories.get(laboratoryId)) || null,
  }));
  return { accountId: user.accountId, name: user.name, email: user.email, roles };
}

async function laboratoriesById(
  context: Context,
  ids: string[],
): Promise<Map<string, NonNullable<RoleHeld['laboratory']>>> {
  if (ids.length === 0) return new Map();
  const rows = await readRows<{ id: string; code: string; name: string; kind: string }>(
    context.database,
    'SELECT id, code, name, kind FROM laboratory WHERE id IN (:ids)',
    { ids },
  );
  return new Map(
    rows.map(({ id, code, name, kind }) => [
      id,
      { id, code, name, isNationalInstitute: kind === 'national institute' },
    ]),
  );
}
