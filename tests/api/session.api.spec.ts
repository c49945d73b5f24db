import { LIMITS } from '@brakeven/contract';
import { sql } from 'kysely';
import request from 'supertest';
import { type Account, PASSWORD, readProblem, startTestApi, type TestApi } from './test-api';

let api: TestApi;
beforeAll(async () => {
  api = await startTestApi({ signInFailuresMax: 1_000 });
});
afterAll(() => api.close());

const cookiesOf = (headers: Record<string, unknown>) =>
  ([] as string[]).concat((headers['set-cookie'] ?? []) as string[]);
const sessionCookieOf = (headers: Record<string, unknown>) =>
  cookiesOf(headers).find((cookie) => cookie.startsWith('brakeven.sid='));

describe('signing in', () => {
  it('answers who it is and sets a cookie that scripts and other sites cannot use', async () => {
    const visitor = await api.visit();
    const { email, userId } = api.accounts.owner;
    const response = await visitor.send('post', '/session', { email, password: PASSWORD });
    expect(response.body).toEqual({
      user: { userId, name: 'The owner', email, role: 'owner', mustChangePassword: false },
      shop: api.shop.shop,
    });
    const cookie = sessionCookieOf(response.headers) ?? '';
    expect(cookie).toMatch(/; HttpOnly/);
    expect(cookie).toMatch(/; SameSite=Lax/);
    expect(cookie).not.toMatch(/; Secure/);
    expect((await visitor.send('get', '/session')).body).toEqual(response.body);
  });

  it('ends after so many hours, however busy the session is', async () => {
    const visitor = await api.visit();
    const { email } = api.accounts.lead;
    const response = await visitor.send('post', '/session', { email, password: PASSWORD });
    const expires = Date.parse(/Expires=([^;]+)/.exec(sessionCookieOf(response.headers) ?? '')?.[1] ?? '');
    expect(Math.abs(expires - Date.now() - LIMITS.sessionHours * 3_600_000)).toBeLessThan(60_000);
    const readExpiry = () =>
      sql<{ expire: Date; sess: object }>`select expire, sess from session
        where sess ->> 'userId' = ${api.accounts.lead.userId} order by expire desc limit 1`.execute(
        api.shop.db,
      );
    const before = await readExpiry();
    const again = await visitor.send('get', '/session');
    expect(sessionCookieOf(again.headers)).toBeUndefined();
    expect(await readExpiry()).toEqual(before);
    expect(Object.keys(before.rows[0]?.sess ?? {}).sort()).toEqual(['cookie', 'shopId', 'userId']);
    await sql`update session set expire = now() - interval '1 minute'
      where sess ->> 'userId' = ${api.accounts.lead.userId}`.execute(api.shop.db);
    expect((await visitor.send('get', '/session')).status).toBe(401);
  });

  it('gives the session a new id, so that one planted before is worth nothing', async () => {
    const planted = await api.signIn('operator');
    const cookie = await planted.open('get', '/session').then(
      () =>
        planted.agent.jar.getCookie('brakeven.sid', {
          domain: '127.0.0.1',
          path: '/',
          secure: false,
          script: false,
        } as never)?.value,
    );
    expect(cookie).toBeTruthy();
    const response = await planted.send('post', '/session', {
      email: api.accounts.owner.email,
      password: PASSWORD,
    });
    expect(response.status).toBe(200);
    const stolen = await request(api.address).get('/api/session').set('Cookie', `brakeven.sid=${cookie}`);
    expect(stolen.status).toBe(401);
  });

  it('refuses a wrong password, an unknown address and an empty field in the same words', async () => {
    const visitor = await api.visit();
    const answers = [];
    for (const body of [
      { email: api.accounts.owner.email, password: 'not the password' },
      { email: 'nobody@ternhollow.example', password: 'not the password' },
      { email: '', password: '' },
    ]) {
      const response = await visitor.send('post', '/session', body);
      const { requestId: _, ...problem } = readProblem(response);
      answers.push(problem);
    }
    expect(answers[0]).toMatchObject({ status: 401, code: 'sign_in_refused' });
    expect(answers[1]).toEqual(answers[0]);
    expect(answers[2]).toEqual(answers[0]);
  });

  it('locks an address after too many failures, with or without an account', async () => {
    const known = await api.addAccount('lead');
    for (const email of [known.email, `unknown-${known.email}`]) {
      const visitor = await api.visit();
      const attempt = () => visitor.send('post', '/session', { email, password: 'not the password' });
      for (let n = 0; n < LIMITS.signInFailuresMax; n += 1) expect((await attempt()).status).toBe(401);
      const response = await attempt();
      expect(response.status).toBe(429);
      expect(readProblem(response).code).toBe('locked_out');
    }
    const visitor = await api.visit();
    const right = await visitor.send('post', '/session', { email: known.email, password: PASSWORD });
    expect(right.status).toBe(429);
  });

  it('limits failures from one network address over all accounts, but not successes', async () => {
    const strict = await startTestApi({ signInFailuresMax: 3 });
    try {
      const visitor = await strict.visit();
      const attempt = (email: string, password: string) =>
        visitor.send('post', '/session', { email, password });
      for (let n = 0; n < 5; n += 1) {
        expect((await attempt(strict.accounts.owner.email, PASSWORD)).status).toBe(200);
      }
      for (let n = 0; n < 3; n += 1) {
        expect((await attempt(`n${n}@ternhollow.example`, 'wrong')).status).toBe(401);
      }
      const response = await attempt(strict.accounts.owner.email, PASSWORD);
      expect(response.status).toBe(429);
      expect(readProblem(response).code).toBe('too_many_requests');
    } finally {
      await strict.close();
    }
  });
});

