import { DEMO_SHOP } from '@brakeven/demo-shop';
import { addDays, todayIn } from '@brakeven/values';
import exceljs from 'exceljs';
import { eventually } from './browser/eventually';
import { type Visitor, Visitors } from './browser/visitors';
import { FormDialog } from './pages/form-dialog';
import { toCents, toHours } from './pages/figure-text';
import { Shell } from './pages/shell';
import { SignInPage } from './pages/sign-in-page';
import { WorkingsDrawer } from './pages/workings-drawer';

const XLSX = 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet';

describe('The owner sets the shop up', () => {
  let visitors: Visitors;
  let owner: Visitor;
  let shell: Shell;

  beforeAll(async () => {
    visitors = await Visitors.launch();
    owner = await visitors.visitAs('owner');
    shell = new Shell(owner.page);
  });
  afterAll(() => visitors.close());

  it('adds a user, who has to change the temporary password before anything else', async () => {
    const email = 'avery@ternhollow.example';
    await shell.goTo('/shop');
    await owner.page.getByRole('button', { name: 'Add a user' }).click();
    const form = new FormDialog(owner.page);
    await form.fill({ Name: 'Avery Lund', 'E-mail': email });
    await form.dialog.getByLabel('Role').selectOption('lead');
    await form.submit('Add user');
    const password = (await form.dialog.locator('code').textContent())?.trim() ?? '';
    await form.submit('I have it');

    const { page, complaints } = await visitors.visit();
    await new SignInPage(page).open();
    await new SignInPage(page).signIn(email, password);
    await page.waitForURL(/\/account/);
    const own = new Shell(page);
    expect(await own.listRail()).toEqual([]);
    await own.goTo('/jobs');
    await page.waitForURL(/\/account/);
    await page.getByLabel('Present password').fill(password);
    await page.getByLabel('New password', { exact: true }).fill('a folded sheet of steel');
    await page.getByLabel('New password once more').fill('a folded sheet of steel');
    await page.getByRole('button', { name: 'Change password' }).click();
    await eventually(async () =>
      expect(await own.listRail()).toEqual(['Jobs', 'Hours', 'Forming', 'Machines', 'Materials']),
    );
    await own.choose('Jobs');
    expect(await own.heading.textContent()).toBe('Jobs');
    expect(complaints).toEqual([]);
  });

  it('raises what an hour on the press is charged at; after the rollup the payback follows to the cent', async () => {
    const before = await readEarned();
    const from = addDays(todayIn(DEMO_SHOP.timeZone), -56);
    await shell.goTo('/machines');
    await owner.page.getByRole('link', { name: 'Press 2' }).click();
    await owner.page.getByRole('button', { name: 'Add rates from a day on' }).click();
    const form = new FormDialog(owner.page);
    await form.fill({ From: from });
    const rate = Number(await form.dialog.getByLabel('Charge-out rate').inputValue());
    await form.fill({ 'Charge-out rate': (rate + 12).toFixed(2) });
    await form.submit('Add rates');
    expect(await shell.rollUp()).toMatch(/^Rolled up \d+ days?/);

    const after = await readEarned();
    const repriced = after.rows.filter(({ sum }) => sum.includes(`$${(rate + 12).toFixed(2)}`));
    const hours = repriced.reduce((sum, row) => sum + toHours(row.sum.split('×')[0] ?? ''), 0);
    expect(repriced.length).toBeGreaterThan(0);
    expect(after.cents - before.cents).toBe(hours * 12 * 100);
    expect(after.rows).toHaveLength(before.rows.length);
    expect(after.earnedBackCents - before.earnedBackCents).toBe(hours * 12 * 100);
  });

  it('fetches the set-up workbook, fills in a customer, has it checked and brings it in', async () => {
    await shell.goTo('/shop');
    const [download] = await Promise.all([
      owner.page.waitForEvent('download'),
      owner.page.getByRole('link', { name: 'Download the empty workbook' }).click(),
    ]);
    const workbook = new exceljs.Workbook();
    await workbook.xlsx.readFile(await download.path());
    workbook.getWorksheet('Customers')?.addRow(['Quarry Lane Gates']);
    const buffer = Buffer.from(await workbook.xlsx.writeBuffer());

    const card = owner.page.locator('app-setup-card');
    await card.locator('input[type=file]').setInputFiles({ name: 'Set-up.xlsx', mimeType: XLSX, buffer });
    await card.getByText('Everything is right.').waitFor();
    await card.getByRole('button', { name: 'Import all of it' }).click();
    await card.getByText('It is in.').waitFor();
    expect(await card.getByRole('row', { name: 'Customers 1 0 0' }).count()).toBe(1);
    const customers = await owner.context.request.get('/api/customers');
    expect(await customers.text()).toContain('Quarry Lane Gates');
    expect(owner.complaints).toEqual([]);
  });

  /** All that the press has earned, with its lines, and what it has earned back. */
  async function readEarned() {
    await shell.goTo('/payback');
    const drawer = new WorkingsDrawer(owner.page);
    const figure = shell.heading.locator('button.figure').first();
    const earnedBackCents = toCents((await figure.textContent()) ?? '');
    await drawer.openBy(figure);
    const [earned] = await drawer.listParts();
    await drawer.openPart(earned?.label ?? '');
    return { cents: await drawer.readCents(), rows: await drawer.listRows(), earnedBackCents };
  }
});
