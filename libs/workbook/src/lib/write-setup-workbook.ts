import { JOB_STATUSES, MACHINE_COST_KINDS } from '@brakeven/contract';
import { D, forceIn, lengthIn, toForce, toLength, toLocalDate, type UnitSystem } from '@brakeven/values';
import { type Cell, type CellValue, type DataValidation, type Workbook, type Worksheet } from 'exceljs';
import { columnLetters } from './cell-address';
import { encodeEscapedText } from './escaped-text';
import { loadExceljs } from './load-exceljs';
import {
  EXPLAINING_SHEET,
  SETUP_PLANS,
  type SetupCellKind,
  type SetupColumn,
  type SetupSheetPlan,
} from './setup-columns';
import { type SetupData } from './setup-data';
import {
  DATE_FORMAT,
  HEADER_FILL,
  HEADER_FONT,
  MONEY_FORMAT,
  QUIET_FONT,
  RATE_FORMAT,
  TEXT_FORMAT,
  TITLE_FONT,
  WHOLE_FORMAT,
} from './sheet-style';
import { toWorkbookDate } from './workbook-date';

const LISTED_ROWS = 1_000;
const NUMBER_FORMATS: Readonly<Record<SetupCellKind, string>> = {
  label: TEXT_FORMAT,
  date: DATE_FORMAT,
  money: MONEY_FORMAT,
  rate: RATE_FORMAT,
  percent: '0.####',
  count: WHOLE_FORMAT,
  yesNo: TEXT_FORMAT,
  force: '0.##',
  length: '0.###',
  costKind: TEXT_FORMAT,
  jobStatus: TEXT_FORMAT,
};
const CHOICES: Readonly<Partial<Record<SetupCellKind, readonly string[]>>> = {
  yesNo: ['yes', 'no'],
  costKind: MACHINE_COST_KINDS,
  jobStatus: JOB_STATUSES,
};
const UNITS: Readonly<Record<UnitSystem, Readonly<Partial<Record<SetupCellKind, string>>>>> = {
  us: { force: 'tons', length: 'in' },
  metric: { force: 'kN', length: 'mm' },
};
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

/** A set-up workbook filled with `data`, as a shop would fill the template; forces and lengths in the given units. */
export async function writeSetupWorkbook(
  data: SetupData,
  { units }: { units: UnitSystem } = { units: 'us' },
): Promise<Buffer> {
  const exceljs = await loadExceljs();
  const workbook = new exceljs.Workbook();
  writeExplanation(workbook, units);
  for (const plan of SETUP_PLANS) writeSheet(workbook, plan, data[plan.list], units);
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
      sheet.addRow([null, `${toHeader(column, units)}${need}`, column.example, column.help]);
    }
  }
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
  const header = toHeader(column, units);
  sheet.getColumn(at).width = Math.max(12, header.length + 4);
  sheet.getColumn(at).numFmt = NUMBER_FORMATS[column.kind];
  const cell = sheet.getCell(1, at);
  cell.value = header;
  styleHeader(cell);
  addChoices(sheet, column.kind, at);
}

function addChoices(sheet: Worksheet, kind: SetupCellKind, at: number): void {
  const choices = CHOICES[kind];
  if (!choices) return;
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

function toHeader({ header, kind }: SetupColumn, units: UnitSystem): string {
  const unit = UNITS[units][kind];
  return unit ? `${header} (${unit})` : header;
}

function toCellValue(value: string | number | boolean, kind: SetupCellKind, units: UnitSystem): CellValue {
  if (kind === 'yesNo') return value === true ? 'yes' : 'no';
  const text = String(value);
  if (kind === 'date') return toWorkbookDate(toLocalDate(text));
  if (kind === 'force') return forceIn(toForce(text, 'kN'), units === 'us' ? 'US ton' : 'kN').toNumber();
  if (kind === 'length') return lengthIn(toLength(text, 'mm'), units === 'us' ? 'in' : 'mm').toNumber();
  if (['money', 'rate', 'percent', 'count'].includes(kind)) return D(text).toNumber();
  return encodeEscapedText(text);
}

async function toBuffer(workbook: Workbook): Promise<Buffer> {
  return Buffer.from(await workbook.xlsx.writeBuffer());
}
