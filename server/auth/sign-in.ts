import type { Request, RequestHandler, Response } from 'express';
import type { Passport } from 'passport';
import { AppError } from '#server/http/app-error.ts';
import type { Clock } from '#server/http/context.ts';
import { FailureLimit } from '#server/http/rate-limit.ts';
import { contextOf } from '#server/http/request-context.ts';
import type { User } from '#server/policy/user.ts';
import { SESSION_COOKIE } from './session.ts';

const WINDOW_MILLISECONDS = 15 * 60 * 1000;
/** Typing errors of one person fit; guessing does not. */
const FAILURES_PER_EMAIL = 10;
/** A laboratory behind one address fits. */
const FAILURES_PER_ADDRESS = 60;

type PassportInstance = InstanceType<typeof Passport>;

/** Gives each request's context its way to sign in and out. Failures are counted per application. */
export function sessionControl(passport: PassportInstance, clock: Clock): RequestHandler {
  const byEmail = new FailureLimit(clock, FAILURES_PER_EMAIL, WINDOW_MILLISECONDS);
  const byAddress = new FailureLimit(clock, FAILURES_PER_ADDRESS, WINDOW_MILLISECONDS);
  return (request, response, next) => {
    const signIn = async (email: string, password: string): Promise<User> => {
      const emailKey = email.toLowerCase();
      const addressKey = request.ip ?? 'unknown';
      byEmail.check(emailKey);
      byAddress.check(addressKey);
      // Noted before the password is checked, so that many attempts at once are counted too.
      byEmail.note(emailKey);
      byAddress.note(addressKey);
      const user = await userByPassword(passport, request, response, { email, password });
      if (!user) throw new AppError('sign-in-refused', 'Check the e-mail and the password, and try again.');
      byEmail.clear(emailKey);
      byAddress.takeBack(addressKey);
      await openSession(request, user);
      return user;
    };
    contextOf(request).session = { signIn, signOut: () => closeSession(request, response) };
    next();
  };
}

function userByPassword(
  passport: PassportInstance,
  request: Request,
  response: Response,
  credentials: { email: string; password: string },
): Promise<User | null> {
  return new Promise((resolve, reject) => {
    // Passport reads the body itself: it gets the parsed one.
    request.body = credentials;
    const done = (error: unknown, user?: User | false | null) =>
      error ? reject(error) : resolve(user || null);
    const handler = passport.authenticate('local', done) as RequestHandler;
    void handler(request, response, reject);
  });
}

/** Passport regenerates the session here: an id that someone planted before sign-in is worth nothing. */
function openSession(request: Request, user: User): Promise<void> {
  return new Promise((resolve, reject) => {
    request.logIn(user, (error: unknown) => (error ? reject(error) : resolve()));
  });
}

function closeSession(request: Request, response: Response): Promise<void> {
  return new Promise((resolve, reject) => {
    request.session.destroy((error: unknown) => {
      if (error) return reject(error);
      response.clearCookie(SESSION_COOKIE, { path: '/' });
      resolve();
    });
  });
}
