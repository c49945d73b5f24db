import {
  emailInputSchema,
  nameInputSchema,
  shopPatchSchema,
  UNIT_SYSTEMS,
  type Shop,
} from '@brakeven/contract';
import { type Command, Option } from 'commander';
import { type Cli } from '../cli';
import { actorName, withOwnerDatabase } from '../databases';
import { readBy } from '../option-parsers';
import { printPairs, printTable } from '../print-table';

interface CreateOptions {
  timeZone: string;
  currency: string;
  units: Shop['units'];
  ownerEmail: string;
  ownerName: string;
}

/** `shop create`, `shop list` */
export function addShop(program: Command, cli: Cli): void {
  const shop = program.command('shop').description('Shops of this database');
  shop
    .command('create')
    .description('Make a shop and its first owner, who signs in with the temporary password that is told')
    .argument('<name>', 'name of the shop', readBy(nameInputSchema))
    .requiredOption('--time-zone <zone>', 'for example America/Chicago')
    .requiredOption('--currency <code>', 'for example USD', readBy(shopPatchSchema.shape.currency.unwrap()))
    .addOption(
      new Option('--units <system>', 'units that the shop measures in')
        .choices(UNIT_SYSTEMS)
        .makeOptionMandatory(),
    )
    .requiredOption('--owner-email <address>', 'the owner signs in with it', readBy(emailInputSchema))
    .option('--owner-name <name>', 'name of the owner', readBy(nameInputSchema), 'Owner')
    .action((name: string, options: CreateOptions) => create(cli, name, options));
  shop
    .command('list')
    .description('Names and settings of all shops')
    .action(() => list(cli));
}

async function create(cli: Cli, name: string, options: CreateOptions): Promise<void> {
  const { createShop } = await import('@brakeven/use-cases');
  const { timeZone, currency, units, ownerEmail, ownerName } = options;
  const input = { name, timeZone, currency, units, owner: { email: ownerEmail, name: ownerName } };
  const { shop, temporaryPassword } = await withOwnerDatabase(cli, (ownerDb) =>
    createShop(ownerDb, input, actorName()),
  );
  cli.answer({
    json: { shopId: shop.shopId, name: shop.name, ownerEmail, temporaryPassword },
    text: () =>
      printPairs([
        ['Shop', shop.name],
        ['Owner', ownerEmail],
        ['Temporary password', `${temporaryPassword} (told once, to be changed at the first sign-in)`],
      ]),
  });
}

async function list(cli: Cli): Promise<void> {
  const { listShops } = await import('@brakeven/use-cases');
  const shops = await withOwnerDatabase(cli, listShops);
  cli.answer({
    json: { shops },
    text: () =>
      shops.length === 0
        ? 'There is no shop yet. shop create makes one.'
        : printTable(shops, [
            { title: 'Shop', of: ({ name }) => name },
            { title: 'Time zone', of: ({ timeZone }) => timeZone },
            { title: 'Currency', of: ({ currency }) => currency },
            { title: 'Units', of: ({ units }) => units },
          ]),
  });
}
