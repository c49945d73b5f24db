import { type Endpoint, ENDPOINTS, hasPermission, PERMISSIONS, type Role, ROLES } from '@brakeven/contract';
import { randomUUID } from 'node:crypto';
import { readProblem, startTestApi, type TestApi, type Visitor } from './test-api';

const endpoints = Object.entries<Endpoint>(ENDPOINTS);
const guarded = endpoints.filter(([, { permission }]) => permission !== null);
const open = endpoints.filter(([, { permission }]) => permission === null);

let api: TestApi;
const visitors = new Map<Role | 'nobody', Visitor>();
beforeAll(async () => {
  api = await startTestApi();
  visitors.set('nobody', await api.visit());
  for (const role of ROLES) visitors.set(role, await api.signIn(role));
});
afterAll(() => api.close());

const pathOf = ({ path }: Endpoint) => path.replace(/:\w+/g, () => randomUUID());

/** Sends nothing but what the path needs: whoever may is told what is missing, whoever may not that they may not. */
async function ask(who: Role | 'nobody', definition: Endpoint) {
  const visitor = visitors.get(who);
  if (!visitor) throw new Error(`Nobody has signed in as ${who}.`);
  const path = pathOf(definition);
  if (definition.response === 'text/event-stream') {
    const progressId = path.split('/').at(-1) ?? '';
    const end = { stage: 'done', done: 1, total: 1, message: 'Done' } as const;
    for (const { userId } of Object.values(api.accounts)) api.progress.publish(userId, progressId, end);
  }
  return definition.upload ? visitor.upload(path, null) : visitor.send(definition.method, path);
}

describe.each(guarded)('%s', (name, definition) => {
  it('asks who is signed out to sign in', async () => {
    const response = await ask('nobody', definition);
    expect(response.status).toBe(401);
    expect(readProblem(response).code).toBe('not_signed_in');
  });

  it.each(ROLES)('treats %s as the table of permissions says', async (role) => {
    if (name === 'signOut') visitors.set(role, await api.signIn(role));
    const response = await ask(role, definition);
    if (definition.permission !== null && hasPermission(role, definition.permission)) {
      expect([401, 403]).not.toContain(response.status);
      expect(response.status).toBeLessThan(500);
      if (name === 'signOut') visitors.set(role, await api.signIn(role));
    } else {
      expect(response.status).toBe(403);
      expect(readProblem(response).code).toBe('forbidden');
    }
  });
});

describe.each(open)('%s', (_, definition) => {
  it('is open to who is signed out', async () => {
    const response = await ask('nobody', definition);
    expect(readProblem(response).code).toBe('invalid_input');
  });
});

describe('the table of permissions', () => {
  it('lets the owner do everything', () => {
    for (const roles of Object.values(PERMISSIONS)) expect(roles).toContain('owner');
  });

  it.each<[Role, string[]]>([
    ['lead', ['shop.edit', 'users.manage', 'payback.view', 'jobs.money', 'machines.money', 'people.view']],
    [
      'operator',
      [
        'jobs.view',
        'jobs.money',
        'hours.all',
        'machines.view',
        'people.view',
        'rollup.view',
        'tooling.edit',
        'press-runs.view',
      ],
    ],
    [
      'bookkeeper',
      ['shop.edit', 'users.manage', 'machines.view', 'payback.view', 'forming.use', 'press-runs.log'],
    ],
  ])('keeps from the %s what the role must not see or do', (role, kept) => {
    const table: Record<string, readonly Role[]> = PERMISSIONS;
    for (const permission of kept) expect(table[permission]).not.toContain(role);
  });
});

describe('a role that changes', () => {
  it('counts from the next request on, and so does an account made inactive', async () => {
    const owner = await api.signIn('owner');
    const { userId, email } = await api.addAccount('bookkeeper');
    const visitor = await (await api.visit()).signIn(email);
    expect((await visitor.send('get', '/employees')).status).toBe(200);
    await owner.send('patch', `/users/${userId}`, { role: 'operator' });
    expect((await visitor.send('get', '/employees')).status).toBe(403);
    await owner.send('patch', `/users/${userId}`, { isActive: false });
    expect((await visitor.send('get', '/session')).status).toBe(401);
    await owner.send('patch', `/users/${userId}`, { isActive: true });
    expect((await visitor.send('get', '/session')).status).toBe(401);
  });
});
