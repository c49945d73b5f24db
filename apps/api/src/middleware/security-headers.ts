import { type RequestHandler, type Response } from 'express';
import helmet from 'helmet';
import { randomBytes } from 'node:crypto';

/**
 * A strict policy: scripts, fonts, images and requests from this address only, nothing framed.
 *
 * Style sheets come from this address too, or carry the nonce of the page that was served: Angular and the grid
 * put their styles into the page as elements, and are told the nonce by the page. Style attributes are allowed,
 * since charts and overlays place themselves by them; an attribute cannot bring in a rule for anything else.
 */
export function securityHeaders(): RequestHandler[] {
  return [
    (_request, response, next) => {
      response.locals['styleNonce'] = randomBytes(16).toString('base64url');
      next();
    },
    helmet({
      contentSecurityPolicy: {
        useDefaults: false,
        directives: {
          defaultSrc: ["'self'"],
          scriptSrc: ["'self'"],
          styleSrc: ["'self'", (_request, response) => `'nonce-${findStyleNonce(response as Response)}'`],
          styleSrcAttr: ["'unsafe-inline'"],
          imgSrc: ["'self'", 'data:'],
          fontSrc: ["'self'", 'data:'],
          connectSrc: ["'self'"],
          objectSrc: ["'none'"],
          baseUri: ["'self'"],
          formAction: ["'self'"],
          frameAncestors: ["'none'"],
        },
      },
      crossOriginEmbedderPolicy: false,
      referrerPolicy: { policy: 'same-origin' },
      // A shop runs this on its own network without https as well; whoever puts https in front adds it there.
      strictTransportSecurity: false,
      xFrameOptions: { action: 'deny' },
    }),
  ];
}

/** The nonce that style elements of this answer's page carry. */
export function findStyleNonce(response: Response): string {
  return String(response.locals['styleNonce']);
}
