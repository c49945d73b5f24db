import { AppError, type Endpoint } from '@brakeven/contract';
import { type Request, type Response } from 'express';

/**
 * The version that a change of a document was made on, from `If-Match`; undefined for `*`, and where there is none.
 * @throws AppError `version_missing` where one is needed
 */
export function readVersion(endpoint: Endpoint, request: Request): string | undefined {
  if (!endpoint.versioned || endpoint.method === 'get') return undefined;
  const given = request.get('If-Match')?.trim();
  if (given === '*') return undefined;
  // A proxy that compresses marks the tag as weak; it is one version all the same.
  const version = /^(?:W\/)?"([^"]+)"$/.exec(given ?? '')?.[1];
  if (version !== undefined) return version;
  const message =
    'Send the ETag that this was read with in the header If-Match, so that no change of somebody else is lost.';
  throw new AppError('version_missing', message);
}

/** Puts the version of the document that is answered into `ETag`. */
export function setVersion(response: Response, version: string): void {
  response.set('ETag', `"${version}"`);
}
