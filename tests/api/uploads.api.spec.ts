import { LIMITS, type Progress } from '@brakeven/contract';
import { writeSetupWorkbook, writeTimesheetWorkbook } from '@brakeven/workbook';
import { randomUUID } from 'node:crypto';
import { get as httpGet } from 'node:http';
import { COST_OF_J100, SETUP, WEEK, WEEK_WITH_STRANGER } from '../fixtures/first-week';
import { readProblem, startTestApi, type TestApi, type Visitor } from './test-api';

let api: TestApi;
let owner: Visitor;
let bookkeeper: Visitor;
let setup: { name: string; bytes: Buffer };
let week: { name: string; bytes: Buffer };
let stranger: { name: string; bytes: Buffer };
beforeAll(async () => {
  api = await startTestApi();
  owner = await api.signIn('owner');
  bookkeeper = await api.signIn('bookkeeper');
  const toFile = (name: string, bytes: Uint8Array) => ({ name, bytes: Buffer.from(bytes) });
  setup = toFile('set-up.xlsx', await writeSetupWorkbook(SETUP, { units: 'us' }));
  week = toFile('Woche zehn – März.xlsx', await writeTimesheetWorkbook({ title: 'Week 10', rows: WEEK }));
  const bad = await writeTimesheetWorkbook({ title: 'Week 10', rows: WEEK_WITH_STRANGER });
  stranger = toFile('stranger.xlsx', bad);
});
afterAll(() => api.close());

