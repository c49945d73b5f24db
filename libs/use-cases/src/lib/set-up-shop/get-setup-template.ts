import { writeSetupTemplate } from '@brakeven/workbook';
import { type FileDownload, XLSX_MEDIA_TYPE } from '../import-timesheet/upload';

/** An empty set-up workbook with a sheet that explains how to fill it in. */
export async function getSetupTemplate(): Promise<FileDownload> {
  return {
    fileName: 'brakeven-set-up.xlsx',
    mediaType: XLSX_MEDIA_TYPE,
    bytes: await writeSetupTemplate(),
  };
}
