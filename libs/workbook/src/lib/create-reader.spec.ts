import { mkdirSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { build } from 'esbuild';
import { loadFixture } from '../../testing/fixture-file';
import { packRawXlsx } from '../../testing/raw-xlsx';
import { createReader } from './create-reader';
import { readSheets } from './read-sheets';
import { type ReadProgress } from './sheet-file';

// Inside the workspace, so that the bundled worker finds the packages it needs.
const folder = join(__dirname, '../../../../dist/spec', `read-worker-${process.pid}`);
const workerUrl = pathToFileURL(join(folder, 'read-worker.js'));

jest.setTimeout(120_000);

beforeAll(async () => {
  mkdirSync(folder, { recursive: true });
  await build({
    entryPoints: [join(__dirname, '../read-worker.ts')],
    outdir: folder,
    bundle: true,
    platform: 'node',
    format: 'esm',
    target: 'node20',
    external: [
      'exceljs',
      'yauzl',
      'csv-parse',
      'csv-parse/sync',
      'zod',
      'decimal.js',
      '@internationalized/date',
    ],
    tsconfig: join(__dirname, '../../../../tsconfig.base.json'),
  });
});

afterAll(() => rmSync(folder, { recursive: true, force: true }));

describe('reading in a worker thread', () => {
  it('gives the same as reading in place, in pieces of any number of rows', async () => {
    const rows = Array.from(
      { length: 2_500 },
      (_, at) => `<row r="${at + 1}"><c r="A${at + 1}"><v>${at}</v></c></row>`,
    );
    const long = { name: 'long.xlsx', bytes: packRawXlsx(rows.join('')) };
    for (const file of [loadFixture('ok/two-weeks.xlsx'), loadFixture('ok/quoted.csv'), long]) {
      const inWorker = await createReader({ workerUrl }).readSheets(file);
      expect(inWorker).toEqual(await readSheets(file));
    }
  });

  it('passes progress and refusals on', async () => {
    const told: ReadProgress[] = [];
    await createReader({ workerUrl }).readSheets(loadFixture('ok/plain.xlsx'), (progress) =>
      told.push(progress),
    );
    expect(told.at(-1)).toEqual({ stage: 'rows', done: 1, total: 1 });
    const refused = createReader({ workerUrl }).readSheets(loadFixture('not-ok/old.xls'));
    await expect(refused).rejects.toMatchObject({ name: 'WorkbookError', code: 'file_old_xls' });
  });

  it('turns a worker out of memory into a refusal', async () => {
    const row = (at: number) => `<row r="${at}">${`<c r="A${at}"><v>1</v></c>`}</row>`;
    const bytes = packRawXlsx(Array.from({ length: 90_000 }, (_, at) => row(at + 1)).join(''));
    const reading = createReader({ workerUrl, heapMbMax: 24 }).readSheets({ name: 'big.xlsx', bytes });
    await expect(reading).rejects.toMatchObject({ code: 'file_needs_too_much_memory' });
  });

  it('fails alone when the one who listens to its progress fails', async () => {
    const reading = createReader({ workerUrl }).readSheets(loadFixture('ok/plain.xlsx'), () => {
      throw new Error('nobody listens');
    });
    await expect(reading).rejects.toThrow('nobody listens');
  });

  it('stops a worker that takes too long', async () => {
    const reading = createReader({ workerUrl, secondsMax: 0.001 }).readSheets(loadFixture('ok/plain.xlsx'));
    await expect(reading).rejects.toMatchObject({ code: 'file_takes_too_long' });
  });

  it('fails, and does not hang, when the worker cannot start', async () => {
    const nowhere = pathToFileURL(join(folder, 'missing.js'));
    await expect(
      createReader({ workerUrl: nowhere }).readSheets(loadFixture('ok/plain.xlsx')),
    ).rejects.toThrow('missing.js');
  });
});

it('reads in place without a worker', async () => {
  const file = await createReader().readSheets(loadFixture('ok/plain.xlsx'));
  expect(file.sheets.map(({ name }) => name)).toEqual(['Week 10']);
});
