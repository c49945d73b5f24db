import { type Endpoint } from '@brakeven/contract';
import { type Database, type SessionUser, type ShopContext } from '@brakeven/use-cases';
import { type Request, type RequestHandler, type Response, type Router } from 'express';
import { type z } from 'zod';
import { checkInput } from './middleware/check-input';
import { readVersion } from './middleware/document-version';
import { type UploadedFile, readUpload } from './middleware/file-upload';
import { type CsrfTokens } from './session/csrf-tokens';
import { authorize } from './session/authorize';

type Parsed<E, Part extends 'params' | 'query' | 'body'> =
  E extends Record<Part, infer S extends z.ZodType> ? z.output<S> : undefined;

/** What a handler is given: parsed input in new objects, never the request's own. */
interface PublicCall<E> {
  params: Parsed<E, 'params'>;
  query: Parsed<E, 'query'>;
  body: Parsed<E, 'body'>;
  file: E extends { upload: true } ? UploadedFile : undefined;
  /** Of a versioned document: the version that the change was made on; undefined to replace whatever is there. */
  version: string | undefined;
  /** For the session and for streams; everything else comes parsed. */
  request: Request;
  response: Response;
}
interface SignedInCall<E> extends PublicCall<E> {
  context: ShopContext;
  signedIn: SessionUser;
}
export type Call<E> = E extends { permission: null } ? PublicCall<E> : SignedInCall<E>;

/** A document to be saved under a name. */
export interface FileAnswer {
  name: string;
  bytes: Uint8Array;
}

/** JSON as the contract says, nothing, a file, or nothing because the handler streams by itself. */
export type Answer<E> = E extends { response: infer S }
  ? S extends z.ZodType
    ? z.input<S>
    : S extends null
      ? void
      : FileAnswer | void
  : never;

export type Handler<E> = (call: Call<E>) => Promise<Answer<E>> | Answer<E>;

/** Puts one endpoint of the contract on the router. */
export type Mount = <const E extends Endpoint>(
  endpoint: E,
  handler: Handler<E>,
  options?: { before?: readonly RequestHandler[] },
) => void;

export interface MountDependencies {
  db: Database;
  tokens: CsrfTokens;
  /** Whether answers are held against the contract, in development and in tests. */
  checkAnswers: boolean;
}

/**
 * The one place through which every request to an endpoint passes: who is it, may they, is it our own page that
 * asks, is the input as the contract says; then the handler; then the answer.
 */
export function createMount(router: Router, dependencies: MountDependencies): Mount {
  return (endpoint, handler, { before = [] } = {}) => {
    const run: RequestHandler = async (request, response) => {
      const signedIn = await authorize(dependencies, request, response, endpoint.permission);
      if (endpoint.method !== 'get') dependencies.tokens.check(request);
      const version = readVersion(endpoint, request);
      const upload = endpoint.upload ? await readUpload(request, response) : undefined;
      const call = {
        ...checkInput(endpoint, request, upload?.options),
        file: upload?.file,
        version,
        request,
        response,
        ...signedIn,
      };
      // The parts were made by the schemas of this very endpoint, which the compiler cannot follow through them.
      const answer = await handler(call as unknown as Parameters<typeof handler>[0]);
      sendAnswer(endpoint, answer, response, dependencies.checkAnswers);
    };
    router[endpoint.method](endpoint.path, ...before, run);
  };
}

function sendAnswer(endpoint: Endpoint, answer: unknown, response: Response, checkAnswers: boolean): void {
  if (response.headersSent) return;
  if (endpoint.response === null) {
    response.status(204).end();
  } else if (typeof endpoint.response === 'string') {
    sendFile(endpoint.response, answer as FileAnswer, response);
  } else {
    if (checkAnswers) endpoint.response.parse(answer);
    response.set('Cache-Control', 'no-store').json(answer);
  }
}

/** Documents carry an ETag, which `send` makes of their bytes, and are asked for anew each time. */
function sendFile(mediaType: string, file: FileAnswer, response: Response): void {
  response.set('Cache-Control', 'private, no-cache').attachment(file.name).type(mediaType);
  response.send(Buffer.from(file.bytes));
}