describe('signing out', () => {
  it('ends the session on the server, not only in the browser', async () => {
    const visitor = await api.signIn('owner');
    const kept = visitor.agent.jar.getCookies({
      domain: '127.0.0.1',
      path: '/',
      secure: false,
      script: false,
    } as never);
    expect((await visitor.send('delete', '/session')).status).toBe(204);
    const cookie = kept.map(({ name, value }) => `${name}=${value}`).join('; ');
    expect((await request(api.address).get('/api/session').set('Cookie', cookie)).status).toBe(401);
    const again = await visitor.send('post', '/session', {
      email: api.accounts.owner.email,
      password: PASSWORD,
    });
    expect(again.status).toBe(200);
  });
});

describe('the own password', () => {
  const signInAs = async ({ email }: Account) => (await api.visit()).signIn(email);

  it('changes, and ends the other sessions of the account', async () => {
    const account = await api.addAccount('bookkeeper');
    const [here, elsewhere] = [await signInAs(account), await signInAs(account)];
    const body = { currentPassword: PASSWORD, newPassword: 'another long password' };
    expect((await here.send('post', '/session/password', body)).status).toBe(204);
    expect((await here.send('get', '/session')).status).toBe(200);
    expect((await elsewhere.send('get', '/session')).status).toBe(401);
    const visitor = await api.visit();
    await visitor.signIn(account.email, 'another long password');
  });

  it('is not changed without the current one, nor to a short one', async () => {
    const visitor = await signInAs(await api.addAccount('bookkeeper'));
    const change = (currentPassword: string, newPassword: string) =>
      visitor.send('post', '/session/password', { currentPassword, newPassword });
    const wrong = readProblem(await change('not the password', 'another long password'));
    expect(wrong).toMatchObject({ code: 'password_wrong', issues: [{ field: 'currentPassword' }] });
    const short = readProblem(await change(PASSWORD, 'eleven char'));
    expect(short).toMatchObject({
      code: 'invalid_input',
      issues: [{ field: 'newPassword', message: 'At least 12 characters.' }],
    });
  });

  it('has to be changed before anything else when it is a temporary one', async () => {
    const account = await api.addAccount('owner', { isTemporary: true });
    const visitor = await signInAs(account);
    expect((await visitor.send('get', '/session')).body.user.mustChangePassword).toBe(true);
    for (const path of ['/shop', '/jobs', '/employees', '/users']) {
      const problem = readProblem(await visitor.send('get', path));
      expect(problem).toMatchObject({ code: 'forbidden', detail: 'Change your temporary password first.' });
    }
    const body = { currentPassword: PASSWORD, newPassword: 'another long password' };
    expect((await visitor.send('post', '/session/password', body)).status).toBe(204);
    expect((await visitor.send('get', '/shop')).status).toBe(200);
  });
});

