import { writeSetupWorkbook, writeTimesheetWorkbook } from '@brakeven/workbook';
import { randomUUID } from 'node:crypto';
import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { runCli, runJson } from './run-cli';
import { COST_OF_J100, PAYBACK_OF_PB2, SETUP, WEEK, WEEK_WITH_STRANGER } from '../fixtures/first-week';

jest.setTimeout(120_000);

const shop = `Shop ${randomUUID()}`;
let folder: string;
const at = (name: string) => join(folder, name);
const inShop = ['--shop', shop] as const;

beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'brakeven-cli-'));
  await writeFile(at('setup.xlsx'), await writeSetupWorkbook(SETUP, { units: 'us' }));
  await writeFile(at('week.xlsx'), await writeTimesheetWorkbook({ title: 'Week 10', rows: WEEK }));
  await writeFile(
    at('stranger.xlsx'),
    await writeTimesheetWorkbook({ title: 'Week 10', rows: WEEK_WITH_STRANGER }),
  );
});
afterAll(() => rm(folder, { recursive: true }));

const createShop = (name: string) =>
  runJson(
    ...['shop', 'create', name, '--time-zone', 'America/Chicago', '--currency', 'USD', '--units', 'us'],
    ...['--owner-email', `${randomUUID()}@ternhollow.example`],
  );

