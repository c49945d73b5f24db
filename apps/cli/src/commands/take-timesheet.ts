import {
  AppError,
  type TimesheetCheck,
  type TimesheetField,
  type TimesheetMapping,
} from '@brakeven/contract';
import {
  type MappingChanges,
  type ShopContext,
  type UploadedFile,
  type UploadTools,
} from '@brakeven/use-cases';
import { type Cli, EXIT, type ExitCode } from '../cli';
import { withShop } from '../databases';
import { openReader } from '../open-reader';
import { readWorkbookFile } from '../read-file';
import { showProgress } from '../show-progress';
import { type Taken, toTakenText } from './taken-timesheet-text';

/** Options of `timesheets check` and `timesheets import`. */
export interface TakeOptions {
  shop: string;
  goodRows?: true;
  dateFormat?: MappingChanges['dateFormat'];
  decimalMark?: MappingChanges['decimalMark'];
  sheet?: string;
  headerRow?: number;
  column?: Partial<Record<TimesheetField, string>>;
}

export type TimesheetAction = 'check' | 'import';

/** Checks or imports a timesheet and answers what came of it, refused rows included. */
export async function takeTimesheet(
  cli: Cli,
  action: TimesheetAction,
  path: string,
  options: TakeOptions,
): Promise<void> {
  const file = await readWorkbookFile(path);
  const progress = showProgress();
  const tools: UploadTools = {
    reader: await openReader(),
    onProgress: progress.onProgress,
    onRollupFailed: (error) => cli.say(`The entries are in; costs could not be rolled up: ${String(error)}`),
  };
  try {
    const taken = await withShop(cli, options.shop, (context) => take(context, action, file, options, tools));
    progress.end();
    answer(cli, taken, findExitCode(taken, options));
  } catch (error) {
    progress.end();
    const check = findCheck(error);
    if (!check) throw error;
    cli.say((error as AppError).message);
    answer(cli, check, EXIT.refused);
  }
}

async function take(
  context: ShopContext,
  action: TimesheetAction,
  file: UploadedFile,
  options: TakeOptions,
  tools: UploadTools,
): Promise<Taken> {
  const { checkTimesheet, importTimesheet } = await import('@brakeven/use-cases');
  const mapping = await findMapping(context, file, options, tools);
  const work = action === 'check' ? checkTimesheet : importTimesheet;
  return work(context, file, { mapping, goodRows: options.goodRows ?? false }, tools);
}

/** Left to the use case unless the caller says something about it. */
async function findMapping(
  context: ShopContext,
  file: UploadedFile,
  { sheet, headerRow, column, dateFormat, decimalMark }: TakeOptions,
  tools: UploadTools,
): Promise<TimesheetMapping | undefined> {
  const said = Object.entries({ sheet, headerRow, columns: column, dateFormat, decimalMark }).filter(
    ([, value]) => value !== undefined,
  );
  if (said.length === 0) return undefined;
  const { adjustMapping } = await import('@brakeven/use-cases');
  return adjustMapping(context, file, Object.fromEntries(said), tools);
}

/** Refused rows, or columns that are not known, come with the whole check. */
function findCheck(error: unknown): TimesheetCheck | null {
  const hasCheck = error instanceof AppError && ['rows_refused', 'mapping_incomplete'].includes(error.code);
  return hasCheck && error.details ? (error.details as TimesheetCheck) : null;
}

function findExitCode({ refused, missingFields }: Taken, { goodRows }: TakeOptions): ExitCode {
  const isRefused = missingFields.length > 0 || (refused > 0 && !goodRows);
  return isRefused ? EXIT.refused : EXIT.done;
}

function answer(cli: Cli, taken: Taken, exitCode: ExitCode): void {
  cli.answer({ json: toJson(taken), text: () => toTakenText(taken), exitCode });
}

/** Everything but the rows as the screen shows them; an import's id only if one was made. */
function toJson({ rows: _rows, rowsNotShown: _rowsNotShown, headerCells: _cells, ...taken }: Taken): object {
  return 'importId' in taken && taken.importId === null ? { ...taken, importId: undefined } : taken;
}
