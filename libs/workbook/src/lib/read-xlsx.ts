import { type Workbook, type Worksheet } from 'exceljs';
import { loadExceljs } from './load-exceljs';
import { listCoveredCells } from './merged-cells';
import { findTaggedFormat, packPlainWorkbook } from './plain-package';
import { type CellContext, toRawCell, toStoredCell } from './raw-cell';
import { type OnReadProgress, type RawCell, type Sheet, type SheetRow } from './sheet-file';
import { assertSheetSize, type SheetScan, scanSheetXml } from './sheet-xml';
import { toDamagedError, unpackZip } from './unpack-zip';
import { toNotWorkbookError, WorkbookError } from './workbook-error';
import { isWorkbookPart, openWorkbookPackage, type PackedSheet } from './workbook-package';

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

/** A workbook made ready for the library, and what the library does not tell about its sheets. */
interface PreparedWorkbook {
  readonly packed: Buffer;
  readonly date1904: boolean;
  readonly sheets: readonly (Pick<PackedSheet, 'name' | 'isHidden'> & { readonly scan: SheetScan })[];
}

/**
 * Reads every sheet of an .xlsx workbook.
 * @throws WorkbookError when the file as a whole cannot be read
 */
export async function readXlsx(bytes: Uint8Array, onProgress: OnReadProgress): Promise<Sheet[]> {
  const { packed, date1904, sheets } = await prepareWorkbook(bytes, onProgress);
  const workbook = await loadPlainWorkbook(packed);
  onProgress({ stage: 'parse', done: sheets.length, total: sheets.length });
  const takenOver = sheets.map((sheet, index) => {
    const worksheet = workbook.getWorksheet(String(index + 1));
    if (!worksheet) throw toDamagedError();
    return takeOverSheet(sheet, worksheet, date1904);
  });
  onProgress({ stage: 'rows', done: takenOver.length, total: takenOver.length });
  return takenOver;
}

/** Apart from the reading itself, so that the unpacked parts are let go before it begins. */
async function prepareWorkbook(bytes: Uint8Array, onProgress: OnReadProgress): Promise<PreparedWorkbook> {
  const { names, parts } = await unpackZip(bytes, isWorkbookPart, (done, total) =>
    onProgress({ stage: 'unpack', done, total }),
  );
  assertKnownForm(names);
  const opened = openWorkbookPackage(parts);
  const sheets = opened.sheets.map(({ name, isHidden, xml }) => {
    const scan = scanSheetXml(xml);
    assertSheetSize(scan, name);
    return { name, isHidden, scan };
  });
  return { packed: packPlainWorkbook(opened), date1904: opened.date1904, sheets };
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

async function loadPlainWorkbook(packed: Buffer): Promise<Workbook> {
  const exceljs = await loadExceljs();
  const workbook = new exceljs.Workbook();
  try {
    await workbook.xlsx.load(toArrayBuffer(packed), { ignoreNodes: IGNORED_NODES });
  } catch {
    throw toDamagedError();
  }
  return workbook;
}

function takeOverSheet(
  { name, isHidden, scan }: PreparedWorkbook['sheets'][number],
  worksheet: Worksheet,
  date1904: boolean,
): Sheet {
  const rows: SheetRow[] = [];
  const covered = listCoveredCells(scan.merges);
  const dayTexts = new Map<number, string>();
  worksheet.eachRow((worksheetRow, row) => {
    const cells: RawCell[] = [];
    worksheetRow.eachCell((cell) => {
      const { address } = cell;
      const context: CellContext = { address, format: findTaggedFormat(cell.numFmt), date1904, dayTexts };
      const stored = scan.stored.get(address);
      const raw = stored ? toStoredCell(stored, context) : toRawCell(cell.value, context);
      if (raw && !covered(address)) cells.push(raw);
    });
    if (cells.length > 0) rows.push({ row, cells });
  });
  return { name, isHidden, date1904, rows };
}

/** The library asks for an ArrayBuffer in its types and takes any bytes. */
function toArrayBuffer(bytes: Buffer): ArrayBuffer {
  return bytes as unknown as ArrayBuffer;
}
