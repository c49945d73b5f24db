import { ENDPOINTS } from '@brakeven/contract';
import { createReader, listEntries, openDatabase, type ShopContext } from '@brakeven/use-cases';
import compression from 'compression';
import express, { type Express, Router } from 'express';
import { createServer } from 'node:http';
import { type AddressInfo } from 'node:net';
import pg from 'pg';
import { destination, pino } from 'pino';
/* eslint-disable @nx/enforce-module-boundaries -- The program itself is what is measured here; nothing else may import it. */
import { createApp } from '../../apps/api/src/app';
import { checkInput } from '../../apps/api/src/middleware/check-input';
import { requestLog } from '../../apps/api/src/middleware/request-log';
import { securityHeaders } from '../../apps/api/src/middleware/security-headers';
import { ProgressHub } from '../../apps/api/src/progress/progress-hub';
import { createSessionStore } from '../../apps/api/src/session/session-cookie';
/* eslint-enable @nx/enforce-module-boundaries */

/** What the bench tells this program in its first message; its answer is the port. */
export interface PageServerOptions {
  databaseUrl: string;
  sessionSecret: string;
  /** Whom every request is taken to come from; without it the whole API is served, and one has to sign in. */
  everybodyIs?: Omit<ShopContext, 'db' | 'now'>;
}

const logger = pino(destination({ dest: '/dev/null', sync: false }));

interface PageServer {
  app: Express;
  /** Ends its connections to the database. */
  close(): Promise<unknown>;
}

function createWholeApp({ databaseUrl, sessionSecret }: PageServerOptions): PageServer {
  const pool = new pg.Pool({ connectionString: databaseUrl, max: 4 });
  const db = openDatabase(databaseUrl);
  const app = createApp({
    db,
    sessionStore: createSessionStore(pool, (message) => logger.error(message)),
    sessionSecret,
    reader: createReader(),
    logger,
    progress: new ProgressHub(),
  });
  return { app, close: () => Promise.all([pool.end(), db.destroy()]) };
}

/** The page's own part of the API: all that a request passes through but session, account and permission. */
function createOpenApp({ databaseUrl }: PageServerOptions, who: Omit<ShopContext, 'db' | 'now'>): PageServer {
  const context = { ...who, db: openDatabase(databaseUrl) };
  const { listEntries: endpoint } = ENDPOINTS;
  const app = express();
  app.disable('x-powered-by');
  app.use(requestLog(logger), securityHeaders(), compression());
  const router = Router();
  router.use(express.json({ limit: '1mb' }));
  router.get(endpoint.path, async (request, response) => {
    const { query } = checkInput(endpoint, request, undefined);
    const answer = await listEntries(context, query as Parameters<typeof listEntries>[1]);
    response.set('Cache-Control', 'no-store').json(answer);
  });
  app.use('/api', router);
  return { app, close: () => context.db.destroy() };
}

process.once('message', (options: PageServerOptions) => {
  const { app, close } = options.everybodyIs
    ? createOpenApp(options, options.everybodyIs)
    : createWholeApp(options);
  const server = createServer(app);
  server.listen(0, '127.0.0.1', () => process.send?.((server.address() as AddressInfo).port));
  process.once('disconnect', () => void close().finally(() => process.exit()));
});
