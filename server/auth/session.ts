import ConnectSessionSequelize from 'connect-session-sequelize';
import session from 'express-session';
import type { RequestHandler } from 'express';
import { DataTypes, type Sequelize } from 'sequelize';

/** Name of the cookie; it holds a signed random id and nothing else. */
export const SESSION_COOKIE = 'exagium.session';

/** A working day and an evening: after this the person signs in again. */
const SESSION_MILLISECONDS = 12 * 60 * 60 * 1000;
const CLEANING_MILLISECONDS = 15 * 60 * 1000;

export interface SessionStore {
  middleware: RequestHandler;
  /** Stops the timer that removes expired sessions. */
  close(): void;
}

/** Sessions in MariaDB, in the table of the migrations; the cookie holds only a signed random id. */
export function sessionStore(database: Sequelize, secret: string, isBehindTls: boolean): SessionStore {
  const Store = ConnectSessionSequelize(session.Store);
  database.define(
    'session',
    {
      sid: { type: DataTypes.STRING(64), primaryKey: true },
      expires: DataTypes.DATE(3),
      data: DataTypes.TEXT,
    },
    { tableName: 'session', timestamps: true },
  );
  // A session lasts a fixed time: no write on every read. (The library's types leave the option out.)
  const options = {
    db: database,
    table: 'session',
    expiration: SESSION_MILLISECONDS,
    checkExpirationInterval: CLEANING_MILLISECONDS,
    disableTouch: true,
  };
  const store = new Store(options);
  const middleware = session({
    name: SESSION_COOKIE,
    secret,
    store,
    resave: false,
    saveUninitialized: false,
    cookie: { httpOnly: true, sameSite: 'lax', secure: isBehindTls, maxAge: SESSION_MILLISECONDS, path: '/' },
  });
  return { middleware, close: () => store.stopExpiringSessions() };
}
