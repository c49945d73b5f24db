import { type Command } from 'commander';
import { type Cli } from '../cli';
import { withShop } from '../databases';
import { printPairs } from '../print-table';

/** `machines rate` */
export function addMachines(program: Command, cli: Cli): void {
  const machines = program.command('machines').description('What an hour on a machine costs and earns');
  machines
    .command('rate')
    .description('The rates that hold today, with the parts that the machine-hour rate was built of')
    .argument('<code>', 'code of the machine, for example P2')
    .requiredOption('--shop <name>', 'in which shop')
    .action((code: string, options: { shop: string }) => rate(cli, code, options.shop));
}

async function rate(cli: Cli, code: string, shop: string): Promise<void> {
  const { getMachineRate } = await import('@brakeven/use-cases');
  const result = await withShop(cli, shop, (context) => getMachineRate(context, code));
  cli.answer({
    json: result,
    text: () =>
      printPairs([
        ['Machine', result.machine],
        ['Valid from', result.validFrom],
        ['Machine-hour rate', result.machineHourRate],
        ...Object.entries(result.parts ?? {}).map(([part, amount]): [string, string] => [
          `  ${part}`,
          amount,
        ]),
        ['Charge-out rate', result.chargeOutRate],
        ['Running cost per hour', result.runningCostPerHour],
      ]),
  });
}
