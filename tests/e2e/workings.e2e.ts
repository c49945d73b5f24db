import { DataGrid } from './pages/data-grid';
import { toCents, toHours } from './pages/figure-text';
import { ImportPage } from './pages/import-page';
import { Shell } from './pages/shell';
import { WorkingsDrawer, type WorkingsRow } from './pages/workings-drawer';
import { Visitors, type Visitor } from './browser/visitors';

describe('The owner follows a figure to its cell', () => {
  let visitors: Visitors;
  let owner: Visitor;
  let shell: Shell;
  let drawer: WorkingsDrawer;

  beforeAll(async () => {
    visitors = await Visitors.launch();
    owner = await visitors.visitAs('owner');
    shell = new Shell(owner.page);
    drawer = new WorkingsDrawer(owner.page);
  });
  afterAll(() => visitors.close());

  it('opens what the press has earned back, part by part, down to a cell of the workbook', async () => {
    await shell.goTo('/payback');
    const figure = shell.heading.locator('app-figure button').first();
    const earnedBack = toCents((await figure.textContent()) ?? '');
    await drawer.openBy(figure);
    expect(await drawer.readCents()).toBe(earnedBack);

    const parts = await drawer.listParts();
    expect(parts.length).toBeGreaterThan(1);
    expect(sumOf(parts)).toBe(earnedBack);
    expect(await drawer.readVerdict()).toContain('exactly the figure');

    for (const part of parts) {
      await drawer.openPart(part.label);
      // What is taken off here is a plain amount where it is opened by itself.
      expect(await drawer.readCents()).toBe(Math.abs(part.cents));
      await drawer.dialog.getByRole('button', { name: 'Back to the figure before' }).click();
      await drawer.dialog
        .getByRole('button', { name: 'Back to the figure before' })
        .waitFor({ state: 'detached' });
      await drawer.verdict.waitFor();
    }
    await openDownToRows(drawer, parts[0]?.label ?? '');
    const rows = await drawer.listRows();
    expect(rows.length).toBeGreaterThan(0);
    expect(sumOf(rows)).toBe(await drawer.readCents());
    await expectRowInWorkbook(rows, Math.floor(rows.length / 2));
  });

  it('opens what labour has cost a job, from the grid, down to a cell of the workbook', async () => {
    await shell.goTo('/jobs');
    await owner.page.getByLabel('View', { exact: true }).selectOption({ label: 'Cost by category' });
    await owner.page.getByRole('button', { name: 'Finished', exact: true }).click();
    await owner.page.waitForURL(/status=finished/);
    const grid = new DataGrid(owner.page, 'Jobs');
    const labour = grid.cell(0, 'labour').locator('button.figure');
    const cents = toCents((await labour.textContent()) ?? '');
    await drawer.openBy(labour);
    expect(await drawer.readCents()).toBe(cents);

    const rows = await drawer.listRows();
    expect(sumOf(rows)).toBe(cents);
    await expectRowInWorkbook(rows, 0);
    expect(owner.complaints).toEqual([]);
  });

  /** Hours and cell named by the row are those that the kept workbook shows. */
  async function expectRowInWorkbook(rows: readonly WorkingsRow[], index: number): Promise<void> {
    const row = rows[index];
    await drawer.followRow(index);
    const { address, text } = await new ImportPage(owner.page).readMarkedCell();
    expect(row?.source).toMatch(new RegExp(`· ${address}$`));
    expect(toHours(text)).toBe(toHours(row?.sum.split('×')[0] ?? ''));
    expect(await shell.heading.textContent()).toBe(row?.source.split(' · ')[0]);
  }
});

/** Opens the part, and the first part of that, until there are rows. */
async function openDownToRows(drawer: WorkingsDrawer, label: string): Promise<void> {
  await drawer.openPart(label);
  const [first] = await drawer.listParts();
  if (first) await openDownToRows(drawer, first.label);
}

function sumOf(items: readonly { cents: number }[]): number {
  return items.reduce((sum, { cents }) => sum + cents, 0);
}
