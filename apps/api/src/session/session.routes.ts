import { AppError, ENDPOINTS } from '@brakeven/contract';
import { changePassword } from '@brakeven/use-cases';
import { type Request, type RequestHandler } from 'express';
import { type Api } from '../api';
import { type CsrfTokens } from './csrf-tokens';
import { type Authenticate } from './password-strategy';
import { SESSION_COOKIE } from './session-cookie';

export interface SessionDependencies {
  tokens: CsrfTokens;
  authenticate: Authenticate;
  rateLimit: RequestHandler;
}

/** Sign-in, sign-out, the own password. */
export function mountSession({ mount }: Api, { tokens, authenticate, rateLimit }: SessionDependencies): void {
  mount(ENDPOINTS.getSession, ({ request, response, signedIn }) => {
    tokens.issue(request, response);
    return signedIn.session;
  });

  mount(
    ENDPOINTS.signIn,
    async ({ body, request, response }) => {
      if (body.email === '' || body.password === '') {
        throw new AppError('sign_in_refused', 'E-mail or password is not right.');
      }
      const session = await authenticate(request, response);
      await regenerate(request);
      request.session.userId = session.user.userId;
      request.session.shopId = session.shop.shopId;
      tokens.issue(request, response);
      return session;
    },
    { before: [rateLimit] },
  );

  mount(ENDPOINTS.signOut, async ({ request, response }) => {
    await regenerate(request);
    response.clearCookie(SESSION_COOKIE, { path: '/' });
    tokens.issue(request, response);
  });

  mount(ENDPOINTS.changePassword, ({ context, body, request }) =>
    changePassword(context, body, { keepSessionId: request.sessionID }),
  );
}

/** Ends the session and begins an empty one under a new id, so that nobody can have planted the id. */
function regenerate(request: Request): Promise<void> {
  return new Promise((resolve, reject) => {
    request.session.regenerate((error: unknown) => (error ? reject(error) : resolve()));
  });
}
