import { AppError, type TimesheetField, type TimesheetMapping } from '@brakeven/contract';
import { describeTimesheetHeader, findTimesheetHeader } from '@brakeven/workbook';
import { type ShopContext } from '../context';
import { checkTimesheet } from './check-timesheet';
import { readUpload, toFileError, type UploadedFile, type UploadTools } from './upload';

/** What the caller knows better about a file than its header words tell. */
export interface MappingChanges {
  sheet?: string;
  headerRow?: number;
  columns?: Partial<Record<TimesheetField, string>>;
  dateFormat?: TimesheetMapping['dateFormat'];
  decimalMark?: TimesheetMapping['decimalMark'];
}

/**
 * The mapping of a file as it is remembered or recognised, with what the caller says put in its place. A column that
 * is given to one field is taken from another that was recognised there.
 * @throws AppError `file_refused`, `header_not_found`
 */
export async function adjustMapping(
  context: ShopContext,
  file: UploadedFile,
  { sheet, headerRow, columns = {}, ...writing }: MappingChanges,
  tools: UploadTools,
): Promise<TimesheetMapping> {
  const base =
    sheet === undefined && headerRow === undefined
      ? await findUsualMapping(context, file, tools)
      : await recogniseAt(file, { sheet, headerRow }, tools);
  const given = new Set(Object.values(columns));
  const kept = Object.entries(base.columns).filter(([, column]) => !given.has(column));
  return { ...base, ...writing, columns: { ...Object.fromEntries(kept), ...columns } };
}

async function findUsualMapping(
  context: ShopContext,
  file: UploadedFile,
  tools: UploadTools,
): Promise<TimesheetMapping> {
  const { mapping, problems } = await checkTimesheet(context, file, {}, { reader: tools.reader });
  if (mapping) return mapping;
  const [message = 'No row looks like the header of a timesheet.'] = problems.map(
    (problem) => problem.message,
  );
  throw new AppError('header_not_found', message);
}

async function recogniseAt(
  file: UploadedFile,
  place: { sheet?: string; headerRow?: number },
  tools: UploadTools,
): Promise<TimesheetMapping> {
  const sheetFile = await readUpload(file, tools);
  const sheets = sheetFile.sheets.filter(({ name }) => place.sheet === undefined || name === place.sheet);
  try {
    if (sheets.length === 0) throw toNoSheet(place.sheet, sheetFile.sheets);
    const { mapping } =
      place.headerRow === undefined
        ? findTimesheetHeader({ ...sheetFile, sheets })
        : describeTimesheetHeader(sheetFile, {
            sheet: sheets[0]?.name ?? '',
            headerRow: place.headerRow,
          });
    return mapping;
  } catch (error) {
    throw toFileError(error);
  }
}

function toNoSheet(name: string | undefined, sheets: readonly { name: string }[]): AppError {
  const names = sheets.map((sheet) => `'${sheet.name}'`).join(', ');
  return new AppError('file_refused', `There is no sheet '${name}' in this file; it has ${names}.`);
}