describe('the set-up workbook', () => {
  it('comes as an empty one to fill in', async () => {
    const response = await owner.open('get', '/setup/template').buffer(true).parse(readBytes);
    expect(response.headers['content-type']).toMatch(/spreadsheetml\.sheet/);
    expect(response.headers['content-disposition']).toMatch(/attachment; filename="?brakeven-set-up\.xlsx/);
    expect((response.body as Buffer).subarray(0, 2).toString()).toBe('PK');
  });

  it('is checked without writing, then imported', async () => {
    const check = await owner.upload('/setup/check', setup);
    expect(check.body).toMatchObject({ added: { people: 2, jobs: 2 }, problems: [] });
    expect((await owner.send('get', '/employees')).body).toEqual([]);
    const done = await owner.upload('/setup', setup);
    expect(done.body).toEqual(check.body);
    expect((await owner.send('get', '/employees')).body).toHaveLength(2);
  });

  it('is refused whole when it cannot be read', async () => {
    const refused = readProblem(
      await owner.upload('/setup', { name: 'x.xlsx', bytes: Buffer.from('hello') }),
    );
    expect(refused).toMatchObject({ status: 422, code: 'file_refused' });
  });
});

describe('a timesheet', () => {
  it('is checked: what is ready, what is refused and where', async () => {
    const response = await bookkeeper.upload('/timesheets/check', stranger);
    expect(response.status).toBe(200);
    expect(response.body).toMatchObject({ rowsRead: 4, entriesReady: 3, refused: 1, hoursRead: '11.0833' });
    expect((await bookkeeper.send('get', '/timesheets')).body).toEqual([]);
  });

  it('with refused rows is not imported, and the check comes with the refusal', async () => {
    const problem = readProblem(await bookkeeper.upload('/timesheets', stranger));
    expect(problem).toMatchObject({ status: 422, code: 'rows_refused', details: { refused: 1 } });
    expect((await bookkeeper.send('get', '/timesheets')).body).toEqual([]);
  });

  let importId: string;
  it('is imported once, kept as it came, and costed', async () => {
    const progressId = randomUUID();
    const progress = watch(bookkeeper, progressId);
    const response = await bookkeeper.upload('/timesheets', week, { progressId });
    expect(response.body).toMatchObject({ entriesAdded: 3, hoursAdded: '9.0833', refused: 0 });
    importId = response.body.importId;
    const states = await progress;
    expect(states.map(({ stage }) => stage)).toEqual(expect.arrayContaining(['reading', 'writing', 'done']));
    expect(states.at(-1)?.stage).toBe('done');

    const again = await bookkeeper.upload('/timesheets', week);
    expect(again.body).toMatchObject({ entriesAdded: 0, alreadyThere: 3, alreadyImported: { importId } });
    const detail = (await bookkeeper.send('get', `/timesheets/${importId}`)).body;
    expect(detail).toMatchObject({ fileName: week.name, importedBy: 'The bookkeeper', status: 'committed' });
    const { items } = (await bookkeeper.send('get', '/jobs?search=J-100')).body;
    expect(items).toMatchObject([{ number: 'J-100', total: COST_OF_J100.total }]);
  });

  it('gives its file back byte for byte, and again only if it has changed', async () => {
    const path = `/timesheets/${importId}/file`;
    const response = await bookkeeper.open('get', path).buffer(true).parse(readBytes);
    expect((response.body as Buffer).equals(week.bytes)).toBe(true);
    expect(response.headers['content-disposition']).toContain(encodeURIComponent(week.name));
    const again = await bookkeeper.open('get', path).set('If-None-Match', response.headers['etag'] ?? '');
    expect(again.status).toBe(304);
    const sheet = encodeURIComponent((await bookkeeper.send('get', '/timesheets')).body[0].sheet);
    const excerpt = await bookkeeper.send('get', `/timesheets/${importId}/excerpt?sheet=${sheet}&row=5`);
    expect(JSON.stringify(excerpt.body)).toContain('J-100');
    const none = await bookkeeper.send('get', `/timesheets/${randomUUID()}/file`);
    expect(readProblem(none)).toMatchObject({ status: 404, code: 'import_not_found' });
  });

  it('is taken back whole, once', async () => {
    const undone = await bookkeeper.send('post', `/timesheets/${importId}/undo`);
    expect(undone.body).toEqual({ entriesVoided: 3, hoursVoided: '9.0833' });
    const again = readProblem(await bookkeeper.send('post', `/timesheets/${importId}/undo`));
    expect(again).toMatchObject({ status: 409, code: 'already_undone' });
  });
});

describe('an upload', () => {
  it('is refused when it is larger than the screen says', async () => {
    const large = { name: 'large.xlsx', bytes: Buffer.alloc(LIMITS.uploadBytesMax + 1) };
    const problem = readProblem(await bookkeeper.upload('/timesheets/check', large));
    expect(problem).toMatchObject({ status: 422, code: 'file_refused' });
    expect(problem.detail).toContain('larger than 10 MB');
  });

  it('is refused without a file, with another part, and with options that are none', async () => {
    const none = readProblem(await bookkeeper.upload('/timesheets/check', null, {}));
    expect(none).toMatchObject({ code: 'file_refused', detail: expect.stringContaining('No file came') });
    const other = await bookkeeper.open('post', '/timesheets/check').attach('other', week.bytes, 'x.xlsx');
    expect(readProblem(other).code).toBe('file_refused');
    const broken = await bookkeeper
      .open('post', '/timesheets/check')
      .field('options', '{')
      .attach('file', week.bytes, 'x.xlsx');
    expect(readProblem(broken).code).toBe('invalid_input');
    const wrong = await bookkeeper.upload('/timesheets/check', week, { aliases: [{ kind: 'planet' }] });
    expect(readProblem(wrong).issues[0]?.field).toMatch(/^aliases\.0\./);
  });

  it('is refused without a token before it is read', async () => {
    const response = await bookkeeper.agent.post('/api/timesheets').attach('file', week.bytes, 'x.xlsx');
    expect(readProblem(response).code).toBe('token_missing');
  });
});

describe('progress', () => {
  it('tells who comes late the latest state, and whoever else nothing', async () => {
    const progressId = randomUUID();
    const { userId } = api.accounts.bookkeeper;
    const state = { stage: 'checking', done: 3, total: 10, message: 'Checking' } as const;
    api.progress.publish(userId, progressId, state);
    const mine = watch(bookkeeper, progressId);
    const theirs = watch(owner, progressId);
    await new Promise((resolve) => setTimeout(resolve, 300));
    const end = { stage: 'done', done: 10, total: 10, message: 'Done' } as const;
    api.progress.publish(userId, progressId, end);
    expect(await mine).toEqual([state, end]);
    api.progress.publish(api.accounts.owner.userId, progressId, end);
    expect(await theirs).toEqual([end]);
  });

  it('tells that the work has failed', async () => {
    const progressId = randomUUID();
    const progress = watch(bookkeeper, progressId);
    await new Promise((resolve) => setTimeout(resolve, 100));
    await bookkeeper.upload('/timesheets', { name: 'x.xlsx', bytes: Buffer.from('hello') }, { progressId });
    expect((await progress).at(-1)).toMatchObject({ stage: 'failed', message: expect.stringMatching(/\w/) });
  });
});

/** Reads a stream of server-sent events to its end. */
async function watch(visitor: Visitor, progressId: string): Promise<Progress[]> {
  const url = new URL(`/api/progress/${progressId}`, visitor.address);
  const cookie = visitor.agent.jar
    .getCookies({ domain: url.hostname, path: '/', secure: false, script: false } as never)
    .map(({ name, value }) => `${name}=${value}`)
    .join('; ');
  return new Promise((resolve, reject) => {
    httpGet(url, { headers: { Cookie: cookie } }, (response) => {
      let text = '';
      expect(response.headers['content-type']).toBe('text/event-stream');
      response.on('data', (chunk: Buffer) => (text += chunk.toString()));
      response.on('end', () =>
        resolve([...text.matchAll(/^data: (.*)$/gm)].map(([, data]) => JSON.parse(data ?? '') as Progress)),
      );
    }).on('error', reject);
  });
}

function readBytes(response: NodeJS.EventEmitter, done: (error: Error | null, body: Buffer) => void): void {
  const chunks: Buffer[] = [];
  response.on('data', (chunk: Buffer) => chunks.push(chunk));
  response.on('end', () => done(null, Buffer.concat(chunks)));
}
