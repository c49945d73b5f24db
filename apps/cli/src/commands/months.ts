import { monthReopenSchema, monthSchema, type MonthEnd, type Months } from '@brakeven/contract';
import { type Command } from 'commander';
import { type Cli } from '../cli';
import { withShop } from '../databases';
import { readBy } from '../option-parsers';
import { printPairs, printTable } from '../print-table';

interface ShopOption {
  shop: string;
}

/** `month status`, `month close`, `month reopen` */
export function addMonths(program: Command, cli: Cli): void {
  const months = program.command('month').description('Month end: what is missing, close, reopen');
  const readMonth = readBy(monthSchema);
  months
    .command('status')
    .description('What is missing in a month and what it comes to; without a month, how all of them stand')
    .argument('[month]', 'for example 2026-03', readMonth)
    .requiredOption('--shop <name>', 'in which shop')
    .action((month: string | undefined, { shop }: ShopOption) =>
      month === undefined ? list(cli, shop) : status(cli, month, shop),
    );
  months
    .command('close')
    .description('Roll up if costs are behind, then close the month; months close in order')
    .argument('<month>', 'for example 2026-03', readMonth)
    .requiredOption('--shop <name>', 'in which shop')
    .action((month: string, { shop }: ShopOption) => close(cli, month, shop));
  months
    .command('reopen')
    .description('Reopen the latest closed month')
    .argument('<month>', 'for example 2026-03', readMonth)
    .requiredOption('--shop <name>', 'in which shop')
    .requiredOption('--reason <text>', 'kept with the month', readBy(monthReopenSchema.shape.reason))
    .action((month: string, options: ShopOption & { reason: string }) => reopen(cli, month, options));
}

async function list(cli: Cli, shop: string): Promise<void> {
  const { listMonths } = await import('@brakeven/use-cases');
  const result = await withShop(cli, shop, listMonths);
  cli.answer({ json: result, text: () => toMonthTable(result) });
}

async function status(cli: Cli, month: string, shop: string): Promise<void> {
  const { getMonth } = await import('@brakeven/use-cases');
  const result = await withShop(cli, shop, (context) => getMonth(context, { month }));
  cli.answer({ json: result, text: () => toMonthText(result) });
}

async function close(cli: Cli, month: string, shop: string): Promise<void> {
  const { closeMonth } = await import('@brakeven/use-cases');
  const result = await withShop(cli, shop, (context) => closeMonth(context, { month }));
  cli.answer({ json: result, text: () => toMonthText(result) });
}

async function reopen(
  cli: Cli,
  month: string,
  { shop, reason }: ShopOption & { reason: string },
): Promise<void> {
  const { reopenMonth } = await import('@brakeven/use-cases');
  const result = await withShop(cli, shop, (context) => reopenMonth(context, { month }, { reason }));
  cli.answer({ json: result, text: () => toMonthText(result) });
}

function toMonthTable({ months }: Months): string {
  return printTable(months, [
    { title: 'Month', of: ({ month }) => month },
    {
      title: 'State',
      of: ({ state, isNext }) => (state === 'open' && isNext ? 'open, next to close' : state),
    },
    { title: 'Closed by', of: ({ closedBy }) => closedBy ?? '' },
    { title: 'Closed at', of: ({ closedAt }) => closedAt ?? '' },
  ]);
}

function toMonthText(month: MonthEnd): string {
  const { checklist } = month;
  const unreviewed = checklist.refusals.filter(({ reviewedAt }) => reviewedAt === null).length;
  const missing = checklist.missingTimesheets.reduce((days, { days: own }) => days + own.length, 0);
  const facts = printPairs([
    ['Month', month.month],
    ['State', month.closedBy === null ? month.state : `${month.state} by ${month.closedBy}`],
    ['Days without timesheets', String(missing)],
    ['Imports with refused rows to review', String(unreviewed)],
    ['Jobs with cost and no invoice', String(checklist.uninvoicedJobs.length)],
    ['Days not rolled up', String(checklist.rollup.daysWaiting)],
    ['Kinds of rates missing', String(checklist.gaps.length)],
    ['Late lines', `${month.lateInCount} in, ${month.lateOutCount} out`],
    ...(month.closedBy === null ? month.blockers : []).map(({ message }): [string, string] => [
      'Cannot be closed',
      message,
    ]),
  ]);
  const totals = printTable(month.totals, [
    { title: 'Category', of: ({ category }) => category },
    { title: 'Amount', of: ({ amount }) => amount, isFigure: true },
    { title: 'To overhead', of: ({ toOverhead }) => toOverhead, isFigure: true },
    { title: 'Late', of: ({ late }) => late, isFigure: true },
  ]);
  const hours = printTable(month.tieOut, [
    { title: 'Employee', of: ({ employee }) => employee },
    { title: 'Timesheets', of: (row) => row.hours, isFigure: true },
    { title: 'Overtime', of: (row) => row.overtimeHours, isFigure: true },
    { title: 'Costed', of: (row) => row.costedHours, isFigure: true },
    { title: 'Payroll', of: (row) => row.payrollHours ?? '', isFigure: true },
    { title: 'Difference', of: (row) => row.difference ?? '', isFigure: true },
  ]);
  return [facts, totals, hours].join('\n\n');
}
