import { execFile } from 'node:child_process';
import { readdirSync, readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { promisify } from 'node:util';
import { brotliCompressSync } from 'node:zlib';
import { chromium } from 'playwright-core';
import { type Bench, type BenchContext } from './bench';

const workspace = process.cwd();
const shellSources = resolve(workspace, 'tests/bench/bare-shell');
const shellRoot = resolve(workspace, 'dist/bench/bare-shell');

const bench: Bench = async (context) => {
  await buildShell();
  const { webRoot, say } = context;
  const initial = listInitialFiles(webRoot);
  assertLazy(webRoot, initial, say);
  const shell = compressedBytes(shellRoot, listInitialFiles(shellRoot));
  const ours = compressedBytes(webRoot, initial);
  const signInPage = compressedBytes(webRoot, await loadSignInPage(context));
  const against = `KiB against ${toKib(shell)} KiB, brotli`;
  return [
    {
      measure: 'initial JS and CSS ÷ those of a bare Angular and Material shell',
      ratio: ours / shell,
      aim: { atMost: 1.3 },
      detail: `${initial.length} files of ${toKib(ours)} ${against}`,
    },
    {
      measure: '… with the sign-in page and its Material form, of which the bare shell has none',
      ratio: signInPage / shell,
      aim: null,
      detail: `${toKib(signInPage)} ${against}`,
    },
  ];
};
export default bench;

async function buildShell(): Promise<void> {
  const program = resolve(workspace, 'node_modules/@angular/cli/bin/ng.js');
  await promisify(execFile)(process.execPath, [program, 'build'], {
    cwd: shellSources,
    env: { ...process.env, NG_CLI_ANALYTICS: 'false' },
    maxBuffer: 10_000_000,
  });
}

/** Scripts and styles that the page names, and whatever those scripts import at once. */
function listInitialFiles(folder: string): string[] {
  const page = readFileSync(resolve(folder, 'index.html'), 'utf8');
  const found = new Set(
    [...page.matchAll(/(?:src|href)="([^":]+\.(?:js|css))"/g)].map(([, name]) => name ?? ''),
  );
  // A set goes on to what is added while it is gone through.
  for (const name of found) {
    if (name.endsWith('.js')) listStaticImports(folder, name).forEach((imported) => found.add(imported));
  }
  return [...found];
}

function listStaticImports(folder: string, name: string): string[] {
  const text = readFileSync(resolve(folder, name), 'utf8');
  const statements = text.matchAll(
    /(?:^|[;\s}])(?:import|export)\s*(?:[\w$*{][^"'();]*?from\s*)?"\.\/([^"]+\.js)"/g,
  );
  return [...statements].map(([, imported]) => imported ?? '');
}

function compressedBytes(folder: string, names: readonly string[]): number {
  return names
    .map((name) => brotliCompressSync(readFileSync(resolve(folder, name))).byteLength)
    .reduce((total, bytes) => total + bytes, 0);
}

function toKib(bytes: number): string {
  return (bytes / 1_024).toFixed(1);
}

/** Words that only the code of the grid and of the charts has, whatever the minifier renames. */
const LAZY = { 'ag-grid': 'ag-root-wrapper', echarts: '_echarts_instance_' };

function assertLazy(folder: string, initial: readonly string[], say: BenchContext['say']): void {
  const scripts = readdirSync(folder).filter((name) => name.endsWith('.js'));
  for (const [library, word] of Object.entries(LAZY)) {
    const chunks = scripts.filter((name) => readFileSync(resolve(folder, name), 'utf8').includes(word));
    const early = chunks.filter((name) => initial.includes(name));
    if (chunks.length === 0) throw new Error(`No script holds ${library} any more; look for another word.`);
    if (early.length > 0) throw new Error(`${library} is in the first load: ${early.join(', ')}.`);
    const sizes = chunks.map((name) => `${name} (${toKib(compressedBytes(folder, [name]))} KiB)`);
    say(`${library} is loaded when it is needed: ${sizes.join(', ')}`);
  }
}

/** @returns the scripts and styles that a browser asks for, seen through to the end */
async function loadSignInPage({ makeDatabase, startApi }: BenchContext): Promise<string[]> {
  const api = await startApi(await makeDatabase('bench_first_load'));
  const browser = await chromium.launch({
    executablePath: '/usr/bin/chromium',
    args: ['--no-sandbox', '--disable-gpu', '--no-first-run', '--disable-background-networking'],
  });
  const names = new Set<string>();
  try {
    const page = await browser.newPage();
    page.on('response', (response) => {
      const { pathname } = new URL(response.url());
      if (/\.(js|css)$/.test(pathname)) names.add(pathname.slice(1));
    });
    await page.goto(api.address, { waitUntil: 'networkidle' });
    await page.getByRole('button', { name: 'Sign in' }).waitFor();
  } finally {
    await browser.close();
    await api.stop();
  }
  return [...names];
}
