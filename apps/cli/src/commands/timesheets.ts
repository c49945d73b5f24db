import { DATE_FORMATS, idSchema, TIMESHEET_FIELDS } from '@brakeven/contract';
import { type Command, InvalidArgumentError, Option } from 'commander';
import { type Cli } from '../cli';
import { withShop } from '../databases';
import { readBy } from '../option-parsers';
import { printTable } from '../print-table';
import { type TakeOptions, takeTimesheet, type TimesheetAction } from './take-timesheet';

/** `timesheets check`, `import`, `list`, `undo` */
export function addTimesheets(program: Command, cli: Cli): void {
  const timesheets = program.command('timesheets').description('Timesheet workbooks');
  addTaking(
    timesheets,
    cli,
    'check',
    'Read a timesheet and say what is wrong in it, by cell; writes nothing',
  );
  addTaking(
    timesheets,
    cli,
    'import',
    'Take a timesheet in, in one transaction; rows that are there already are not added again',
  );
  timesheets
    .command('list')
    .description('All imports, latest first')
    .requiredOption('--shop <name>', 'in which shop')
    .action((options: { shop: string }) => list(cli, options.shop));
  timesheets
    .command('undo')
    .description('Take a whole import back')
    .argument(
      '<import>',
      'id of the import, as timesheets import and timesheets list tell it',
      readBy(idSchema),
    )
    .requiredOption('--shop <name>', 'in which shop')
    .action((importId: string, options: { shop: string }) => undo(cli, importId, options.shop));
}

function addTaking(timesheets: Command, cli: Cli, action: TimesheetAction, description: string): void {
  timesheets
    .command(action)
    .description(description)
    .argument('<file>', 'workbook (.xlsx) or .csv')
    .requiredOption('--shop <name>', 'in which shop')
    .option('--good-rows', 'go on without the rows that are refused')
    .option('--sheet <name>', 'the sheet that holds the hours')
    .option('--header-row <row>', 'the row that holds the headers', readRowNumber)
    .option(
      '--column <field=letter>',
      `which column holds a field, for example hours=F; fields: ${TIMESHEET_FIELDS.join(', ')}`,
      readColumn,
    )
    .addOption(
      new Option('--date-format <format>', 'how dates are written that are text').choices(DATE_FORMATS),
    )
    .addOption(
      new Option('--decimal-mark <mark>', 'how decimals are written that are text').choices(['.', ',']),
    )
    .action((file: string, options: TakeOptions) => takeTimesheet(cli, action, file, options));
}

function readRowNumber(text: string): number {
  if (/^[1-9]\d{0,3}$/.test(text)) return Number(text);
  throw new InvalidArgumentError('Write the number of the row, for example 7.');
}

function readColumn(text: string, before: TakeOptions['column'] = {}): TakeOptions['column'] {
  const [field = '', letter = ''] = text.split('=');
  const isField = (TIMESHEET_FIELDS as readonly string[]).includes(field);
  if (!isField || !/^[A-Za-z]{1,3}$/.test(letter)) {
    throw new InvalidArgumentError('Write field=LETTER, for example hours=F.');
  }
  return { ...before, [field]: letter.toUpperCase() };
}

async function list(cli: Cli, shop: string): Promise<void> {
  const { listImports } = await import('@brakeven/use-cases');
  const imports = await withShop(cli, shop, listImports);
  cli.answer({
    json: { imports },
    text: () =>
      imports.length === 0
        ? 'No timesheet has been imported yet.'
        : printTable(imports, [
            { title: 'Import', of: ({ importId }) => importId },
            { title: 'File', of: ({ fileName }) => fileName },
            { title: 'At', of: ({ importedAt }) => importedAt },
            { title: 'By', of: ({ importedBy }) => importedBy },
            { title: 'State', of: ({ status }) => status },
            { title: 'Entries', of: ({ entriesAdded }) => String(entriesAdded), isFigure: true },
            { title: 'Hours', of: ({ hoursAdded }) => hoursAdded, isFigure: true },
          ]),
  });
}

async function undo(cli: Cli, importId: string, shop: string): Promise<void> {
  const { undoImport } = await import('@brakeven/use-cases');
  const undone = await withShop(cli, shop, (context) =>
    undoImport(context, { importId }, undefined, {
      onRollupFailed: (error) => cli.say(`Costs could not be rolled up and wait: ${String(error)}`),
    }),
  );
  const { entriesVoided, hoursVoided } = undone;
  const entries = entriesVoided === 1 ? '1 entry' : `${entriesVoided} entries`;
  cli.answer({ json: undone, text: () => `Taken back: ${entries}, ${hoursVoided} hours.` });
}
