import { D, massIn, toLocalDate, toMass, type UnitSystem } from '@brakeven/values';
import { type Cell, type CellValue, type DataValidation, type Workbook, type Worksheet } from 'exceljs';
import { columnLetters } from './cell-address';
import { encodeEscapedText } from './escaped-text';
import { loadExceljs } from './load-exceljs';
import { findSetupChoices, toChoiceWord } from './setup-choices';
import { EXPLAINING_SHEET, SETUP_PLANS } from './setup-columns';
import { type SetupData } from './setup-data';
import { type SetupCellKind, type SetupColumn, type SetupSheetPlan } from './setup-plan';
import { findSetupQuantity, toUnitHeader } from './setup-quantities';
import {
  DATE_FORMAT,
  HEADER_FILL,
  HEADER_FONT,
  HOURS_FORMAT,
  MONEY_FORMAT,
  QUIET_FONT,
  RATE_FORMAT,
  TEXT_FORMAT,
  TITLE_FONT,
  WHOLE_FORMAT,
} from './sheet-style';
import { toWorkbookDate } from './workbook-date';

const LISTED_ROWS = 1_000;
const EXAMPLE_DIGITS = 4;
const NUMBER_FORMATS: Readonly<Record<SetupCellKind, string>> = {
  label: TEXT_FORMAT,
  date: DATE_FORMAT,
  money: MONEY_FORMAT,
  rate: RATE_FORMAT,
  percent: '0.####',
  count: WHOLE_FORMAT,
  hours: HOURS_FORMAT,
  minutes: '0.####',
  yesNo: TEXT_FORMAT,
  force: '0.##',
  forcePerLength: '0.##',
  length: '0.###',
  radius: '0.####',
  angle: '0.##',
  mass: '0.###',
  density: '0.####',
  strength: '0.##',
  thickness: TEXT_FORMAT,
  pricePerWeight: RATE_FORMAT,
  costKind: TEXT_FORMAT,
  jobStatus: TEXT_FORMAT,
  materialForm: TEXT_FORMAT,
  issueKind: TEXT_FORMAT,
  invoiceKind: TEXT_FORMAT,
  estimateKind: TEXT_FORMAT,
};
const NUMBERS: ReadonlySet<SetupCellKind> = new Set([
  'money',
  'rate',
  'percent',
  'count',
  'hours',
  'minutes',
  'angle',
] as const);
const WEIGHT_UNITS = { us: 'lb', metric: 'kg' } as const;
const EXPLANATION = [
  'Fill in one sheet after the other; sheets that you do not need may stay empty or be deleted.',
  'The words in the blue rows decide what a column means. Their order does not matter.',
  'Dates must be real dates or texts such as 2026-03-02. Amounts are plain numbers without a currency sign.',
  'Import the workbook again at any time: new rows are added, changed ones are changed, the rest stays as it is.',
  'Nothing is written unless every row can be read. The examples below are not imported.',
];

/** The set-up workbook without rows: a sheet that explains, then one empty sheet for each list. */
export async function writeSetupTemplate(
  { units }: { units: UnitSystem } = { units: 'us' },
): Promise<Buffer> {
  const exceljs = await loadExceljs();
  const workbook = new exceljs.Workbook();
  writeExplanation(workbook, units);
  for (const plan of SETUP_PLANS) writeSheet(workbook, plan, [], units);
  return toBuffer(workbook);
}

/**
 * A set-up workbook filled with `data`, as a shop would fill the template; quantities in the given units. Lists that
 * are left out give empty sheets.
 */
export async function writeSetupWorkbook(
  data: Partial<SetupData>,
  { units }: { units: UnitSystem } = { units: 'us' },
): Promise<Buffer> {
  const exceljs = await loadExceljs();
  const workbook = new exceljs.Workbook();
  writeExplanation(workbook, units);
  for (const plan of SETUP_PLANS) writeSheet(workbook, plan, data[plan.list] ?? [], units);
  return toBuffer(workbook);
}

