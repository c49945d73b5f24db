import { type Command } from 'commander';
import { type Cli, EXIT } from '../cli';
import { withOwnerDatabase } from '../databases';

/** `database migrate`, `database status` */
export function addDatabase(program: Command, cli: Cli): void {
  const database = program.command('database').description('The schema of the database');
  database
    .command('migrate')
    .description('Bring the schema up to date')
    .action(() => migrate(cli));
  database
    .command('status')
    .description('Say whether the schema is up to date; exit code 1 if not')
    .action(() => status(cli));
}

async function migrate(cli: Cli): Promise<void> {
  const { migrateDatabase } = await import('@brakeven/use-cases');
  const applied = await withOwnerDatabase(cli, migrateDatabase);
  cli.answer({
    json: { applied },
    text: () => (applied.length === 0 ? 'The schema is up to date.' : `Applied:\n  ${applied.join('\n  ')}`),
  });
}

async function status(cli: Cli): Promise<void> {
  const { listPendingMigrations } = await import('@brakeven/use-cases');
  const pending = await withOwnerDatabase(cli, listPendingMigrations);
  cli.answer({
    json: { pending },
    text: () =>
      pending.length === 0 ? 'The schema is up to date.' : `Not applied yet:\n  ${pending.join('\n  ')}`,
    exitCode: pending.length === 0 ? EXIT.done : EXIT.refused,
  });
}
