import { type RequestHandler } from 'express';
import { type Logger } from 'pino';
import { pinoHttp } from 'pino-http';
import { v7 as newId } from 'uuid';

/** One line of JSON a request: who, what, how long, which status; no bodies, no cookies, no query. */
export function requestLog(logger: Logger): RequestHandler {
  return pinoHttp({
    logger,
    genReqId: (_request, response) => {
      const id = newId();
      response.setHeader('X-Request-Id', id);
      return id;
    },
    autoLogging: { ignore: (request) => request.url === '/api/health' },
    customLogLevel: (_request, response) => (response.statusCode >= 500 ? 'error' : 'info'),
    customProps: (_request, response) => ({
      userId: (response as { locals?: { userId?: string } }).locals?.userId,
    }),
    serializers: {
      req: ({ id, method, url }: { id: string; method: string; url: string }) => ({
        id,
        method,
        path: url.split('?')[0],
      }),
      res: ({ statusCode }: { statusCode: number }) => ({ statusCode }),
    },
  });
}
