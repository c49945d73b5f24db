import { AppError, type SheetExcerpt, timesheetMappingSchema } from '@brakeven/contract';
import { type SheetRow } from '@brakeven/workbook';
import { type ShopContext } from '../context';
import { type UploadTools } from '../import-timesheet/upload';
import { getKeptFile } from './get-import-file';
import { readKeptSheets } from './kept-sheets';

const ROWS_AROUND = 4;

/**
 * The rows of a kept workbook around one row, as they stand in the sheet (dates as YYYY-MM-DD), with the header row
 * above them: what an entry was made from.
 * @throws AppError `import_not_found`, `not_found` if the file has no such sheet
 */
export async function getSheetExcerpt(
  context: ShopContext,
  { importId, sheet: sheetName, row }: { importId: string; sheet: string; row: number },
  { reader }: Pick<UploadTools, 'reader'>,
): Promise<SheetExcerpt> {
  const kept = await getKeptFile(context, importId);
  const file = await readKeptSheets(importId, { name: kept.fileName, bytes: kept.content }, reader);
  const sheet = file.sheets.find(({ name }) => name === sheetName);
  if (!sheet) throw new AppError('not_found', `'${kept.fileName}' has no sheet '${sheetName}'.`);
  const mapping = timesheetMappingSchema.safeParse(kept.mapping);
  const headerRow = mapping.success && mapping.data.sheet === sheetName ? mapping.data.headerRow : null;
  const rows = sheet.rows.filter((one) => one.row === headerRow || Math.abs(one.row - row) <= ROWS_AROUND);
  const columns = listColumns(rows);
  return {
    fileName: kept.fileName,
    sheet: sheetName,
    columns,
    rows: rows.map((one) => toExcerptRow(one, columns)),
  };
}

function listColumns(rows: readonly SheetRow[]): string[] {
  const columns = new Set(rows.flatMap(({ cells }) => cells.map(({ address }) => columnOf(address))));
  return [...columns].sort((a, b) => a.length - b.length || a.localeCompare(b));
}

/** A cell for each column, blank ones too, so that the rows stand under each other. */
function toExcerptRow({ row, cells }: SheetRow, columns: readonly string[]): SheetExcerpt['rows'][number] {
  const texts = new Map(cells.map(({ address, text }) => [columnOf(address), text]));
  return {
    row,
    cells: columns.map((column) => ({ address: `${column}${row}`, text: texts.get(column) ?? '' })),
  };
}

function columnOf(address: string): string {
  return address.replace(/\d+$/, '');
}
