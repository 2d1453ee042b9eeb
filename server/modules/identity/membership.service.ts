import type { Role } from '#shared/contracts/identity.ts';
import { inAct } from '#server/db/act.ts';
import { insertRow } from '#server/db/base-model.ts';
import { fieldError } from '#server/http/app-error.ts';
import { newId, type Context } from '#server/http/context.ts';
import { assertAuthorisation } from '#server/modules/network/index.ts';
import { membershipModel } from './account.model.ts';

export type RoleName = Role;

export interface MembershipAssertion {
  accountId: string;
  /** null for the roles in the network: registrar and comparison pilot. */
  laboratoryId: string | null;
  role: Role;
  state: 'granted' | 'ended';
  validFrom: string;
  validTo: string | null;
}

/**
 * Gives or ends a role as the people of a laboratory see it: a signatory is also authorised to sign
 * (ISO/IEC 17025:2017, 6.2.6), in the same act.
 * @throws AppError `unprocessable` as `assertMembership`
 */
export async function changeRole(
  context: Context,
  assertion: MembershipAssertion & { laboratoryId: string },
): Promise<{ id: string }> {
  const kind = assertion.state === 'granted' ? 'membership.grant' : 'membership.end';
  return inAct(context, { kind, laboratoryId: assertion.laboratoryId }, async (act) => {
    const made = await assertMembership(context, assertion);
    if (assertion.role === 'signatory') {
      const { accountId, laboratoryId, state, validFrom, validTo } = assertion;
      await assertAuthorisation(context, {
        accountId,
        laboratoryId,
        what: 'sign calibrations',
        state,
        validFrom,
        validTo,
      });
    }
    act.record({ subject: { type: 'membership', id: made.id }, after: assertion });
    return made;
  });
}

const NETWORK_ROLES: readonly Role[] = ['registrar', 'comparison pilot'];

/**
 * Asserts that a person holds a role over some days, or no longer does. Nothing is overwritten: the latest
 * recorded assertion that covers a day speaks for it.
 * @throws AppError `unprocessable` for days in the wrong order or a role in the wrong place
 */
export async function assertMembership(
  context: Context,
  assertion: MembershipAssertion,
): Promise<{ id: string }> {
  if (assertion.validTo !== null && assertion.validTo < assertion.validFrom) {
    throw fieldError('validTo', {
      message: 'The last day lies before the first.',
      received: assertion.validTo,
      expected: `${assertion.validFrom} or later, or none`,
    });
  }
  if (NETWORK_ROLES.includes(assertion.role) !== (assertion.laboratoryId === null)) {
    throw fieldError('role', {
      message:
        assertion.laboratoryId === null
          ? 'This role is held in a laboratory; name the laboratory.'
          : 'This role is held in the network, not in one laboratory.',
      received: assertion.role,
    });
  }
  const kind = assertion.state === 'granted' ? 'membership.grant' : 'membership.end';
  return inAct(context, { kind, laboratoryId: assertion.laboratoryId }, async (act) => {
    const id = newId(context);
    await insertRow(membershipModel(context.database), { id, ...assertion });
    act.record({ subject: { type: 'membership', id }, after: assertion });
    return { id };
  });
}