describe('a shop’s first week at the command line', () => {
  it('makes the shop and tells the temporary password once', async () => {
    const { code, json } = await createShop(shop);
    expect(code).toBe(0);
    expect(json).toMatchObject({
      shopId: expect.stringMatching(/^[\da-f-]{36}$/),
      name: shop,
      temporaryPassword: expect.stringMatching(/^.{16,}$/),
    });
    const { json: list } = await runJson<{ shops: { name: string }[] }>('shop', 'list');
    expect(list.shops.map(({ name }) => name)).toContain(shop);
    const again = await createShop(shop);
    expect(again.code).toBe(1);
    expect(again.json).toMatchObject({ error: { code: 'conflict', issues: [{ field: 'name' }] } });
  });

  it('checks the set-up without writing, then takes it in, then finds it there', async () => {
    const rows = { people: 2, machines: 1, machineCosts: 2, overhead: 1, jobs: 2 };
    const check = await runJson('setup', 'import', at('setup.xlsx'), ...inShop, '--check');
    expect(check).toMatchObject({ code: 0, json: { added: rows, problems: [] } });
    const first = await runJson('setup', 'import', at('setup.xlsx'), ...inShop);
    expect(first).toMatchObject({ code: 0, json: { added: rows, problems: [] } });
    const again = await runJson('setup', 'import', at('setup.xlsx'), ...inShop);
    expect(again).toMatchObject({ code: 0, json: { added: { people: 0 }, alreadyThere: rows } });
  });

  it('refuses a week with a stranger in it, names the cell and writes nothing', async () => {
    for (const action of ['check', 'import']) {
      const { code, json } = await runJson<{ problems: object[] }>(
        ...['timesheets', action, at('stranger.xlsx'), ...inShop],
      );
      expect(code).toBe(1);
      expect(json).toMatchObject({
        rowsRead: 4,
        entriesReady: 3,
        alreadyThere: 0,
        refused: 1,
        hoursRead: '11.0833',
        hoursReady: '9.0833',
      });
      expect(json).not.toHaveProperty('entriesAdded');
      const refusals = json.problems.filter((one) => (one as { severity: string }).severity === 'refused');
      expect(refusals).toMatchObject([
        { code: expect.any(String), message: expect.any(String), sheet: expect.any(String) },
      ]);
      expect(refusals[0]).toMatchObject({ cell: expect.stringMatching(/^B\d+$/) });
    }
    expect((await runJson('timesheets', 'list', ...inShop)).json).toEqual({ imports: [] });
  });

  it('says when the refused rows are left out by choice', async () => {
    const args = ['timesheets', 'check', at('stranger.xlsx'), ...inShop, '--good-rows'];
    expect(await runJson(...args)).toMatchObject({ code: 0, json: { refused: 1, entriesReady: 3 } });
  });

  let importId: string;
  it('takes the week in, and the same week twice is once', async () => {
    const { code, json } = await runJson<{ importId: string }>(
      ...['timesheets', 'import', at('week.xlsx'), ...inShop],
    );
    expect(code).toBe(0);
    expect(json).toMatchObject({
      importId: expect.any(String),
      rowsRead: 3,
      entriesAdded: 3,
      alreadyThere: 0,
      refused: 0,
      hoursRead: '9.0833',
      hoursAdded: '9.0833',
      problems: [],
    });
    importId = json.importId;
    const again = await runJson('timesheets', 'import', at('week.xlsx'), ...inShop);
    expect(again).toMatchObject({
      code: 0,
      json: { entriesAdded: 0, alreadyThere: 3, hoursAdded: '0.0000', alreadyImported: { importId } },
    });
  });

  it('costs the jobs to the cent', async () => {
    expect(await runJson('jobs', 'cost', 'J-100', ...inShop)).toEqual({ code: 0, json: COST_OF_J100 });
    const { json } = await runJson<{ jobs: object[] }>('jobs', 'list', ...inShop);
    expect(json.jobs).toMatchObject([
      { number: 'J-100', total: '498.51' },
      { number: 'J-200', labour: '51.87' },
    ]);
    const unknown = await runJson('jobs', 'cost', 'J-999', ...inShop);
    expect(unknown).toMatchObject({ code: 1, json: { error: { code: 'not_found' } } });
  });

  it('tells how far the press has paid itself back', async () => {
    expect(await runJson('payback', 'PB2', ...inShop)).toMatchObject({ code: 0, json: PAYBACK_OF_PB2 });
  });

  it('rolls up anew without changing a figure', async () => {
    const full = await runJson('rollup', ...inShop, '--full');
    expect(full).toEqual({
      code: 0,
      json: { shops: [{ shop, days: 2, lines: expect.any(Number), through: '2024-03-05' }] },
    });
    const nothing = await runJson('rollup', ...inShop, '--through', '2024-03-04');
    expect(nothing).toMatchObject({ code: 0, json: { shops: [{ shop, days: 0, lines: 0 }] } });
    expect((await runJson('jobs', 'cost', 'J-100', ...inShop)).json).toEqual(COST_OF_J100);
  });

  it('rolls all shops up at night', async () => {
    const { json } = await runJson<{ shops: { shop: string }[] }>('rollup', '--all');
    expect(json.shops.map((one) => one.shop)).toContain(shop);
  });

  it('finds everything as it should be', async () => {
    const { json } = await runJson<{ findings: { subject: string; isGood: boolean }[] }>('doctor');
    const books = json.findings.filter(({ subject }) => subject.endsWith(shop));
    expect(books).toEqual([
      expect.objectContaining({ subject: `Costs of ${shop}`, isGood: true }),
      expect.objectContaining({ subject: `Totals of ${shop}`, isGood: true }),
    ]);
  });

  it('takes the week back whole, once', async () => {
    const undo = await runJson('timesheets', 'undo', importId, ...inShop);
    expect(undo).toEqual({ code: 0, json: { entriesVoided: 3, hoursVoided: '9.0833' } });
    const { json } = await runJson('jobs', 'cost', 'J-100', ...inShop);
    expect(json).toMatchObject({ hours: '0.0000', total: '0.00' });
    const again = await runJson('timesheets', 'undo', importId, ...inShop);
    expect(again).toMatchObject({ code: 1, json: { error: { code: 'already_undone' } } });
    const { json: list } = await runJson<{ imports: object[] }>('timesheets', 'list', ...inShop);
    expect(list.imports).toMatchObject([{ importId, status: 'undone' }]);
  });

  it('reads columns that it is told, and keeps them in mind', async () => {
    const csv = 'When;Who;What;How;Time\n2024-03-06;101;J-100;FORM;2,5\n';
    await writeFile(at('odd.csv'), csv);
    const args = ['timesheets', 'import', at('odd.csv'), ...inShop] as const;
    expect((await runJson(...args)).code).toBe(1);
    const columns = ['date=A', 'employee=B', 'job=C', 'operation=D', 'hours=E'];
    const told = await runJson(
      ...args,
      ...columns.flatMap((column) => ['--column', column]),
      ...['--date-format', 'YYYY-MM-DD', '--decimal-mark', ','],
    );
    expect(told).toMatchObject({ code: 0, json: { entriesAdded: 1, hoursAdded: '2.5000' } });
    await writeFile(at('odd-later.csv'), csv.replace('03-06', '03-07'));
    const later = await runJson('timesheets', 'check', at('odd-later.csv'), ...inShop);
    expect(later).toMatchObject({ code: 0, json: { entriesReady: 1, mappingFrom: 'remembered' } });
  });
});

describe('users at the command line', () => {
  it('are added, listed and given a new password', async () => {
    const email = `${randomUUID()}@ternhollow.example`;
    const added = await runJson(
      ...['user', 'add', ...inShop, '--name', 'Pia', '--email', email, '--role', 'operator'],
      ...['--employee', '101'],
    );
    expect(added).toMatchObject({ code: 0, json: { email, role: 'operator' } });
    const { json } = await runJson<{ users: { email: string }[] }>('user', 'list', ...inShop);
    expect(json.users.find((user) => user.email === email)).toMatchObject({
      employeeId: expect.any(String),
    });
    const reset = await runJson('user', 'reset-password', email, ...inShop);
    expect(reset.code).toBe(0);
    expect(reset.json['temporaryPassword']).not.toBe(added.json['temporaryPassword']);
    const nobody = await runJson('user', 'reset-password', 'nobody@ternhollow.example', ...inShop);
    expect(nobody).toMatchObject({ code: 1, json: { error: { code: 'not_found' } } });
  });
});

