import { type Method, type Problem, type Role, ROLES } from '@brakeven/contract';
import { createTestShop, type TestShop } from '@brakeven/test-shop';
import { changePassword, createReader, createUser } from '@brakeven/use-cases';
import { createServer } from 'node:http';
import { type AddressInfo } from 'node:net';
import pg from 'pg';
import { pino } from 'pino';
import request, { type Agent, type Response, type Test } from 'supertest';
/* eslint-disable @nx/enforce-module-boundaries -- The program itself is what is tested here; nothing else may import it. */
import { type AppDependencies, createApp } from '../../apps/api/src/app';
import { ProgressHub } from '../../apps/api/src/progress/progress-hub';
import { createSessionStore } from '../../apps/api/src/session/session-cookie';
/* eslint-enable @nx/enforce-module-boundaries */

// Starting takes a second or two, and more where many suites run at once.
jest.setTimeout(60_000);

export const PASSWORD = 'correct horse battery';
export const SESSION_SECRET = 'a secret for tests, long enough to be one';

export interface Account {
  userId: string;
  email: string;
  role: Role;
}

/** The API over a shop of its own in the test database, with an account for each role. */
export interface TestApi {
  shop: TestShop;
  address: string;
  progress: ProgressHub;
  accounts: Record<Role, Account>;
  /** A browser that has fetched a token and is not signed in. */
  visit(): Promise<Visitor>;
  /** A browser in which somebody of this role is signed in. */
  signIn(role: Role): Promise<Visitor>;
  addAccount(role: Role, options?: AccountOptions): Promise<Account>;
  close(): Promise<void>;
}

interface AccountOptions {
  employeeId?: string | null;
  isTemporary?: boolean;
}

/** Starts the API on a free port, with whatever a test wants otherwise. */
export async function startTestApi(overrides: Partial<AppDependencies> = {}): Promise<TestApi> {
  const shop = await createTestShop();
  const pool = new pg.Pool({ connectionString: process.env['DATABASE_URL'], max: 2 });
  const progress = new ProgressHub();
  const sessionStore = createSessionStore(pool, () => undefined);
  const app = createApp({
    db: shop.db,
    sessionStore,
    sessionSecret: SESSION_SECRET,
    reader: createReader(),
    logger: pino({ level: 'silent' }),
    progress,
    checkAnswers: true,
    ...overrides,
  });
  const server = createServer(app);
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const address = `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
  const addAccount = (role: Role, options?: AccountOptions) => addAccountTo(shop, role, options);
  const accounts = await addAccountOfEachRole(addAccount);
  const visit = () => Visitor.arrive(address);
  return {
    shop,
    address,
    progress,
    accounts,
    visit,
    signIn: async (role) => (await visit()).signIn(accounts[role].email),
    addAccount,
    close: async () => {
      progress.end();
      server.closeAllConnections();
      await new Promise((resolve) => server.close(resolve));
      sessionStore.close();
      await Promise.all([shop.close(), pool.end()]);
    },
  };
}

async function addAccountOfEachRole(add: TestApi['addAccount']): Promise<TestApi['accounts']> {
  const pairs = await Promise.all(ROLES.map(async (role) => [role, await add(role)] as const));
  return Object.fromEntries(pairs) as TestApi['accounts'];
}

async function addAccountTo(
  shop: TestShop,
  role: Role,
  { employeeId = null, isTemporary = false }: AccountOptions = {},
): Promise<Account> {
  const email = `${role}-${Math.random().toString(36).slice(2)}@ternhollow.example`;
  const created = await createUser(shop.context(), { name: `The ${role}`, email, role, employeeId });
  const { userId } = created.user;
  const context = shop.context(role);
  const change = { currentPassword: created.temporaryPassword, newPassword: PASSWORD };
  await changePassword({ ...context, actor: { ...context.actor, userId } }, change, { keepSessionId: null });
  if (isTemporary) {
    await shop.inShop((trx) =>
      trx.updateTable('userAccount').set({ mustChangePassword: true }).where('userId', '=', userId).execute(),
    );
  }
  return { userId, email, role };
}

/** A browser at our page: keeps cookies and sends the token of the last answer back, as the web application does. */
export class Visitor {
  token: string | undefined;

  private constructor(
    readonly agent: Agent,
    readonly address: string,
  ) {}

  static async arrive(address: string): Promise<Visitor> {
    const visitor = new Visitor(request.agent(address), address);
    await visitor.send('get', '/session');
    return visitor;
  }

  async signIn(email: string, password = PASSWORD): Promise<Visitor> {
    const response = await this.send('post', '/session', { email, password });
    if (response.status !== 200) throw new Error(`Sign-in was refused: ${response.text}`);
    return this;
  }

  async send(method: Method, path: string, body?: object): Promise<Response> {
    const response = await (body === undefined
      ? this.open(method, path)
      : this.open(method, path).send(body));
    this.takeToken(response);
    return response;
  }

  /** Sends a file, and options if there are any. */
  async upload(
    path: string,
    file: { name: string; bytes: Buffer } | null,
    options?: object,
  ): Promise<Response> {
    let test = this.open('post', path);
    if (options) test = test.field('options', JSON.stringify(options));
    if (file) test = test.attach('file', file.bytes, file.name);
    return test;
  }

  /** A request with the token in its header, to be sent by the caller. */
  open(method: Method, path: string): Test {
    const test = this.agent[method](`/api${path}`);
    return this.token === undefined ? test : test.set('X-XSRF-TOKEN', this.token);
  }

  private takeToken(response: Response): void {
    const cookies = ([] as string[]).concat(response.headers['set-cookie'] ?? []);
    const found = cookies.map((cookie) => /^XSRF-TOKEN=([^;]+)/.exec(cookie)?.[1]).find(Boolean);
    if (found) this.token = decodeURIComponent(found);
  }
}

/** What a refusal says, after checking that it has the shape of every refusal. */
export function readProblem(response: Response): Problem {
  expect(response.headers['content-type']).toMatch(/^application\/problem\+json/);
  const problem = response.body as Problem;
  expect(problem).toMatchObject({
    type: 'about:blank',
    title: expect.any(String),
    status: response.status,
    detail: expect.any(String),
    code: expect.any(String),
    requestId: response.headers['x-request-id'],
    issues: expect.any(Array),
  });
  return problem;
}
