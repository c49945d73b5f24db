import { writeSetupWorkbook, writeTimesheetWorkbook } from '@brakeven/workbook';
import { randomUUID } from 'node:crypto';
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { SETUP, WEEK } from '../fixtures/first-week';
import { runCli, runJson } from './run-cli';

jest.setTimeout(120_000);

const shop = `Shop ${randomUUID()}`;
const inShop = ['--shop', shop] as const;
let folder: string;

beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'brakeven-cli-'));
  const [setup, week] = [join(folder, 'setup.xlsx'), join(folder, 'week.xlsx')];
  await writeFile(setup, await writeSetupWorkbook(SETUP, { units: 'us' }));
  await writeFile(week, await writeTimesheetWorkbook({ title: 'Week 10', rows: WEEK }));
  await runJson(
    ...['shop', 'create', shop, '--time-zone', 'America/Chicago', '--currency', 'USD', '--units', 'us'],
    ...['--owner-email', `${randomUUID()}@ternhollow.example`],
  );
  await runJson('setup', 'import', setup, ...inShop);
  await runJson('timesheets', 'import', week, ...inShop);
});
afterAll(() => rm(folder, { recursive: true }));

describe('month end at the command line', () => {
  it('says how a month stands, closes it, and keeps it until it is reopened', async () => {
    const status = await runJson('month', 'status', '2024-03', ...inShop);
    expect(status).toMatchObject({ code: 0, json: { month: '2024-03', state: 'open', blockers: [] } });
    const closed = await runJson('month', 'close', '2024-03', ...inShop);
    expect(closed).toMatchObject({
      code: 0,
      json: { state: 'closed', totals: status.json['totals'], isLatestClosed: true },
    });
    const again = await runJson('month', 'close', '2024-03', ...inShop);
    expect(again).toMatchObject({ code: 1, json: { error: { code: 'month_refused' } } });
    const reopened = await runJson('month', 'reopen', '2024-03', ...inShop, '--reason', 'A week was missing');
    expect(reopened).toMatchObject({ code: 0, json: { state: 'open', totals: status.json['totals'] } });
  });

  it('refuses months out of order and such as are none, and asks for a reason', async () => {
    const early = await runJson('month', 'close', '2024-04', ...inShop);
    expect(early).toMatchObject({
      code: 1,
      json: { error: { code: 'month_refused', issues: [{ code: 'not_next' }] } },
    });
    expect((await runJson('month', 'close', '2020-01', ...inShop)).code).toBe(1);
    expect((await runJson('month', 'close', 'March', ...inShop)).code).toBe(2);
    expect((await runJson('month', 'reopen', '2024-03', ...inShop)).code).toBe(2);
    const { json } = await runJson('month', 'status', ...inShop);
    expect(json).toMatchObject({ closedThrough: null });
  });

  it('tells the rates of a machine that hold today; those typed in have no parts', async () => {
    expect(await runJson('machines', 'rate', 'PB2', ...inShop)).toEqual({
      code: 0,
      json: {
        machine: 'PB2',
        validFrom: '2024-01-01',
        machineHourRate: '18.00',
        chargeOutRate: '95.50',
        runningCostPerHour: '4.125',
        parts: null,
      },
    });
    expect((await runJson('machines', 'rate', 'P99', ...inShop)).code).toBe(1);
    expect((await runCli(['machines', 'rate', 'PB2', ...inShop])).stdout).toContain('Machine-hour rate');
  });
});
