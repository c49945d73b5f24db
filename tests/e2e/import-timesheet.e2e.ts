import { type Visitor, Visitors } from './browser/visitors';
import { eventually } from './browser/eventually';
import { DataGrid } from './pages/data-grid';
import { toHours } from './pages/figure-text';
import { ImportPage } from './pages/import-page';
import { Shell } from './pages/shell';
import { TimesheetsPage } from './pages/timesheets-page';
import { type BadTimesheet, writeTimesheetWithThreeBadCells } from './timesheet-with-three-bad-cells';

describe('The bookkeeper takes in a workbook with three bad cells', () => {
  let visitors: Visitors;
  let bookkeeper: Visitor;
  let shell: Shell;
  let timesheets: TimesheetsPage;
  let workbook: BadTimesheet;
  let hoursBefore: number;

  beforeAll(async () => {
    visitors = await Visitors.launch();
    bookkeeper = await visitors.visitAs('bookkeeper');
    shell = new Shell(bookkeeper.page);
    timesheets = new TimesheetsPage(bookkeeper.page);
    const jobs = await bookkeeper.context.request.get('/api/jobs?status=open&limit=1');
    const [job] = ((await jobs.json()) as { items: { number: string }[] }).items;
    workbook = await writeTimesheetWithThreeBadCells(job?.number ?? '');
    hoursBefore = await readAllHours();
  });
  afterAll(() => visitors.close());

  it('asks for the column it does not know, then shows what is wrong in its cells', async () => {
    await shell.choose('Timesheets');
    await timesheets.giveFile(workbook.name, workbook.bytes);
    await bookkeeper.page.getByText('Say which column holds: Hours.').waitFor();
    await timesheets.mapColumn('Hours', 'E');
    await timesheets.problems.first().waitFor();
    const problems = await timesheets.listProblems();
    expect(problems.map(({ cell }) => cell)).toEqual(['B5', 'E6']);
    expect(problems[0]?.message).toContain('Tobbias Ren');
    expect(problems[1]?.message).toMatch(/24/);
    expect(toHours(await timesheets.readTerm('Ready'))).toBe(workbook.hoursGood);
  });

  it('takes a spelling for the one it stands for, and leaves out what cannot be settled', async () => {
    await timesheets.chooseName('Tobbias Ren', /Tobias Renn/);
    const good = workbook.hoursGood + workbook.hoursMisspelt;
    await eventually(async () => expect(toHours(await timesheets.readTerm('Ready'))).toBe(good));
    expect((await timesheets.listProblems()).map(({ cell }) => cell)).toEqual(['E6']);

    await timesheets.commitGoodRows();
    await bookkeeper.page
      .getByRole('heading', { name: '3 entries with 16.75 hours are in the books' })
      .waitFor();
    expect(toHours(await timesheets.readTerm('Added'))).toBe(good);
    expect(toHours(await timesheets.readTerm('Refused'))).toBe(30);
  });

  it('shows these hours, and these alone, under Hours', async () => {
    await bookkeeper.page.getByRole('link', { name: 'See these hours' }).click();
    await bookkeeper.page.waitForURL(/\/hours\?/);
    const hours = new DataGrid(bookkeeper.page, 'Time entries');
    await eventually(async () => {
      expect(toHours(await hours.readTotal('hours'))).toBe(16.75);
      expect((await hours.listColumn('employee')).sort()).toEqual([
        'Anselm Roe',
        'Jory Vance',
        'Tobias Renn',
      ]);
    });
    expect(await readAllHours()).toBe(hoursBefore + 16.75);
  });

  it('undoes the import from the history and gets every figure back', async () => {
    await shell.choose('Timesheets');
    const row = timesheets.historyRow(workbook.name);
    await row.getByText('in the books').waitFor();
    await row.getByRole('link', { name: workbook.name, exact: true }).click();
    await bookkeeper.page.waitForURL(/\/timesheets\/./);
    await new ImportPage(bookkeeper.page).undo();
    await bookkeeper.page.locator('app-status-tag').filter({ hasText: 'undone' }).waitFor();
    expect(await readAllHours()).toBe(hoursBefore);
    await shell.choose('Timesheets');
    await timesheets.historyRow(workbook.name).getByText('undone').waitFor();
    expect(bookkeeper.complaints).toEqual([]);
  });

  /** The total of all hours of the shop, as the page says it. */
  async function readAllHours(): Promise<number> {
    await shell.goTo('/hours?period=all');
    const total = new DataGrid(bookkeeper.page, 'Time entries');
    await total.rows.first().waitFor();
    return toHours(await total.readTotal('hours'));
  }
});
