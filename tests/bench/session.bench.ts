import { changePassword, createUser } from '@brakeven/use-cases';
import { type ChildProcess, fork } from 'node:child_process';
import { once } from 'node:events';
import { Agent, get } from 'node:http';
import { fileURLToPath } from 'node:url';
import { type Bench, type BenchDatabase } from './bench';
import { type BenchShop, createBenchShop } from './bench-shop';
import { alternate, timeMs } from './measure';
import { type PageServerOptions } from './page-server';

const ENTRIES = 20_000;
const PAGE = '/api/entries?limit=100';
const REQUESTS = 200;
const AT_ONCE = 8;
const ROUNDS = 5;
const EMAIL = 'owner@ternhollow.example';
const PASSWORD = 'correct horse battery';

const bench: Bench = async ({ makeDatabase }) => {
  const database = await makeDatabase('bench_session');
  const shop = await createBenchShop(database, ENTRIES / 100);
  await shop.addHistory({ entries: ENTRIES, entriesPerDay: 80 });
  await shop.tidy();
  await addOwner(shop);
  const { actor } = shop.owner;
  const signedIn = await startServer(database);
  const open = await startServer(database, { shop: shop.shop, actor });
  const headers = { cookie: await signIn(signedIn.address) };
  await assertSamePage(signedIn.address, headers, open.address);
  const taken = await alternate(ROUNDS, {
    signedIn: () => timeMs(() => ask(signedIn.address, headers)),
    open: () => timeMs(() => ask(open.address, {})),
  });
  agent.destroy();
  await Promise.all([signedIn, open].map(stopServer));
  await shop.close();
  const perSecond = (ms: number): string => `${Math.round((REQUESTS / ms) * 1_000)} requests/s`;
  return [
    {
      measure: 'signed-in grid page, share of the requests/s of the page without session',
      ratio: taken.open / taken.signedIn,
      aim: { atLeast: 0.5 },
      detail: `signed in ${perSecond(taken.signedIn)} against ${perSecond(taken.open)}, ${AT_ONCE} at once, median of ${ROUNDS}`,
    },
  ];
};
export default bench;

async function addOwner({ owner }: BenchShop): Promise<void> {
  const body = { name: 'The owner', email: EMAIL, role: 'owner', employeeId: null } as const;
  const { user, temporaryPassword } = await createUser(owner, body);
  const own = { ...owner, actor: { ...owner.actor, userId: user.userId } };
  const change = { currentPassword: temporaryPassword, newPassword: PASSWORD };
  await changePassword(own, change, { keepSessionId: null });
}

/** In a process of its own, so that asking and answering do not share a thread. */
async function startServer(
  database: BenchDatabase,
  everybodyIs?: PageServerOptions['everybodyIs'],
): Promise<{ server: ChildProcess; address: string }> {
  const server = fork(fileURLToPath(new URL('./page-server.js', import.meta.url)), {
    env: { ...process.env, NODE_ENV: 'production' },
  });
  const options: PageServerOptions = {
    databaseUrl: database.DATABASE_URL,
    sessionSecret: database.SESSION_SECRET,
    everybodyIs,
  };
  server.send(options);
  const [port] = (await once(server, 'message')) as [number];
  return { server, address: `http://127.0.0.1:${port}` };
}

/** Waits until its connections to the database are ended, so that the cluster may be stopped. */
async function stopServer({ server }: { server: ChildProcess }): Promise<void> {
  const exited = once(server, 'exit');
  server.disconnect();
  await exited;
}

/** @returns the cookies of the session */
async function signIn(address: string): Promise<string> {
  const visit = await fetch(`${address}/api/session`);
  const token = readCookies(visit).find((cookie) => cookie.startsWith('XSRF-TOKEN=')) ?? '';
  const response = await fetch(`${address}/api/session`, {
    method: 'post',
    headers: {
      'content-type': 'application/json',
      cookie: readCookies(visit).join('; '),
      'x-xsrf-token': decodeURIComponent(token.slice('XSRF-TOKEN='.length)),
    },
    body: JSON.stringify({ email: EMAIL, password: PASSWORD }),
  });
  if (!response.ok) throw new Error(`Sign-in was refused: ${await response.text()}`);
  return readCookies(response).join('; ');
}

function readCookies(response: Response): string[] {
  return response.headers.getSetCookie().map((cookie) => cookie.split(';')[0] ?? '');
}

async function assertSamePage(signedIn: string, headers: Headers, open: string): Promise<void> {
  const [ours, theirs] = await Promise.all([
    fetch(`${signedIn}${PAGE}`, { headers }).then((response) => response.text()),
    fetch(`${open}${PAGE}`).then((response) => response.text()),
  ]);
  if (ours !== theirs || !ours.includes('"nextCursor"')) throw new Error('The two pages are not the same.');
}

type Headers = Record<string, string>;

const agent = new Agent({ keepAlive: true, maxSockets: AT_ONCE });

async function ask(address: string, headers: Headers): Promise<void> {
  let left = REQUESTS;
  const askOn = async (): Promise<void> => {
    while (left > 0) {
      left -= 1;
      await askOnce(`${address}${PAGE}`, headers);
    }
  };
  await Promise.all(Array.from({ length: AT_ONCE }, askOn));
}

function askOnce(url: string, headers: Headers): Promise<void> {
  return new Promise((resolve, reject) => {
    get(url, { agent, headers }, (response) => {
      response.resume();
      response.once('end', () =>
        response.statusCode === 200
          ? resolve()
          : reject(new Error(`The page answered ${response.statusCode}.`)),
      );
    }).once('error', reject);
  });
}
