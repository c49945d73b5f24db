import { type TimesheetMapping } from '@brakeven/contract';
import { render } from '../testing/rendered';
import { sampleCheck } from '../testing/sample-check';
import { MappingPanel } from './mapping-panel';

const mapping = { sheet: 'Hours', headerRow: 4, columns: { date: 'A', employee: 'B' } };
const check = sampleCheck({ mapping, missingFields: ['job', 'operation', 'hours'] });

describe('MappingPanel', () => {
  let changed: TimesheetMapping[];
  const listen = { changed: (one: TimesheetMapping) => changed.push(one) };

  beforeEach(() => {
    changed = [];
  });

  it('names what is still missing, and shows a sample of each column', async () => {
    const page = await render(MappingPanel, { check }, listen);
    expect(page.text).toContain('Say which column holds: Job, Operation, Hours.');
    expect(page.textsOf('select[aria-label="Column for Operation"] option')).toContain(
      'F · Was, such as FORM',
    );
    expect(page.all('tr.missing')).toHaveLength(3);
  });

  it('gives each change on with those before it', async () => {
    const page = await render(MappingPanel, { check }, listen);
    await page.enter('select[aria-label="Column for Operation"]', 'F');
    await page.enter('select[aria-label="Column for Date"]', '');
    expect(changed.map(({ columns }) => columns)).toEqual([
      { date: 'A', employee: 'B', operation: 'F' },
      { employee: 'B', operation: 'F' },
    ]);
  });

  it('declares how dates and decimals are written, and forgets the columns of another header row', async () => {
    const page = await render(MappingPanel, { check }, listen);
    const [, format, mark] = page.all('.where select') as HTMLSelectElement[];
    format!.value = 'DD.MM.YYYY';
    format!.dispatchEvent(new Event('change'));
    mark!.value = ',';
    mark!.dispatchEvent(new Event('change'));
    await page.enter('input[type=number]', '6');
    expect(changed.at(-1)).toEqual({
      sheet: 'Hours',
      headerRow: 6,
      columns: {},
      dateFormat: 'DD.MM.YYYY',
      decimalMark: ',',
    });
  });

  it('says what an unused column is, and that it is not used after all', async () => {
    const unusedColumns = [
      { column: 'F', text: 'Was', samples: ['FORM', 'WELD'], message: 'F is not used.' },
    ];
    const page = await render(MappingPanel, { check: { ...check, unusedColumns } }, listen);
    expect(page.textsOf('.unused label')[0]).toContain('Column F “Was” such as FORM, WELD');
    expect(page.textsOf('#unused-F option')).toContain('Date, instead of column A');
    await page.enter('#unused-F', 'operation');
    await page.enter('#unused-F', '');
    expect(changed.map(({ columns }) => columns)).toEqual([
      { date: 'A', employee: 'B', operation: 'F' },
      { date: 'A', employee: 'B' },
    ]);
  });

  it('does not ask for a header row that cannot be', async () => {
    const page = await render(MappingPanel, { check }, listen);
    await page.enter('input[type=number]', '0');
    await page.enter('input[type=number]', '2.5');
    expect(changed).toEqual([]);
  });

  it('repeats what the server said of the mapping', async () => {
    const issues = [
      { field: 'mapping.headerRow', message: 'Row 9 is blank.' },
      { field: 'file', message: 'Elsewhere.' },
    ];
    const page = await render(MappingPanel, { check, issues }, listen);
    expect(page.textsOf('[role=alert]')).toEqual(['Row 9 is blank.']);
  });
});
