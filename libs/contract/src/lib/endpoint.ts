import { type z } from 'zod';
import { type Permission } from './roles';

export type Method = 'get' | 'post' | 'patch' | 'delete';

/** One route of the API: what it takes, what it answers, and the permission without which it refuses. */
export interface Endpoint {
  method: Method;
  /** Express path below `/api`, for example `/jobs/:jobId`. */
  path: string;
  summary: string;
  /** `null`: open to everybody, signed in or not. */
  permission: Permission | null;
  params?: z.ZodType;
  query?: z.ZodType;
  body?: z.ZodType;
  /** Multipart upload of one file in the part `file`; `body` then describes the JSON in the part `options`. */
  upload?: true;
  /** Answers carry the document's version as `ETag`; whoever changes it sends the one it was read with in `If-Match`. */
  versioned?: true;
  /** `null`: no content; a media type: a file or a stream. */
  response: z.ZodType | null | string;
}

/** Keeps the literal types of an endpoint's schemas. */
export const endpoint = <const E extends Endpoint>(definition: E): E => definition;
