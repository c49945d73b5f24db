import { closeDatabase, createReader, openDatabase } from '@brakeven/use-cases';
import { createServer, type Server } from 'node:http';
import { type AddressInfo } from 'node:net';
import pg from 'pg';
import { pino } from 'pino';
import { createApp } from './app';
import { type Environment, readEnvironment } from './environment';
import { ProgressHub } from './progress/progress-hub';
import { createSessionStore } from './session/session-cookie';
import { limitReader } from './timesheets/limited-reader';

/** How long requests under way may take to end once the program is told to stop. */
const STOP_MS = 10_000;
/** Reading a large workbook may take half a gigabyte. */
const FILES_READ_MAX = 2;

function start(environment: Environment): void {
  const logger = pino({ level: environment.LOG_LEVEL });
  const db = openDatabase(environment.DATABASE_URL);
  const pool = new pg.Pool({
    connectionString: environment.DATABASE_URL,
    max: 4,
    connectionTimeoutMillis: 5_000,
    application_name: 'brakeven sessions',
  });
  pool.on('error', (error) => logger.warn({ err: error }, 'an idle connection was lost'));
  const sessionStore = createSessionStore(pool, (message) => logger.error({ message }, 'session store'));
  const reader = createReader({ workerUrl: new URL('./read-worker.js', import.meta.url) });
  const progress = new ProgressHub();
  const app = createApp({
    db,
    progress,
    sessionStore,
    sessionSecret: environment.SESSION_SECRET,
    reader: limitReader(reader, FILES_READ_MAX),
    logger,
    webRoot: environment.WEB_ROOT,
    proxies: environment.TRUST_PROXY,
    checkAnswers: environment.NODE_ENV !== 'production',
  });
  const server = createServer(app);
  server.once('error', (error) => {
    logger.fatal({ err: error }, 'cannot listen');
    process.exit(1);
  });
  server.listen(environment.PORT, environment.HOST, () => {
    const { address, port } = server.address() as AddressInfo;
    logger.info({ address, port }, 'listening');
  });
  const stop = async (signal: NodeJS.Signals): Promise<void> => {
    logger.info({ signal }, 'stopping');
    progress.end();
    await closeServer(server);
    sessionStore.close();
    await Promise.all([closeDatabase(db), pool.end()]);
  };
  for (const signal of ['SIGINT', 'SIGTERM'] as const) process.once(signal, () => void stop(signal));
}

/** Takes no new requests, lets those under way end, and cuts off what takes longer, such as open streams. */
async function closeServer(server: Server): Promise<void> {
  const cut = setTimeout(() => server.closeAllConnections(), STOP_MS);
  await new Promise<void>((resolve) => {
    server.close(() => resolve());
    server.closeIdleConnections();
  });
  clearTimeout(cut);
}

try {
  start(readEnvironment(process.env));
} catch (error) {
  process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
  process.exitCode = 2;
}
