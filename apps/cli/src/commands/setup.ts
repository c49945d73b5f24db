import {
  AppError,
  SETUP_SHEET_NAMES,
  SETUP_SHEETS,
  type SetupCounts,
  type SetupResult,
  type SetupSheet,
} from '@brakeven/contract';
import { type Command } from 'commander';
import { writeFile } from 'node:fs/promises';
import { resolve } from 'node:path';
import { type Cli, EXIT, UsageError } from '../cli';
import { withShop } from '../databases';
import { printTable } from '../print-table';
import { readWorkbookFile } from '../read-file';
import { showProgress } from '../show-progress';
import { openReader } from '../open-reader';

/** `setup template`, `setup import` */
export function addSetup(program: Command, cli: Cli): void {
  const setup = program.command('setup').description('Set a shop up from one workbook');
  setup
    .command('template')
    .description('Write an empty set-up workbook that explains itself')
    .argument('<file>', 'where to write it; a file that is there already is kept')
    .option('--force', 'write over a file that is there')
    .action((file: string, options: { force?: true }) => writeTemplate(cli, file, options.force ?? false));
  setup
    .command('import')
    .description('Read a set-up workbook, all of it or nothing; again with more rows it adds and changes')
    .argument('<file>', 'the workbook')
    .requiredOption('--shop <name>', 'into which shop')
    .option('--check', 'only say what would happen; write nothing')
    .action((file: string, options: { shop: string; check?: true }) => importWorkbook(cli, file, options));
}

async function writeTemplate(cli: Cli, file: string, isForced: boolean): Promise<void> {
  const { getSetupTemplate } = await import('@brakeven/use-cases');
  const { bytes } = await getSetupTemplate();
  try {
    await writeFile(file, bytes, { flag: isForced ? 'w' : 'wx' });
  } catch (cause) {
    const isThere = cause instanceof Error && 'code' in cause && cause.code === 'EEXIST';
    const reason = isThere ? 'There is already such a file; --force writes over it' : 'It cannot be written';
    throw new UsageError(`${file}: ${reason}.`, cause);
  }
  const path = resolve(file);
  cli.answer({ json: { file: path, bytes: bytes.byteLength }, text: () => `Written: ${path}` });
}

async function importWorkbook(
  cli: Cli,
  path: string,
  { shop, check = false }: { shop: string; check?: boolean },
): Promise<void> {
  const { checkSetup, importSetup } = await import('@brakeven/use-cases');
  const file = await readWorkbookFile(path);
  const progress = showProgress();
  const tools = { reader: await openReader(), onProgress: progress.onProgress };
  try {
    const work = check ? checkSetup : importSetup;
    const result = await withShop(cli, shop, (context) => work(context, file, {}, tools));
    progress.end();
    answer(cli, result, check);
  } catch (error) {
    progress.end();
    if (!(error instanceof AppError) || error.code !== 'setup_refused' || !error.details) throw error;
    cli.say(error.message);
    answer(cli, error.details as SetupResult, true);
  }
}

function answer(cli: Cli, result: SetupResult, isCheck: boolean): void {
  const isRefused = result.problems.some(({ severity }) => severity === 'refused');
  cli.answer({
    json: result,
    text: () => `${printCounts(result, isCheck)}\n\n${printProblems(result)}`,
    exitCode: isRefused ? EXIT.refused : EXIT.done,
  });
}

/** Sheets that the workbook says something on. */
function printCounts({ added, changed, alreadyThere }: SetupResult, isCheck: boolean): string {
  const sheets = SETUP_SHEETS.filter((sheet) => added[sheet] + changed[sheet] + alreadyThere[sheet] > 0);
  if (sheets.length === 0) return 'The workbook has no rows that could be taken.';
  const count = (counts: SetupCounts) => (sheet: SetupSheet) => String(counts[sheet]);
  return printTable(sheets, [
    { title: isCheck ? 'Nothing is written' : 'Sheet', of: (sheet) => SETUP_SHEET_NAMES[sheet] },
    { title: 'Added', of: count(added), isFigure: true },
    { title: 'Changed', of: count(changed), isFigure: true },
    { title: 'Already there', of: count(alreadyThere), isFigure: true },
  ]);
}

function printProblems({ problems }: SetupResult): string {
  if (problems.length === 0) return 'No problems.';
  return printTable(problems, [
    { title: 'Cell', of: ({ sheet, cell }) => `${sheet}!${cell}` },
    { title: 'Weight', of: ({ severity }) => severity },
    { title: 'Problem', of: ({ message }) => message },
  ]);
}
