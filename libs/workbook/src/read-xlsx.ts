import exceljs, { type Workbook, type Worksheet } from 'exceljs';
import { listCoveredCells } from './merged-cells';
import { findTaggedFormat, packPlainWorkbook } from './plain-package';
import { type CellContext, toRawCell, toStoredCell } from './raw-cell';
import { type OnReadProgress, type RawCell, type Sheet, type SheetRow } from './sheet-file';
import { assertSheetSize, type SheetScan, scanSheetXml } from './sheet-xml';
import { toDamagedError, unpackZip } from './unpack-zip';
import { toNotWorkbookError, WorkbookError } from './workbook-error';
import {
  isWorkbookPart,
  openWorkbookPackage,
  type PackedSheet,
  type WorkbookPackage,
} from './workbook-package';

/** Parts of the sheet that hold no cells; reading them costs time and trips over what other programs write. */
const IGNORED_NODES = [
  'sheetPr',
  'dimension',
  'sheetViews',
  'sheetFormatPr',
  'cols',
  'autoFilter',
  'mergeCells',
  'rowBreaks',
  'hyperlinks',
  'pageMargins',
  'dataValidations',
  'pageSetup',
  'headerFooter',
  'printOptions',
  'picture',
  'drawing',
  'sheetProtection',
  'tableParts',
  'conditionalFormatting',
  'extLst',
];
const OTHER_FORMS: readonly (readonly [RegExp, string])[] = [
  [/^xl\/workbook\.bin$/i, 'a binary workbook (.xlsb)'],
  [/^content\.xml$/i, 'an OpenDocument file (.ods)'],
];

/**
 * Reads every sheet of an .xlsx workbook.
 * @throws WorkbookError when the file as a whole cannot be read
 */
export async function readXlsx(bytes: Uint8Array, onProgress: OnReadProgress): Promise<Sheet[]> {
  const { names, parts } = await unpackZip(bytes, isWorkbookPart, (done, total) =>
    onProgress({ stage: 'unpack', done, total }),
  );
  assertKnownForm(names);
  const opened = openWorkbookPackage(parts);
  const scans = opened.sheets.map(({ name, xml }) => {
    const scan = scanSheetXml(xml);
    assertSheetSize(scan, name);
    return scan;
  });
  const workbook = await loadPlainWorkbook(opened);
  onProgress({ stage: 'parse', done: opened.sheets.length, total: opened.sheets.length });
  const takeOver = takeOverSheets(opened, workbook, scans);
  onProgress({ stage: 'rows', done: takeOver.length, total: takeOver.length });
  return takeOver;
}

function assertKnownForm(names: readonly string[]): void {
  const other = OTHER_FORMS.find(([pattern]) => names.some((name) => pattern.test(name)));
  if (other) {
    throw new WorkbookError(
      'file_form_unsupported',
      `This file is ${other[1]}. Open it in your spreadsheet program and save it as .xlsx.`,
    );
  }
  if (names.some((name) => /^word\//i.test(name))) throw toNotWorkbookError('a text document');
  if (!names.some((name) => /^xl\//i.test(name))) throw toNotWorkbookError('a folder of other files');
}

async function loadPlainWorkbook(opened: WorkbookPackage): Promise<Workbook> {
  const workbook = new exceljs.Workbook();
  const packed = packPlainWorkbook(opened);
  try {
    await workbook.xlsx.load(toArrayBuffer(packed), { ignoreNodes: IGNORED_NODES });
  } catch {
    throw toDamagedError();
  }
  return workbook;
}

function takeOverSheets(opened: WorkbookPackage, workbook: Workbook, scans: readonly SheetScan[]): Sheet[] {
  return opened.sheets.map((sheet, index) => {
    const worksheet = workbook.getWorksheet(String(index + 1));
    const scan = scans[index];
    if (!worksheet || !scan) throw toDamagedError();
    return takeOverSheet(sheet, worksheet, scan, opened.date1904);
  });
}

function takeOverSheet(sheet: PackedSheet, worksheet: Worksheet, scan: SheetScan, date1904: boolean): Sheet {
  const rows: SheetRow[] = [];
  const covered = listCoveredCells(scan.merges);
  worksheet.eachRow((worksheetRow, row) => {
    const cells: RawCell[] = [];
    worksheetRow.eachCell((cell) => {
      const context: CellContext = { address: cell.address, format: findTaggedFormat(cell.numFmt), date1904 };
      const stored = scan.stored.get(cell.address);
      const raw = stored ? toStoredCell(stored, context) : toRawCell(cell.value, context);
      if (raw && !covered(cell.address)) cells.push(raw);
    });
    if (cells.length > 0) rows.push({ row, cells });
  });
  return { name: sheet.name, isHidden: sheet.isHidden, date1904, rows };
}

/** The library asks for an ArrayBuffer in its types and takes any bytes. */
function toArrayBuffer(bytes: Buffer): ArrayBuffer {
  return bytes as unknown as ArrayBuffer;
}
