import { writeSetupTemplate } from '@brakeven/workbook';
import { type ShopContext } from '../context';
import { type FileDownload, XLSX_MEDIA_TYPE } from '../import-timesheet/upload';

/**
 * An empty set-up workbook with a sheet that explains how to fill it in, in the units of the shop; before there is
 * a shop in those of the United States, as its headers say.
 */
export async function getSetupTemplate(context?: Pick<ShopContext, 'shop'>): Promise<FileDownload> {
  return {
    fileName: 'brakeven-set-up.xlsx',
    mediaType: XLSX_MEDIA_TYPE,
    bytes: await writeSetupTemplate({ units: context?.shop.units ?? 'us' }),
  };
}