function writeExplanation(workbook: Workbook, units: UnitSystem): void {
  const sheet = workbook.addWorksheet(EXPLAINING_SHEET);
  [16, 24, 26, 70].forEach((width, index) => (sheet.getColumn(index + 1).width = width));
  sheet.addRow([EXPLAINING_SHEET]).font = TITLE_FONT;
  for (const line of EXPLANATION) sheet.addRow([line]).font = QUIET_FONT;
  sheet.addRow([]);
  const header = sheet.addRow(['Sheet', 'Column', 'Example', 'What to write']);
  header.eachCell((cell) => styleHeader(cell));
  for (const plan of SETUP_PLANS) {
    sheet.addRow([plan.sheet, null, null, plan.help]).font = { bold: true };
    for (const column of plan.columns) {
      const need = column.isRequired ? '' : ' (optional)';
      const header = toUnitHeader(column.header, column.kind, units);
      sheet.addRow([null, `${header}${need}`, toExample(column, units), column.help]);
    }
  }
}

/** Examples are kept in the units of the United States. */
function toExample({ example, kind }: SetupColumn, units: UnitSystem): string {
  if (units === 'us') return example;
  if (kind === 'pricePerWeight')
    return D(example)
      .div(massIn(toMass(1, 'lb'), 'kg'))
      .toFixed(2);
  const quantity = findSetupQuantity(kind);
  if (!quantity) return example;
  const base = quantity.toBase(example, quantity.units.us);
  return quantity.fromBase(base.toFixed(), units).toSignificantDigits(EXAMPLE_DIGITS).toFixed();
}

function writeSheet(
  workbook: Workbook,
  plan: SetupSheetPlan,
  rows: SetupData[keyof SetupData],
  units: UnitSystem,
): void {
  const sheet = workbook.addWorksheet(plan.sheet, { views: [{ state: 'frozen', ySplit: 1 }] });
  plan.columns.forEach((column, index) => prepareColumn(sheet, column, index + 1, units));
  for (const [index, row] of rows.entries()) {
    plan.columns.forEach((column, at) => {
      const value = new Map(Object.entries(row)).get(column.key) as string | number | boolean | null;
      if (value !== null) sheet.getCell(index + 2, at + 1).value = toCellValue(value, column.kind, units);
    });
  }
}

function prepareColumn(sheet: Worksheet, column: SetupColumn, at: number, units: UnitSystem): void {
  const header = toUnitHeader(column.header, column.kind, units);
  sheet.getColumn(at).width = Math.max(12, header.length + 4);
  sheet.getColumn(at).numFmt = NUMBER_FORMATS[column.kind];
  const cell = sheet.getCell(1, at);
  cell.value = header;
  styleHeader(cell);
  addChoices(sheet, column.kind, at);
}

function addChoices(sheet: Worksheet, kind: SetupCellKind, at: number): void {
  const choices = kind === 'yesNo' ? ['yes', 'no'] : Object.keys(findSetupChoices(kind)?.words ?? {});
  if (choices.length === 0) return;
  const column = columnLetters(at);
  // The library's types leave out this list; setting it cell by cell would fill a thousand rows with blank cells.
  const { dataValidations } = sheet as Worksheet & {
    dataValidations: { add(range: string, validation: DataValidation): void };
  };
  dataValidations.add(`${column}2:${column}${LISTED_ROWS}`, {
    type: 'list',
    allowBlank: true,
    formulae: [`"${choices.join(',')}"`],
    showErrorMessage: true,
    errorTitle: 'Not in the list',
    error: `Write one of: ${choices.join(', ')}.`,
  });
}

function styleHeader(cell: Cell): void {
  cell.font = HEADER_FONT;
  cell.fill = HEADER_FILL;
  cell.numFmt = TEXT_FORMAT;
}

function toCellValue(value: string | number | boolean, kind: SetupCellKind, units: UnitSystem): CellValue {
  if (kind === 'yesNo') return value === true ? 'yes' : 'no';
  const text = String(value);
  if (kind === 'date') return toWorkbookDate(toLocalDate(text));
  if (kind === 'pricePerWeight') {
    return D(text)
      .times(massIn(toMass(1, WEIGHT_UNITS[units]), 'kg'))
      .toNumber();
  }
  if (NUMBERS.has(kind)) return D(text).toNumber();
  const choices = findSetupChoices(kind);
  if (choices) return toChoiceWord(choices, text);
  return findSetupQuantity(kind)?.fromBase(text, units).toNumber() ?? encodeEscapedText(text);
}

async function toBuffer(workbook: Workbook): Promise<Buffer> {
  return Buffer.from(await workbook.xlsx.writeBuffer());
}
