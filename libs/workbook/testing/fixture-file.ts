import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { readSheets } from '../src/lib/read-sheets';
import { type FileBytes, type RawCell, type SheetFile } from '../src/lib/sheet-file';

const FOLDER = join(__dirname, '../../../tests/fixtures/workbooks');

/** A file of tests/fixtures/workbooks, such as `ok/plain.xlsx`, named as a user would have it. */
export function loadFixture(path: string): FileBytes {
  return { name: path.slice(path.indexOf('/') + 1), bytes: readFileSync(join(FOLDER, path)) };
}

export function readFixture(path: string): Promise<SheetFile> {
  return readSheets(loadFixture(path));
}

/** The cell at an address of the sheet with this index. */
export function getCell(file: SheetFile, address: string, sheetIndex = 0): RawCell {
  const cells = file.sheets[sheetIndex]?.rows.flatMap((row) => row.cells) ?? [];
  const cell = cells.find((one) => one.address === address);
  if (!cell) throw new Error(`There is no cell ${address}.`);
  return cell;
}
