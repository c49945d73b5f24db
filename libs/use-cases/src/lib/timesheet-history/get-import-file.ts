import { findKeptFile, type KeptFile } from '@brakeven/database';
import { inShopOf, type ShopContext } from '../context';
import { type FileDownload, XLSX_MEDIA_TYPE } from '../import-timesheet/upload';
import { toImportNotFound } from './list-imports';

/**
 * The workbook of an import, byte for byte as it came.
 * @throws AppError `import_not_found`
 */
export async function getImportFile(
  context: ShopContext,
  { importId }: { importId: string },
): Promise<FileDownload> {
  const { fileName, content } = await getKeptFile(context, importId);
  return { fileName, mediaType: isZip(content) ? XLSX_MEDIA_TYPE : 'text/csv', bytes: content };
}

/**
 * The kept file of an import with how it was read.
 * @throws AppError `import_not_found`
 */
export async function getKeptFile(context: ShopContext, importId: string): Promise<KeptFile> {
  const file = await inShopOf(context, (trx) => findKeptFile(trx, context.shop.shopId, importId));
  if (!file) throw toImportNotFound();
  return file;
}

/** The name may say anything; a workbook is a zip archive, which begins with PK. */
function isZip(content: Buffer): boolean {
  return content.subarray(0, 2).toString('latin1') === 'PK';
}
