import { AppError } from '@brakeven/contract';
import { Command, CommanderError } from 'commander';
import { Cli, EXIT, type ExitCode, UsageError } from './cli';
import { addDatabase } from './commands/database';
import { addDoctor } from './commands/doctor';
import { addForming } from './commands/forming';
import { addJobs } from './commands/jobs';
import { addMaterials } from './commands/materials';
import { addMachines } from './commands/machines';
import { addMonths } from './commands/months';
import { addPayback } from './commands/payback';
import { addRollup } from './commands/rollup';
import { addSetup } from './commands/setup';
import { addShop } from './commands/shop';
import { addTimesheets } from './commands/timesheets';
import { addUser } from './commands/user';

const AFTER_HELP = `
Exit codes: 0 done, 1 refused and nothing written, 2 wrong usage, 3 database out of reach.
With --json the answer is JSON on standard output; a refusal is {"error": {"code", "message", "issues"}} there, and
the same in words on standard error, where progress goes too.
DATABASE_URL says where the database is, as the application; DATABASE_OWNER_URL the same as the schema's owner, which
shop create, shop list, rollup --all and database need.`;

/** Runs one command line and answers its exit code. */
export async function runProgram(args: readonly string[], env: NodeJS.ProcessEnv): Promise<ExitCode> {
  const cli = new Cli(env, args.includes('--json'));
  const program = createProgram(cli);
  try {
    await program.parseAsync(args, { from: 'user' });
    return cli.exitCode;
  } catch (error) {
    await refuse(cli, error);
    return cli.exitCode;
  }
}

function createProgram(cli: Cli): Command {
  const program = new Command('brakeven')
    .description('Costs, timesheets and payback of a metal-fabrication shop.')
    .option('--json', 'answer in JSON')
    .configureHelp({ showGlobalOptions: true, sortSubcommands: false })
    .configureOutput({ outputError: () => undefined })
    .exitOverride()
    .addHelpText('after', AFTER_HELP);
  for (const add of [
    addShop,
    addUser,
    addSetup,
    addTimesheets,
    addRollup,
    addJobs,
    addMaterials,
    addPayback,
    addMachines,
    addMonths,
    addForming,
    addDatabase,
    addDoctor,
  ])
    add(program, cli);
  return program;
}

async function refuse(cli: Cli, error: unknown): Promise<void> {
  if (error instanceof CommanderError) {
    if (error.exitCode === 0) return;
    const isHelp = error.code === 'commander.help';
    const message = isHelp ? 'Say which command.' : error.message.replace(/^error: /, '');
    cli.refuse({ code: 'invalid_input', message, issues: [] }, EXIT.usage);
    if (!isHelp) cli.say('Add --help to see how it is used.');
    return;
  }
  if (error instanceof AppError) {
    cli.refuse(error, toExitCode(error));
    return;
  }
  const { findUnstorableValue, isUnreachable } = await import('@brakeven/use-cases');
  if (isUnreachable(error)) {
    const message = `The database cannot be reached: ${toWords(error)}`;
    cli.refuse({ code: 'database_unreachable', message, issues: [] }, EXIT.unreachable);
    return;
  }
  const unstorable = findUnstorableValue(error);
  const code = unstorable ? 'invalid_input' : 'internal';
  const message = unstorable ?? `Something went wrong; nothing was written. ${toWords(error)}`;
  cli.refuse({ code, message, issues: [] }, EXIT.refused);
  if (!unstorable && error instanceof Error && error.stack) cli.say(error.stack);
}

function toExitCode(error: AppError): ExitCode {
  if (error instanceof UsageError) return EXIT.usage;
  return error.code === 'database_unreachable' ? EXIT.unreachable : EXIT.refused;
}

function toWords(error: unknown): string {
  if (error instanceof AggregateError) return error.errors.map(toWords).join(', ');
  return error instanceof Error ? error.message : String(error);
}
