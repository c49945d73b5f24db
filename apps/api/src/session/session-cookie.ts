import { LIMITS } from '@brakeven/contract';
import connectPgSimple from 'connect-pg-simple';
import { type RequestHandler } from 'express';
import session, { type Store } from 'express-session';
import { type Pool } from 'pg';

declare module 'express-session' {
  interface SessionData {
    userId: string;
    shopId: string;
  }
}

/** Name of the cookie that holds the signed session id. */
export const SESSION_COOKIE = 'brakeven.sid';

/** Keeps sessions in PostgreSQL; a session is never written again, so it ends so many hours after sign-in. */
export function createSessionStore(
  pool: Pool,
  onError: (message: string) => void,
): Store & { close(): void } {
  const PgStore = connectPgSimple(session);
  return new PgStore({
    pool,
    tableName: 'session',
    disableTouch: true,
    pruneSessionInterval: 15 * 60,
    errorLog: (...parts: unknown[]) => onError(parts.map(String).join(' ')),
  });
}

/** The session of a request: whose it is and in which shop, nothing else. */
export function sessionCookie(store: Store, secret: string): RequestHandler {
  return session({
    store,
    secret,
    name: SESSION_COOKIE,
    resave: false,
    rolling: false,
    saveUninitialized: false,
    unset: 'destroy',
    cookie: {
      httpOnly: true,
      sameSite: 'lax',
      secure: 'auto',
      path: '/',
      maxAge: LIMITS.sessionHours * 3_600_000,
    },
  });
}
