import { AppError } from '@brakeven/contract';
import { type Request, type Response } from 'express';
import { createHmac, randomBytes, timingSafeEqual } from 'node:crypto';

/** Names that Angular's HTTP client knows. */
export const TOKEN_COOKIE = 'XSRF-TOKEN';
export const TOKEN_HEADER = 'X-XSRF-TOKEN';

const NO_SESSION = 'signed out';

/**
 * Tokens against requests that another page makes in a visitor's name: the page reads the cookie and sends it back
 * in a header, which a page of another address can neither read nor set. A token is an HMAC over the session's id,
 * so it ends with the session. Before sign-in there is no session to bind it to; then, as always, the browser's own
 * word on where a request comes from is checked as well.
 */
export class CsrfTokens {
  private readonly key: Buffer;

  constructor(secret: string) {
    this.key = createHmac('sha256', secret).update('brakeven csrf').digest();
  }

  /** Hands the page a token for the session as it is now. */
  issue(request: Request, response: Response): void {
    const nonce = randomBytes(16).toString('base64url');
    response.cookie(TOKEN_COOKIE, `${nonce}.${this.sign(nonce, request)}`, {
      sameSite: 'lax',
      secure: request.secure,
      path: '/',
    });
  }

  /** @throws AppError `token_missing` if the request does not come from our own page */
  check(request: Request): void {
    const [nonce, signature] = (request.get(TOKEN_HEADER) ?? '').split('.');
    const isOurs = nonce && signature && isSame(signature, this.sign(nonce, request));
    if (!isOurs || !isSameOrigin(request)) {
      throw new AppError('token_missing', 'This page has grown old. Load it again and repeat the last step.');
    }
  }

  private sign(nonce: string, request: Request): string {
    const session = request.session.userId ? request.sessionID : NO_SESSION;
    return createHmac('sha256', this.key).update(`${session} ${nonce}`).digest('base64url');
  }
}

/** Browsers tell where a request comes from; programs that tell nothing hold a token all the same. */
function isSameOrigin(request: Request): boolean {
  const site = request.get('Sec-Fetch-Site');
  if (site !== undefined) return site === 'same-origin' || site === 'none';
  const origin = request.get('Origin');
  return origin === undefined || findHost(origin) === request.get('Host');
}

function findHost(origin: string): string | undefined {
  return URL.canParse(origin) ? new URL(origin).host : undefined;
}

function isSame(given: string, expected: string): boolean {
  const [a, b] = [Buffer.from(given), Buffer.from(expected)];
  return a.length === b.length && timingSafeEqual(a, b);
}
