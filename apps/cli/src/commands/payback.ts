import { type BreakEvenMethod } from '@brakeven/contract';
import { type Command } from 'commander';
import { type Cli } from '../cli';
import { withShop } from '../databases';
import { printPairs } from '../print-table';

/** `payback` */
export function addPayback(program: Command, cli: Cli): void {
  program
    .command('payback')
    .description('How far a machine has paid itself back, and when it is even')
    .argument('<machine>', 'code or name of the machine')
    .requiredOption('--shop <name>', 'in which shop')
    .action((machine: string, options: { shop: string }) => show(cli, machine, options.shop));
}

async function show(cli: Cli, machine: string, shop: string): Promise<void> {
  const { getMachinePayback } = await import('@brakeven/use-cases');
  const payback = await withShop(cli, shop, (context) => getMachinePayback(context, machine));
  const { breakEven } = payback;
  cli.answer({
    json: payback,
    text: () =>
      printPairs([
        ['Machine', payback.machine],
        ['Outlay', payback.outlay],
        ['Earned', payback.earned],
        ['Running cost', payback.runningCost],
        ['Earned back', payback.earnedBack],
        ['Remaining', payback.remaining],
        ['As of', payback.asOf ?? 'nothing rolled up yet'],
        ['Break-even', BREAK_EVEN_WORDS[breakEven.method](breakEven.date ?? '')],
      ]),
  });
}

const BREAK_EVEN_WORDS: Readonly<Record<BreakEvenMethod, (date: string) => string>> = {
  reached: (date) => `reached on ${date}`,
  'straight-line': (date) => `${date}, on a straight line from the last 26 weeks`,
  'not-at-this-pace': () => 'not within 20 years at the pace of the last 26 weeks',
  'no-data': () => 'cannot be told yet',
};
