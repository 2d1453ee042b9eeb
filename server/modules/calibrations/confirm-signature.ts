import { fieldError } from '#server/http/app-error.ts';
import type { Clock } from '#server/http/context.ts';
import { FailureLimit } from '#server/http/rate-limit.ts';
import type { SignedInContext } from '#server/http/route.ts';
import { verifyPassword } from '#server/modules/identity/index.ts';

const MAXIMUM_FAILURES = 10;
const WINDOW_MILLISECONDS = 15 * 60 * 1000;

const limits = new WeakMap<Clock, FailureLimit>();

/**
 * The password is the signature: it is asked for again, and guessing is counted over all acts that ask for it.
 * @param otherwise what a wrong password leaves undone, as a sentence
 * @throws AppError `unprocessable` on password, `too-many-requests`
 */
export async function confirmSignature(
  context: SignedInContext,
  password: string,
  otherwise: string,
): Promise<void> {
  const { accountId, email } = context.user;
  const limit = limitOf(context.clock);
  limit.check(accountId);
  const person = await verifyPassword(context.database, context.clock, email, password);
  if (person?.accountId === accountId) {
    limit.clear(accountId);
    return;
  }
  limit.note(accountId);
  throw fieldError('password', {
    message: `This is not your password. ${otherwise}`,
    expected: 'the password you sign in with',
  });
}

function limitOf(clock: Clock): FailureLimit {
  const known = limits.get(clock) ?? new FailureLimit(clock, MAXIMUM_FAILURES, WINDOW_MILLISECONDS);
  limits.set(clock, known);
  return known;
}