describe('a request in somebody else’s name', () => {
  const change = { name: 'Renamed' };

  it('is refused without a token, and nothing changes', async () => {
    const visitor = await api.signIn('owner');
    const response = await visitor.agent.patch('/api/shop').send(change);
    expect(response.status).toBe(403);
    expect(readProblem(response).code).toBe('token_missing');
    expect((await visitor.send('get', '/shop')).body.name).toBe(api.shop.shop.name);
  });

  it('is refused with the token of another session, or one from before sign-in', async () => {
    const [mine, other, before] = [await api.signIn('owner'), await api.signIn('owner'), await api.visit()];
    for (const token of [other.token, before.token, 'x.y', `${mine.token}0`, '']) {
      const test = mine.agent.patch('/api/shop').set('X-XSRF-TOKEN', token ?? '');
      expect(readProblem(await test.send(change)).code).toBe('token_missing');
    }
  });

  it.each([
    [{ 'Sec-Fetch-Site': 'cross-site' }],
    [{ 'Sec-Fetch-Site': 'same-site' }],
    [{ Origin: 'https://elsewhere.example' }],
    [{ Origin: 'null' }],
  ])('is refused when the browser says that it comes from elsewhere: %j', async (headers) => {
    const visitor = await api.signIn('owner');
    const response = await visitor.open('patch', '/shop').set(headers).send(change);
    expect(readProblem(response).code).toBe('token_missing');
  });

  it('is refused at sign-in too', async () => {
    const visitor = await api.visit();
    const body = { email: api.accounts.owner.email, password: PASSWORD };
    const bare = await request(api.address).post('/api/session').send(body);
    expect(readProblem(bare).code).toBe('token_missing');
    const foreign = await visitor
      .open('post', '/session')
      .set('Origin', 'https://elsewhere.example')
      .send(body);
    expect(readProblem(foreign).code).toBe('token_missing');
  });

  it('is let through from our own page', async () => {
    const visitor = await api.signIn('owner');
    const response = await visitor
      .open('patch', '/shop')
      .set({ Origin: api.address, 'Sec-Fetch-Site': 'same-origin' })
      .send({ weekStart: 1 });
    expect(response.status).toBe(200);
  });
});

describe('behind a proxy that speaks https', () => {
  it('the cookies are for https only', async () => {
    const proxied = await startTestApi({ proxies: 1 });
    try {
      const headers = { 'X-Forwarded-Proto': 'https', 'X-Forwarded-For': '203.0.113.9' };
      const first = await request(proxied.address).get('/api/session').set(headers);
      const [token = ''] = cookiesOf(first.headers);
      expect(token).toMatch(/^XSRF-TOKEN=.*; Secure/);
      const response = await request(proxied.address)
        .post('/api/session')
        .set({ ...headers, 'X-XSRF-TOKEN': decodeURIComponent(/=([^;]+)/.exec(token)?.[1] ?? '') })
        .send({ email: proxied.accounts.owner.email, password: PASSWORD });
      expect(sessionCookieOf(response.headers)).toMatch(/; Secure/);
    } finally {
      await proxied.close();
    }
  });
});
