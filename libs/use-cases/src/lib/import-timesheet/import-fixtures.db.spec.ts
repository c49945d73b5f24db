import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { createTestShop, type TestShop } from '@brakeven/test-shop';
import { createReader } from '@brakeven/workbook';
import { type ShopContext } from '../context';
import { checkTimesheet } from './check-timesheet';
import { importTimesheet } from './import-timesheet';
import { type UploadedFile } from './upload';

const FOLDER = join(__dirname, '../../../../../tests/fixtures/workbooks');
const tools = { reader: createReader() };

const listFiles = (folder: string) =>
  readdirSync(join(FOLDER, folder)).filter((name) => !name.startsWith('setup-'));
const readFixture = (folder: string, name: string): UploadedFile => ({
  name,
  bytes: new Uint8Array(readFileSync(join(FOLDER, folder, name))),
});

/** Fixtures that hold other entries than the usual two, or need somebody to say how they are to be read. */
const OTHER_CONTENT = new Set([
  'cells-without-addresses.xlsx',
  'covered-by-merge.xlsx',
  'escaped-h-in-format.xlsx',
  'float-noise.xlsx',
  'hours-as-duration-libreoffice.xlsx',
  'hours-as-duration.xlsx',
  'hours-as-text.xlsx',
  'inline-strings.xlsx',
  'iso-dates.xlsx',
  'native-libreoffice.xlsx',
  'other-part-names.xlsx',
  'padded-numbers.xlsx',
  'prefixed-tags.xlsx',
  'quoted.csv',
  'semicolon-decimal-comma.csv',
  'shared-formula-hours-libreoffice.xlsx',
  'shared-formula-hours.xlsx',
  'unknown-headers.xlsx',
  'utf8-bom.csv',
  'validation-on-whole-column.xlsx',
]);

describe('importing the fixtures', () => {
  let shop: TestShop;
  let context: ShopContext;
  beforeAll(async () => {
    shop = await createTestShop();
    context = shop.context('bookkeeper', { now: () => new Date('2026-03-20T12:00:00Z') });
    const employeeId = await shop.addEmployee({ number: '101', name: 'Mara Quill' });
    await shop.addPayRate({ employeeId, validFrom: '2020-01-01', wagePerHour: '28.50' });
    for (const number of ['2041', '2042']) await shop.addJob({ number });
    for (const code of ['FORM', 'WELD']) await shop.addOperation({ code });
    await shop.addMachine({ code: 'P2' });
    const plain = await importTimesheet(context, readFixture('ok', 'plain.xlsx'), {}, tools);
    expect(plain).toMatchObject({ entriesAdded: 2, hoursAdded: '9.7500' });
  }, 30_000);
  afterAll(() => shop.close());

  const countEntries = async () =>
    (await shop.inShop((trx) => trx.selectFrom('timeEntry').select('entryId').execute())).length;

  it.each(listFiles('ok').filter((name) => !OTHER_CONTENT.has(name)))(
    'knows the same two entries again in %s',
    async (name) => {
      const check = await checkTimesheet(context, readFixture('ok', name), {}, tools);
      expect(check).toMatchObject({ rowsRead: 2, alreadyThere: 2, entriesReady: 0, refused: 0 });
      expect(check).toMatchObject({ hoursRead: '9.7500', hoursAlreadyThere: '9.7500' });
      if (check.controlTotal) expect(check.controlTotal.agrees).toBe(true);
    },
    20_000,
  );

  it('takes text dates and decimal commas once they are declared', async () => {
    const file = readFixture('ok', 'semicolon-decimal-comma.csv');
    const { mapping } = await checkTimesheet(context, file, {}, tools);
    if (!mapping) throw new Error('The header of this fixture is in known words.');
    const declared = { ...mapping, dateFormat: 'DD.MM.YYYY' } as const;
    expect(mapping.decimalMark).toBe(',');
    const check = await checkTimesheet(context, file, { mapping: declared }, tools);
    expect(check).toMatchObject({ alreadyThere: 2, refused: 0, hoursRead: '9.7500' });
  });

  it.each(listFiles('not-ok'))(
    'takes nothing of %s and says why',
    async (name) => {
      const before = await countEntries();
      const refusal = await importTimesheet(context, readFixture('not-ok', name), {}, tools).catch(
        (error: unknown) => error,
      );
      expect(refusal).toMatchObject({
        name: 'AppError',
        code: expect.stringMatching(/^(file_refused|rows_refused|mapping_incomplete)$/),
        issues: expect.arrayContaining([
          expect.objectContaining({ message: expect.stringMatching(/\w{3}/) }),
        ]),
      });
      expect(await countEntries()).toBe(before);
    },
    20_000,
  );
});
