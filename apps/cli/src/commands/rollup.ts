import { localDateSchema, type RollupResult } from '@brakeven/contract';
import { type ShopContext } from '@brakeven/use-cases';
import { type Command } from 'commander';
import { type Cli, EXIT, UsageError } from '../cli';
import { withDatabase, withOwnerDatabase, withShop, actorName } from '../databases';
import { readBy } from '../option-parsers';
import { printTable } from '../print-table';

interface RollupOptions {
  shop?: string;
  all?: true;
  full?: true;
  through?: string;
}

interface Failure {
  shop: string;
  message: string;
}

/** `rollup` */
export function addRollup(program: Command, cli: Cli): void {
  program
    .command('rollup')
    .description('Roll up the costs of what has changed; rollup --all is the nightly run')
    .option('--shop <name>', 'of one shop')
    .option('--all', 'of all shops, one after the other')
    .option('--full', 'compute every day anew, whatever has changed')
    .option('--through <date>', 'only days up to this one, YYYY-MM-DD', readBy(localDateSchema))
    .action((options: RollupOptions) => rollUp(cli, options));
}

async function rollUp(cli: Cli, { shop, all, ...options }: RollupOptions): Promise<void> {
  if ((shop === undefined) === (all === undefined)) {
    throw new UsageError('Say which: --shop NAME for one shop, or --all.');
  }
  const { runRollup } = await import('@brakeven/use-cases');
  const work = (context: ShopContext) => runRollup(context, options);
  if (shop !== undefined) answer(cli, [await withShop(cli, shop, work)], []);
  else await rollUpAll(cli, work);
}

/** One shop that fails does not keep the others from being rolled up. */
async function rollUpAll(cli: Cli, work: (context: ShopContext) => Promise<RollupResult>): Promise<void> {
  const { isUnreachable, listShops, openShop } = await import('@brakeven/use-cases');
  const shops = await withOwnerDatabase(cli, listShops);
  const results: RollupResult[] = [];
  const failures: Failure[] = [];
  await withDatabase(cli, async (db) => {
    for (const { name } of shops) {
      try {
        results.push(await work(await openShop(db, name, actorName())));
      } catch (error) {
        if (isUnreachable(error)) throw error;
        failures.push({ shop: name, message: error instanceof Error ? error.message : String(error) });
      }
    }
  });
  answer(cli, results, failures);
}

function answer(cli: Cli, shops: readonly RollupResult[], failures: readonly Failure[]): void {
  for (const { shop, message } of failures) cli.say(`${shop}: ${message}`);
  cli.answer({
    json: { shops, ...(failures.length > 0 ? { failed: failures } : {}) },
    text: () =>
      printTable(shops, [
        { title: 'Shop', of: ({ shop }) => shop },
        { title: 'Days', of: ({ days }) => String(days), isFigure: true },
        { title: 'Cost lines', of: ({ lines }) => String(lines), isFigure: true },
        { title: 'Through', of: ({ through }) => through ?? 'nothing yet' },
      ]),
    exitCode: failures.length > 0 ? EXIT.refused : EXIT.done,
  });
}
