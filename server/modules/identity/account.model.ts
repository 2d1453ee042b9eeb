import { DataTypes } from 'sequelize';
import type { Role } from '#shared/contracts/identity.ts';
import { ID, registerModel } from '#server/db/register-model.ts';

export interface AccountRow {
  id: string;
  email: string;
  name: string;
}

/** A person who may sign in. An account is never removed; its roles end. */
export const accountModel = registerModel<AccountRow>('account', {
  id: { type: ID, primaryKey: true },
  email: DataTypes.STRING(254),
  name: DataTypes.STRING(120),
});

export interface AccountPasswordRow {
  accountId: string;
  argon2id: string;
}

/** The password's hash; the newest row of an account counts. */
export const accountPasswordModel = registerModel<AccountPasswordRow>('account_password', {
  accountId: { type: ID, primaryKey: true },
  argon2id: DataTypes.STRING(200),
});

export interface MembershipRow {
  id: string;
  accountId: string;
  laboratoryId: string | null;
  role: Role;
  state: 'granted' | 'ended';
  validFrom: string;
  validTo: string | null;
}

/** An assertion that a person holds a role, in a laboratory or in the network, over some days. */
export const membershipModel = registerModel<MembershipRow>('membership', {
  id: { type: ID, primaryKey: true },
  accountId: ID,
  laboratoryId: ID,
  role: DataTypes.STRING(40),
  state: DataTypes.STRING(10),
  validFrom: DataTypes.DATEONLY,
  validTo: DataTypes.DATEONLY,
});
