import { PassThrough } from 'node:stream';
import { buffer } from 'node:stream/consumers';
import { type JobExportQuery } from '@brakeven/contract';
import { listJobs } from '../show-jobs/list-jobs';
import { createWorkedShop, WORKED_NOW, type WorkedShop } from '../testing/worked-shop';
import { exportJobsCsv, exportJobsWorkbook, type StreamedFile } from './export-jobs';

jest.setTimeout(30_000);

describe('exporting jobs', () => {
  let shop: WorkedShop;
  const query = (change: Partial<JobExportQuery> = {}): JobExportQuery => ({
    columns: ['number', 'title', 'hours', 'total', 'dueOn'],
    sort: 'number',
    direction: 'asc',
    ...change,
  });
  const contentOf = async (file: StreamedFile) => {
    const target = new PassThrough();
    const [content] = await Promise.all([buffer(target), file.write(target)]);
    return content;
  };

  beforeAll(async () => {
    shop = await createWorkedShop();
  });
  afterAll(() => shop.close());

  it('writes the rows of the filter, in the columns and the order asked for, as the grid has them', async () => {
    const owner = shop.context('owner', { now: WORKED_NOW });
    const file = await exportJobsCsv(owner, query({ search: '10' }));
    expect(file.name).toBe('jobs-2026-05-20.csv');
    const { items } = await listJobs(owner, { search: '10', sort: 'number', direction: 'asc', limit: 50 });
    const rows = items.map(({ number, title, hours, total, dueOn }) =>
      [number, title, hours, total, dueOn].join(','),
    );
    expect(items.length).toBeGreaterThan(2);
    const text = (await contentOf(file)).toString();
    expect(text).toBe(`\uFEFF${['Job,Title,Hours,Cost,Due', ...rows].join('\r\n')}\r\n`);
  });

  it('reads page after page, each row once', async () => {
    const many = Array.from({ length: 1_203 }, (_, n) => ({ number: `B${n}`, title: 'Bracket' }));
    await shop.inShop(async (trx) => {
      const rows = many.map((row) => ({ shopId: shop.shop.shopId, status: 'quoted' as const, ...row }));
      await trx.insertInto('job').values(rows).execute();
    });
    const file = await exportJobsCsv(shop.context(), query({ search: 'bracket', columns: ['number'] }));
    const numbers = (await contentOf(file)).toString().trim().split('\r\n').slice(1);
    expect(new Set(numbers).size).toBe(many.length);
    expect(numbers).toHaveLength(many.length);
  });

  it('keeps money from who may not see it', async () => {
    const lead = shop.context('lead');
    await expect(exportJobsWorkbook(lead, query())).rejects.toMatchObject({ code: 'forbidden' });
    await expect(exportJobsCsv(lead, query({ columns: ['number'], sort: 'margin' }))).rejects.toMatchObject({
      code: 'forbidden',
    });
    const file = await exportJobsWorkbook(lead, query({ columns: ['number', 'hours'] }));
    expect((await contentOf(file)).subarray(0, 2).toString()).toBe('PK');
  });
});