describe('exit codes', () => {
  it.each([
    [['shop', 'create', 'X']],
    [['shop', 'create', 'X', '--units', 'imperial']],
    [['timesheets', 'check', 'no-such-file.xlsx', '--shop', shop]],
    [['timesheets', 'undo', '17', '--shop', shop]],
    [['timesheets', 'check', 'x.xlsx', '--shop', shop, '--column', 'hours']],
    [['rollup']],
    [['rollup', '--all', '--shop', shop]],
    [['rollup', '--shop', shop, '--through', 'soon']],
    [['nothing']],
  ])('2 for wrong usage: %j', async (args) => {
    const { code, json } = await runJson(...args);
    expect(code).toBe(2);
    expect(json).toMatchObject({ error: { code: 'invalid_input', message: expect.stringMatching(/\w/) } });
  });

  it('2 with what to write instead for what cannot be read', async () => {
    const day = await runCli(['rollup', ...inShop, '--through', '2026-02-31']);
    expect(day).toMatchObject({ code: 2, stderr: expect.stringContaining('as YYYY-MM-DD') });
    const id = await runCli(['timesheets', 'undo', 'abc', ...inShop]);
    expect(id).toMatchObject({ code: 2, stderr: expect.stringContaining('Take it from the list') });
    expect(id.stderr).toContain('Add --help');
  });

  it('2 with words and the commands when none is named, 0 when help is asked for', async () => {
    expect(await runCli([])).toMatchObject({ code: 2, stderr: expect.stringContaining('Usage: brakeven') });
    const help = await runCli(['--help']);
    expect(help).toMatchObject({ code: 0, stdout: expect.stringContaining('Exit codes: 0 done, 1 refused') });
  });

  it('0 when whoever reads has seen enough', async () => {
    const run = await runCli(['--help'], {}, { isReaderGone: true });
    expect(run).toEqual({ code: 0, stdout: '', stderr: '' });
  });

  it('3 when the database is out of reach, or nobody said where it is', async () => {
    for (const DATABASE_URL of ['postgres://nobody@127.0.0.1:1/none', '']) {
      const run = await runCli(['timesheets', 'list', ...inShop, '--json'], { DATABASE_URL });
      expect(run.code).toBe(3);
      expect(JSON.parse(run.stdout)).toMatchObject({ error: { code: 'database_unreachable' } });
    }
  });

  it('1 for a shop that is not there, and for a file that is no workbook', async () => {
    const unknown = await runJson('timesheets', 'list', '--shop', 'No such shop');
    expect(unknown).toMatchObject({ code: 1, json: { error: { code: 'shop_not_found' } } });
    await writeFile(at('picture.xlsx'), Buffer.from([0x89, 0x50, 0x4e, 0x47, 1, 2, 3, 4]));
    const refused = await runJson('timesheets', 'import', at('picture.xlsx'), ...inShop);
    expect(refused).toMatchObject({
      code: 1,
      json: { error: { code: 'file_refused', issues: [{ code: 'file_not_workbook' }] } },
    });
  });
});

describe('for people', () => {
  it('answers in tables on standard output, and tells progress on standard error', async () => {
    const check = await runCli(['timesheets', 'check', at('stranger.xlsx'), ...inShop, '--good-rows']);
    expect(check.stdout).toMatch(/Rows read\s+4, 11\.0833 hours/);
    expect(check.stdout).toMatch(/refused\s+\S/);
    expect(check.stderr).toContain('Reading the sheets');
    const undo = await runCli(['shop', 'list']);
    expect(undo.stdout.split('\n')[0]).toMatch(/^Shop\s+Time zone\s+Currency\s+Units$/);
  });

  it('says what is refused in words', async () => {
    const run = await runCli(['timesheets', 'list', '--shop', 'No such shop']);
    expect(run).toMatchObject({ code: 1, stdout: '' });
    expect(run.stderr).toContain("There is no shop named 'No such shop'.");
  });
});

describe('the set-up template', () => {
  it('is written as a workbook that imports as nothing, and never over another file unless told', async () => {
    const file = at('template.xlsx');
    const { code, json } = await runJson('setup', 'template', file);
    expect({ code, json }).toMatchObject({ code: 0, json: { file } });
    expect((await readFile(file)).subarray(0, 2).toString()).toBe('PK');
    expect((await runJson('setup', 'template', file)).code).toBe(2);
    expect((await runJson('setup', 'template', file, '--force')).code).toBe(0);
    const imported = await runJson('setup', 'import', file, ...inShop);
    expect(imported).toMatchObject({ code: 0, json: { added: { people: 0, jobs: 0 }, problems: [] } });
  });
});
