import axe, { type AxeResults } from 'axe-core';
import { type Role } from '@brakeven/contract';
import { type Page } from 'playwright-core';
import { eventually } from './browser/eventually';
import { Visitors } from './browser/visitors';
import { Shell } from './pages/shell';
import { SignInPage } from './pages/sign-in-page';
import { WorkingsDrawer } from './pages/workings-drawer';

const PAGES: Readonly<Record<Role, readonly string[]>> = {
  owner: [
    '/payback',
    '/jobs',
    '/customers',
    '/hours',
    '/forming/fit',
    '/forming/depth',
    '/forming/card',
    '/forming/blank',
    '/forming/runs',
    '/forming/setup-card',
    '/forming/tooling',
    '/machines',
    '/timesheets',
    '/month-end',
    '/people',
    '/materials',
    '/shop',
    '/account',
    '/nowhere',
  ],
  bookkeeper: ['/timesheets', '/jobs', '/people', '/month-end', '/materials'],
  lead: ['/jobs', '/forming/runs', '/machines', '/materials'],
  operator: ['/hours', '/forming/fit', '/forming/runs', '/payback'],
};
const WIDTHS_PX = [390, 1024, 1440];

describe.each(['light', 'dark'] as const)('In %s colours', (theme) => {
  let visitors: Visitors;
  beforeAll(async () => {
    visitors = await Visitors.launch();
  });
  afterAll(() => visitors.close());

  it.each(Object.keys(PAGES) as Role[])(
    'every page of the %s can be used by everybody',
    async (role) => {
      const { page, complaints } = await visitors.visitAs(role, { theme });
      const shell = new Shell(page);
      for (const path of await listPaths(role, page)) {
        await shell.goTo(path);
        expect({ path, found: await listBarriers(page) }).toEqual({ path, found: [] });
        for (const width of WIDTHS_PX) {
          await page.setViewportSize({ width, height: 900 });
          // Charts take their new width a moment after the page.
          await eventually(async () =>
            expect({ path, width, overflowPx: Math.max(0, await shell.measureOverflowPx()) }).toEqual({
              path,
              width,
              overflowPx: 0,
            }),
          );
        }
      }
      expect(complaints).toEqual([]);
    },
    180_000,
  );

  it('sign-in, the workings drawer and a dialog can be used by everybody', async () => {
    const guest = await visitors.visit({ theme });
    await new SignInPage(guest.page).open();
    expect(await listBarriers(guest.page)).toEqual([]);

    const { page, complaints } = await visitors.visitAs('owner', { theme });
    const shell = new Shell(page);
    await shell.goTo('/payback');
    const drawer = new WorkingsDrawer(page);
    await drawer.openBy(shell.heading.locator('button.figure').first());
    expect(await listBarriers(page)).toEqual([]);
    await page.keyboard.press('Escape');
    await shell.goTo('/shop');
    await page.getByRole('button', { name: 'Add a user' }).click();
    await page.getByRole('dialog').getByLabel('E-mail').waitFor();
    expect(await listBarriers(page)).toEqual([]);
    expect(complaints).toEqual([]);
  });
});

/** The pages of the rail, and one of each list with its sub-pages where the role may open them. */
async function listPaths(role: Role, page: Page): Promise<string[]> {
  const details: string[] = [];
  for (const [list, pick] of [
    ['/api/jobs?limit=1', 'jobs'],
    ['/api/machines', 'machines'],
    ['/api/timesheets', 'timesheets'],
    ['/api/materials', 'materials'],
    ['/api/customers/figures?limit=1', 'customers'],
  ] as const) {
    const answer = await page.context().request.get(list);
    const id = answer.ok()
      ? /"(?:jobId|machineId|importId|materialId|customerId)":"([^"]+)"/.exec(await answer.text())?.[1]
      : undefined;
    if (id) details.push(`/${pick}/${id}`);
    if (id && pick === 'jobs' && role === 'owner') details.push(`/jobs/${id}/estimate`);
  }
  return [...PAGES[role], ...details];
}

/** What axe-core finds serious or critical, shortly. */
async function listBarriers(page: Page): Promise<string[]> {
  // By the browser's own way in, which the content security policy does not stand against.
  await page.evaluate(axe.source);
  const { violations } = await page.evaluate<AxeResults>(
    'axe.run(document, { resultTypes: ["violations"] })',
  );
  return violations
    .filter(({ impact }) => impact === 'serious' || impact === 'critical')
    .flatMap(({ id, nodes }) =>
      nodes.map((node) => `${id}: ${node.target.join(' ')} ${node.failureSummary ?? ''}`),
    );
}
