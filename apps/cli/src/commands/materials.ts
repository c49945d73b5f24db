import { type Material, type StockMove } from '@brakeven/contract';
import { D, formatMass, toMass, type UnitSystem } from '@brakeven/values';
import { type Command } from 'commander';
import { type Cli } from '../cli';
import { withShop } from '../databases';
import { type Column, printTable } from '../print-table';

/** `materials list`, `materials ledger` */
export function addMaterials(program: Command, cli: Cli): void {
  const materials = program.command('materials').description('What is in stock, and how it came to be');
  materials
    .command('list')
    .description('All materials with stock, average and value; weights in kg with --json')
    .requiredOption('--shop <name>', 'in which shop')
    .action((options: { shop: string }) => list(cli, options.shop));
  materials
    .command('ledger')
    .description('Every move of a material’s stock with the stock after it, in the order in which they count')
    .argument('<name>', 'name of the material')
    .requiredOption('--shop <name>', 'in which shop')
    .action((name: string, options: { shop: string }) => ledger(cli, name, options.shop));
}

async function list(cli: Cli, shop: string): Promise<void> {
  const { listMaterials } = await import('@brakeven/use-cases');
  const { units, materials } = await withShop(cli, shop, async (context) => ({
    units: context.shop.units,
    materials: await listMaterials(context),
  }));
  cli.answer({ json: { materials }, text: () => printTable(materials, toMaterialColumns(units)) });
}

async function ledger(cli: Cli, name: string, shop: string): Promise<void> {
  const { getStockLedger } = await import('@brakeven/use-cases');
  const { units, ...answer } = await withShop(cli, shop, async (context) => ({
    units: context.shop.units,
    ...(await getStockLedger(context, name)),
  }));
  cli.answer({ json: answer, text: () => printTable(answer.moves, toMoveColumns(units)) });
}

function toMaterialColumns(units: UnitSystem): Column<Material>[] {
  return [
    { title: 'Material', of: ({ name }) => name },
    { title: 'Grade', of: ({ grade }) => grade },
    { title: 'In stock', of: ({ stockKg }) => toMassText(stockKg, units), isFigure: true },
    { title: 'Value', of: ({ stockValue }) => stockValue ?? '', isFigure: true },
    { title: 'Last lot', of: ({ lastLot }) => lastLot?.receivedOn ?? '' },
  ];
}

function toMoveColumns(units: UnitSystem): Column<StockMove>[] {
  return [
    { title: 'Date', of: ({ movedOn }) => movedOn },
    { title: 'Move', of: ({ kind }) => kind },
    { title: 'Lot or job', of: ({ lot, job }) => lot?.number ?? job?.number ?? '' },
    { title: 'Weight', of: ({ weightKg }) => toMassText(weightKg, units), isFigure: true },
    { title: 'Amount', of: ({ amount }) => amount ?? '', isFigure: true },
    { title: 'Stock', of: ({ balanceKg }) => toMassText(balanceKg ?? '0', units), isFigure: true },
    { title: 'Value', of: ({ balanceAmount }) => balanceAmount ?? '', isFigure: true },
  ];
}

const toMassText = (kilograms: string, units: UnitSystem): string =>
  formatMass(toMass(D(kilograms), 'kg'), units).replace('\u00a0', ' ');
