import { type Visitor, Visitors } from './browser/visitors';
import { FormDialog } from './pages/form-dialog';
import { toCents } from './pages/figure-text';
import { Shell } from './pages/shell';

describe('A month is closed and reopened', () => {
  let visitors: Visitors;
  beforeAll(async () => {
    visitors = await Visitors.launch();
  });
  afterAll(() => visitors.close());

  it('by the bookkeeper, who cannot reopen it; by the owner, who says why; its figures stay as they are', async () => {
    const bookkeeper = await visitors.visitAs('bookkeeper');
    await new Shell(bookkeeper.page).goTo('/month-end');
    const month = await readChosenMonth(bookkeeper);
    const before = await readTotals(bookkeeper);
    expect(toCents(before['Labour'] ?? '')).toBeGreaterThan(0);
    await bookkeeper.page.getByRole('button', { name: `Close ${month}` }).click();
    await bookkeeper.page
      .getByRole('alertdialog')
      .getByRole('button', { name: `Close ${month}` })
      .click();
    await bookkeeper.page.getByRole('heading', { name: `${month} is closed` }).waitFor();
    expect(await readTotals(bookkeeper)).toEqual(before);
    expect(await bookkeeper.page.getByRole('button', { name: 'Reopen…' }).count()).toBe(0);

    const owner = await visitors.visitAs('owner');
    await owner.page.goto(new URL(bookkeeper.page.url()).pathname);
    await owner.page.getByRole('heading', { name: `${month} is closed` }).waitFor();
    // The owner sees what the machines earned besides.
    const closed = await readTotals(owner);
    expect(closed).toMatchObject(before);
    await owner.page.getByRole('button', { name: 'Reopen…' }).click();
    const form = new FormDialog(owner.page);
    await form.fill({ Reason: 'A week of timesheets was missing' });
    await form.submit('Reopen');
    await owner.page.getByRole('button', { name: `Close ${month}` }).waitFor();
    expect(await readTotals(owner)).toEqual(closed);
    const closings = owner.page.getByRole('region', { name: 'Closed months' });
    await closings
      .getByText(/A week of timesheets was missing/)
      .first()
      .waitFor();
    expect([...bookkeeper.complaints, ...owner.complaints]).toEqual([]);
  });

  /** The name of the month that the page shows, such as `March 2026`. */
  async function readChosenMonth({ page }: Visitor): Promise<string> {
    const close = page.getByRole('button', { name: /^Close / });
    return ((await close.textContent()) ?? '').trim().replace('Close ', '');
  }

  /** The amount of each category, by its word. */
  async function readTotals({ page }: Visitor): Promise<Record<string, string>> {
    const table = page.getByRole('region', { name: 'Totals by category' });
    await table.waitFor();
    const rows = await table.locator('tbody tr').evaluateAll((found) =>
      found.map((row): [string, string] => {
        const textOf = (index: number) => row.children.item(index)?.textContent?.trim() ?? '';
        return [textOf(0), textOf(1)];
      }),
    );
    return Object.fromEntries(rows);
  }
});
