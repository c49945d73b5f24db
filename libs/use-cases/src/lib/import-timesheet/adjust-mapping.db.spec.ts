import { createTestShop, type TestShop } from '@brakeven/test-shop';
import { createReader } from '@brakeven/workbook';
import { readFile } from 'node:fs/promises';
import { resolve } from 'node:path';
import { adjustMapping, type MappingChanges } from './adjust-mapping';

let shop: TestShop;
beforeAll(async () => {
  shop = await createTestShop();
});
afterAll(() => shop.close());

const tools = { reader: createReader() };
const toFile = (csv: string) => ({ name: 'hours.csv', bytes: Buffer.from(csv) });
const adjust = (csv: string, changes: MappingChanges) =>
  adjustMapping(shop.context(), toFile(csv), changes, tools);

const HEADED = 'Date,Employee,Job,Operation,Hours,Extra\n2024-03-04,101,J-1,FORM,8,x\n';

describe('adjustMapping', () => {
  it('puts what is said in place of what was recognised, and keeps the rest', async () => {
    const mapping = await adjust(HEADED, { columns: { note: 'F' }, dateFormat: 'DD/MM/YYYY' });
    expect(mapping).toMatchObject({
      headerRow: 1,
      columns: { date: 'A', employee: 'B', job: 'C', operation: 'D', hours: 'E', note: 'F' },
      dateFormat: 'DD/MM/YYYY',
    });
  });

  it('takes a column from the field it was recognised as', async () => {
    const { columns } = await adjust(HEADED, { columns: { machine: 'C', job: 'F' } });
    expect(columns).toEqual({ date: 'A', employee: 'B', operation: 'D', hours: 'E', machine: 'C', job: 'F' });
  });

  it('looks for the header in the row and on the sheet that are named', async () => {
    const csv = `Title,,,,\nWho knows,,,,\n${HEADED}`;
    expect(await adjust(csv, { headerRow: 3 })).toMatchObject({ headerRow: 3, columns: { hours: 'E' } });
    const path = resolve(__dirname, '../../../../../tests/fixtures/workbooks/ok/two-weeks.xlsx');
    const file = { name: 'two-weeks.xlsx', bytes: await readFile(path) };
    const { sheets } = await tools.reader.readSheets(file);
    for (const { name } of sheets.filter(({ rows }) => rows.length > 1)) {
      const mapping = await adjustMapping(shop.context(), file, { sheet: name }, tools);
      expect(mapping).toMatchObject({ sheet: name, columns: { hours: expect.any(String) } });
    }
  });

  it('refuses a sheet that is not there and a file without any header', async () => {
    await expect(adjust(HEADED, { sheet: 'Week 99' })).rejects.toMatchObject({
      code: 'file_refused',
      message: "There is no sheet 'Week 99' in this file; it has 'CSV'.",
    });
    await expect(adjust('8\n7\n', { columns: { hours: 'A' } })).rejects.toMatchObject({
      code: 'header_not_found',
    });
  });
});
