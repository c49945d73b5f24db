/// <reference lib="dom" />
import { type Page } from 'playwright-core';
import { findSignIn } from './browser/sign-ins';
import { Visitors } from './browser/visitors';
import { SignInPage } from './pages/sign-in-page';
import { WorkingsDrawer } from './pages/workings-drawer';
import { Shell } from './pages/shell';

const TABS_MAX = 40;

describe('Without a mouse', () => {
  let visitors: Visitors;
  beforeAll(async () => {
    visitors = await Visitors.launch();
  });
  afterAll(() => visitors.close());

  it('goes from sign-in over the skip link to a figure, into its workings and back to it', async () => {
    const { page } = await visitors.visit();
    const { email, password } = findSignIn('owner');
    await new SignInPage(page).open();
    await tabTo(page, '#email');
    await page.keyboard.type(email);
    await tabTo(page, '#password');
    await page.keyboard.type(password);
    await page.keyboard.press('Enter');
    const shell = new Shell(page);
    await shell.heading.locator('button.figure').first().waitFor();

    await tabTo(page, 'a.skip');
    await page.keyboard.press('Enter');
    expect(await page.evaluate(() => document.activeElement?.id)).toBe('page');
    await tabTo(page, 'main button.figure');
    const figure = await page.evaluate(() => document.activeElement?.textContent?.trim());

    await page.keyboard.press('Enter');
    const drawer = new WorkingsDrawer(page);
    await drawer.verdict.waitFor();
    for (let press = 0; press < TABS_MAX; press += 1) {
      await page.keyboard.press('Tab');
      expect(await page.evaluate(isFocusBehindDialog)).toBe(false);
    }
    await page.keyboard.press('Escape');
    await drawer.dialog.waitFor({ state: 'detached' });
    expect(await page.evaluate(() => document.activeElement?.textContent?.trim())).toBe(figure);
  });
});

/** Presses Tab until what is meant has the focus. */
async function tabTo(page: Page, selector: string): Promise<void> {
  for (let press = 0; press < TABS_MAX; press += 1) {
    if (await page.evaluate((wanted) => document.activeElement?.matches(wanted) ?? false, selector)) return;
    await page.keyboard.press('Tab');
  }
  throw new Error(`${selector} is not reached by ${TABS_MAX} presses of Tab.`);
}

/** Past the last part of a modal dialog the browser's own controls come; then the document has no focus at all. */
function isFocusBehindDialog(): boolean {
  const focused = document.activeElement;
  return focused !== null && focused !== document.body && focused.closest('dialog[open]') === null;
}
