/**
 * Takes the pictures of the README from a running Brakeven with the demo shop in it:
 *   npm start, then: node tests/screenshots/take-screenshots.mjs http://127.0.0.1:PORT [FOLDER [WIDTH [light|dark]]]
 */
import { mkdirSync, readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { chromium } from 'playwright-core';

const root = join(import.meta.dirname, '../..');
const demoFolder = process.env.DEMO_FOLDER ?? join(root, '.local/demo');
const owner = { email: 'mara@ternhollow.example', password: 'tern-hollow-owner' };
const [address, folder = import.meta.dirname, width = '1440', theme = 'light'] = process.argv.slice(2);

/** @typedef {import('playwright-core').Page} Page */

/** @type {Record<string, (page: Page) => Promise<void>>} */
const pictures = {
  payback: (page) => goTo(page, '/payback'),
  workings: async (page) => {
    await goTo(page, '/payback');
    await page.locator('main h1 button.figure').first().click();
    await page.locator('app-workings-drawer .part').first().click();
    await page.locator('app-workings-drawer ol > li').first().waitFor();
  },
  jobs: (page) => openGrid(page, '/jobs'),
  job: (page) => openJob(page, ''),
  estimate: (page) => openJob(page, '/estimate'),
  materials: (page) => goTo(page, '/materials'),
  'month-end': (page) => goTo(page, '/month-end'),
  hours: (page) => openGrid(page, '/hours?period=all'),
  'forming-fit': (page) => goTo(page, '/forming/fit'),
  'forming-blank': (page) => goTo(page, '/forming/blank'),
  // It opens on the set-up of the latest trial bend.
  'forming-depth': (page) => goTo(page, '/forming/depth'),
  'forming-fit-1024': async (page) => {
    await page.setViewportSize({ width: 1024, height: 1400 });
    await goTo(page, '/forming/fit');
  },
  'forming-card': async (page) => {
    await goTo(page, '/forming/card');
    await page.pdf({ path: join(folder, 'forming-card.pdf'), preferCSSPageSize: true });
    // As it is printed.
    await page.emulateMedia({ media: 'print' });
  },
  'forming-runs': (page) => goTo(page, '/forming/runs'),
  machines: async (page) => {
    await goTo(page, '/machines');
    await page.getByRole('link', { name: 'Press 2' }).click();
    await page.getByRole('heading', { name: 'Hourly rates' }).waitFor();
  },
  timesheets: async (page) => {
    await goTo(page, '/timesheets');
    await page.locator('app-file-drop input[type=file]').setInputFiles(findTimesheet());
    await page.locator('app-check-table .problem').first().waitFor();
  },
};

if (!address) {
  process.stderr.write(
    'Say where Brakeven runs: node tests/screenshots/take-screenshots.mjs http://127.0.0.1:PORT\n',
  );
  process.exit(2);
}
await takeAll();

async function takeAll() {
  const args = ['--disable-gpu', ...(process.getuid?.() === 0 ? ['--no-sandbox'] : [])];
  const browser = await chromium.launch({
    executablePath: '/usr/bin/chromium',
    args,
    // Without scrollbars the grids would show the room they keep for them.
    ignoreDefaultArgs: ['--hide-scrollbars'],
  });
  try {
    const page = await browser.newPage({
      baseURL: address,
      viewport: { width: Number(width), height: 900 },
      colorScheme: theme === 'dark' ? 'dark' : 'light',
      reducedMotion: 'reduce',
      locale: 'en-US',
    });
    await signIn(page);
    mkdirSync(folder, { recursive: true });
    for (const [name, open] of Object.entries(pictures)) {
      await page.emulateMedia({ media: 'screen' });
      await page.setViewportSize({ width: Number(width), height: 900 });
      await open(page);
      await waitUntilSettled(page);
      await page.screenshot({ path: join(folder, `${name}.png`) });
    }
  } finally {
    await browser.close();
  }
}

/** @param {Page} page */
async function signIn(page) {
  await page.goto('/sign-in');
  await page.getByLabel('E-mail').fill(owner.email);
  await page.getByLabel('Password', { exact: true }).fill(owner.password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.locator('app-shell main h1').first().waitFor();
}

/**
 * @param {Page} page
 * @param {string} path
 */
async function goTo(page, path) {
  await page.goto(path);
  await page.locator('app-shell main h1').first().waitFor();
  await waitUntilSettled(page);
}

/**
 * The job that lost money.
 * @param {Page} page
 * @param {string} part
 */
async function openJob(page, part) {
  const answer = await page.request.get('/api/jobs?sort=margin&direction=asc&status=invoiced&limit=1');
  const { items } = await answer.json();
  await goTo(page, `/jobs/${items[0].jobId}${part}`);
}

/**
 * @param {Page} page
 * @param {string} path
 */
async function openGrid(page, path) {
  await goTo(page, path);
  await page.locator('app-grid .ag-row-pinned').filter({ hasText: /\d/ }).waitFor();
}

/** @param {Page} page */
async function waitUntilSettled(page) {
  await page.waitForLoadState('networkidle');
  await page.waitForFunction(
    () =>
      document.querySelectorAll('app-loading-skeleton, .ag-loading').length === 0 &&
      document.fonts.status === 'loaded',
  );
}

/** The week that `npm start` has left to try the import with. */
function findTimesheet() {
  const name = readdirSync(demoFolder).find((file) => file.endsWith('.xlsx'));
  if (!name)
    throw new Error(`There is no timesheet in ${demoFolder}. Run npm start once with an empty database.`);
  const mimeType = 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet';
  return { name, mimeType, buffer: readFileSync(join(demoFolder, name)) };
}
