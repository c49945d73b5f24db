import { type Role } from '@brakeven/contract';
import { type Answer, type Visitor, Visitors } from './browser/visitors';
import { DataGrid } from './pages/data-grid';
import { toHours } from './pages/figure-text';
import { Shell } from './pages/shell';

/**
 * Names under which the API sends money; an answer with none of them holds none. `material` is money where it is an
 * amount, and else the name of a material, which everybody may read.
 */
const MONEY =
  /"(?:(?!entriesWithoutRate)(?:wage\w*|burden\w*|labour|overtime|overhead|outside|total|amount|net|outlay|invoiced|margin|workInProgress|cost|freight|value|average\w*|remaining|earned\w*|quotedPrice|\w+Rate|rate|runningCost\w*|costItems|rates)":(?!null|\[\])|material":"-?\d+\.\d\d")/;

// What is refused is so before anything is looked up.
const PAYBACK_OF_SOME_MACHINE = '/api/machines/01900000-0000-7000-8000-000000000000/payback';

describe('Each role sees its own', () => {
  let visitors: Visitors;
  beforeAll(async () => {
    visitors = await Visitors.launch();
  });
  afterAll(() => visitors.close());

  async function start(role: Role): Promise<{ visitor: Visitor; shell: Shell }> {
    const visitor = await visitors.visitAs(role);
    return { visitor, shell: new Shell(visitor.page) };
  }

  it('keeps money and other people’s hours from the operator', async () => {
    const { visitor, shell } = await start('operator');
    await shell.goTo('/');
    expect(await shell.listRail()).toEqual(['Hours', 'Forming']);

    await visitor.page.getByRole('button', { name: 'All', exact: true }).click();
    const hours = new DataGrid(visitor.page, 'Time entries');
    await hours.totals.waitFor();
    expect(toHours(await hours.readTotal('hours'))).toBeGreaterThan(0);
    expect(await visitor.page.locator('.ag-header-cell[col-id="employee"]').count()).toBe(0);
    const people = (await visitor.listAnswers()).flatMap(listEmployees);
    expect([...new Set(people)]).toEqual(['Jory Vance']);

    for (const path of ['/payback', '/jobs', '/machines', '/people', '/timesheets', '/shop']) {
      await expectRefusedPage(shell, path);
    }
    for (const path of [
      '/api/jobs',
      PAYBACK_OF_SOME_MACHINE,
      '/api/machines',
      '/api/employees',
      '/api/users',
    ]) {
      expect({ path, status: (await visitor.context.request.get(path)).status() }).toEqual({
        path,
        status: 403,
      });
    }
    expect(await listPathsWithMoney(visitor)).toEqual([]);
    expect(visitor.complaints).toEqual([]);
  });

  it('shows the lead hours of jobs without money', async () => {
    const { visitor, shell } = await start('lead');
    await shell.goTo('/jobs');
    expect(await shell.listRail()).toEqual(['Jobs', 'Hours', 'Forming', 'Machines', 'Materials']);
    const jobs = new DataGrid(visitor.page, 'Jobs');
    expect(toHours(await jobs.readTotal('hours'))).toBeGreaterThan(0);
    for (const column of ['labour', 'machine', 'overhead', 'total', 'quotedPrice']) {
      expect(await visitor.page.locator(`.ag-header-cell[col-id="${column}"]`).count()).toBe(0);
    }
    await jobs.cell(0, 'number').getByRole('link').click();
    await visitor.page.waitForURL(/\/jobs\/./);
    await shell.waitUntilSettled();
    await shell.goTo('/machines');
    await visitor.page.locator('main h2 a').first().click();
    await visitor.page.waitForURL(/\/machines\/./);
    await shell.waitUntilSettled();
    expect(await visitor.page.locator('main').innerText()).not.toMatch(/\$/);

    await expectRefusedPage(shell, '/payback');
    await expectRefusedPage(shell, '/people');
    expect(await listPathsWithMoney(visitor)).toEqual([]);
    expect(visitor.complaints).toEqual([]);
  });

  it('keeps payback and machines from the bookkeeper, who sees what jobs cost', async () => {
    const { visitor, shell } = await start('bookkeeper');
    await shell.goTo('/');
    expect(await shell.listRail()).toEqual([
      'Jobs',
      'Customers',
      'Hours',
      'Timesheets',
      'Month end',
      'People & rates',
      'Materials',
    ]);
    for (const path of ['/payback', '/forming', '/machines', '/shop']) {
      await expectRefusedPage(shell, path);
    }
    await shell.goTo('/jobs');
    await new DataGrid(visitor.page, 'Jobs').totals.locator('[col-id="total"]').getByText(/\$/).waitFor();
    // The same look at the answers finds money where there is some.
    expect(await listPathsWithMoney(visitor)).not.toEqual([]);
    expect(visitor.complaints).toEqual([]);
  });
});

async function expectRefusedPage(shell: Shell, path: string): Promise<void> {
  await shell.goTo(path);
  expect({ path, heading: (await shell.heading.textContent())?.trim() }).toEqual({
    path,
    heading: 'This page is not for your role',
  });
}

/** The requests of which the answer holds money. */
async function listPathsWithMoney(visitor: Visitor): Promise<string[]> {
  const answers = await visitor.listAnswers();
  return answers.filter(({ body }) => MONEY.test(body)).map(({ path }) => path);
}

/** Everybody whose time entries an answer of the hours grid holds. */
function listEmployees({ path, body }: Answer): string[] {
  if (!path.startsWith('/api/entries')) return [];
  return [...body.matchAll(/"employee":"([^"]+)"/g)].map(([, name]) => name ?? '');
}
