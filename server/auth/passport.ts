import { Passport } from 'passport';
import { Strategy as LocalStrategy } from 'passport-local';
import type { Sequelize } from 'sequelize';
import { userByAccountId, verifyPassword } from '#server/modules/identity/index.ts';
import type { Clock } from '#server/http/context.ts';

/** Passport with its own state per application. The session holds the account's id; roles are read per request. */
export function makePassport(database: Sequelize, clock: Clock): InstanceType<typeof Passport> {
  const passport = new Passport();
  passport.use(
    new LocalStrategy({ usernameField: 'email' }, (email, password, done) => {
      verifyPassword(database, clock, email, password).then(
        (user) => done(null, user ?? false),
        (error: unknown) => done(error),
      );
    }),
  );
  passport.serializeUser((user, done) => done(null, user.accountId));
  passport.deserializeUser((accountId: string, done) => {
    userByAccountId(database, clock, accountId).then(
      (user) => done(null, user ?? false),
      (error: unknown) => done(error),
    );
  });
  return passport;
}
