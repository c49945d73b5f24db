import { type Session } from '@brakeven/contract';
import { type Database, signIn } from '@brakeven/use-cases';
import { type Request, type Response } from 'express';
import { Passport } from 'passport';
import { Strategy } from 'passport-local';

/** Signs in by the e-mail address and password of a request's body. */
export type Authenticate = (request: Request, response: Response) => Promise<Session>;

/** passport-local over the use case; the session is ours to make, so that passport keeps none. */
export function createAuthenticate(db: Database): Authenticate {
  const passport = new Passport();
  passport.use(
    new Strategy(
      { usernameField: 'email', passwordField: 'password', session: false },
      (email, password, done) => {
        signIn({ db }, { email, password }).then(
          (session) => done(null, session),
          (error: unknown) => done(error),
        );
      },
    ),
  );
  return (request, response) =>
    new Promise((resolve, reject) => {
      const handle = passport.authenticate(
        'local',
        { session: false },
        (error: unknown, session: Session | false | undefined) =>
          session ? resolve(session) : reject(error ?? new Error('Passport saw no credentials.')),
      ) as (request: Request, response: Response, next: (error?: unknown) => void) => void;
      handle(request, response, reject);
    });
}
