import { inAct } from '#server/db/act.ts';
import { insertRow } from '#server/db/base-model.ts';
import { newId, type Context } from '#server/http/context.ts';
import { accountModel, accountPasswordModel } from './account.model.ts';
import { hashPassword } from './password.ts';

export interface NewAccount {
  email: string;
  name: string;
  /** Without one nobody can sign in with a password. */
  password?: string;
  /** Instead of `password`: a hash made before by `hashPassword`, where many accounts share one. */
  passwordHash?: string;
}

/**
 * Opens an account. E-mails are unique without regard to case.
 * @throws AppError `duplicate` for an e-mail that has an account
 */
export async function createAccount(context: Context, account: NewAccount): Promise<{ id: string }> {
  const argon2id = account.passwordHash ?? (account.password ? await hashPassword(account.password) : null);
  return inAct(context, { kind: 'account.create', laboratoryId: null }, async (act) => {
    const id = newId(context);
    const { email, name } = account;
    await insertRow(accountModel(context.database), { id, email, name });
    if (argon2id) await insertRow(accountPasswordModel(context.database), { accountId: id, argon2id });
    act.record({ subject: { type: 'account', id }, after: { email, name, hasPassword: argon2id !== null } });
    return { id };
  });
}

/** Sets a new password; the one before no longer counts. The act says that it was set, never what it is. */
export async function setPassword(
  context: Context,
  change: { accountId: string; password: string },
): Promise<void> {
  const argon2id = await hashPassword(change.password);
  await inAct(context, { kind: 'account.password', laboratoryId: null }, async (act) => {
    await insertRow(accountPasswordModel(context.database), { accountId: change.accountId, argon2id });
    act.record({ subject: { type: 'account', id: change.accountId }, after: { hasPassword: true } });
  });
}
