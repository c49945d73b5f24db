import { AppError } from '@brakeven/contract';
import { type RequestHandler } from 'express';
import { rateLimit } from 'express-rate-limit';

const WINDOW_MINUTES = 15;

/** Limits failed sign-ins from one network address, whatever accounts they try. */
export function signInRateLimit(failuresMax: number): RequestHandler {
  return rateLimit({
    windowMs: WINDOW_MINUTES * 60_000,
    limit: failuresMax,
    skipSuccessfulRequests: true,
    standardHeaders: 'draft-8',
    legacyHeaders: false,
    // Without a proxy in front the header is somebody's invention, and is not looked at.
    validate: { xForwardedForHeader: false },
    handler: (_request, _response, next) => {
      const message = `Too many attempts from this network. Wait ${WINDOW_MINUTES} minutes, then try again.`;
      next(new AppError('too_many_requests', message));
    },
  });
}
