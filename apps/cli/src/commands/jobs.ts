import { JOB_STATUSES, type JobStatus } from '@brakeven/contract';
import { type JobCostSummary } from '@brakeven/use-cases';
import { type Command, Option } from 'commander';
import { type Cli } from '../cli';
import { withShop } from '../databases';
import { printPairs, printTable } from '../print-table';

/** `jobs cost`, `jobs list` */
export function addJobs(program: Command, cli: Cli): void {
  const jobs = program.command('jobs').description('What jobs have cost');
  jobs
    .command('cost')
    .description('Hours, cost, income and estimate of a job, as rolled up')
    .argument('<number>', 'number of the job')
    .requiredOption('--shop <name>', 'in which shop')
    .action((number: string, options: { shop: string }) => cost(cli, number, options.shop));
  jobs
    .command('list')
    .description('All jobs with hours, cost, income and estimate')
    .requiredOption('--shop <name>', 'in which shop')
    .addOption(new Option('--status <status>', 'only jobs of this status').choices(JOB_STATUSES))
    .option('--search <text>', 'only jobs whose number, title or customer holds this')
    .action((options: { shop: string; status?: JobStatus; search?: string }) => list(cli, options));
}

async function cost(cli: Cli, number: string, shop: string): Promise<void> {
  const { getJobCost } = await import('@brakeven/use-cases');
  const result = await withShop(cli, shop, (context) => getJobCost(context, number));
  cli.answer({ json: result, text: () => toCostText(result) });
}

function toCostText(cost: JobCostSummary): string {
  const { estimate } = cost;
  const figures = [
    { title: 'Hours', key: 'hours' },
    { title: 'Labour', key: 'labour' },
    { title: 'Overtime', key: 'overtime' },
    { title: 'Machine', key: 'machine' },
    { title: 'Overhead', key: 'overhead' },
    { title: 'Material', key: 'material' },
    { title: 'Outside', key: 'outside' },
    { title: 'Total', key: 'total' },
    { title: 'Invoiced', key: 'invoiced' },
    { title: cost.marginIsProvisional ? 'Margin (provisional)' : 'Margin', key: 'margin' },
  ] as const;
  const head = printPairs([
    ['Job', cost.job],
    ['Through', cost.through ?? 'nothing rolled up yet'],
    ['Work in progress', cost.workInProgress],
  ]);
  const table = printTable(figures, [
    { title: '', of: ({ title }) => title },
    { title: 'Actual', of: ({ key }) => cost[key], isFigure: true },
    { title: 'Estimate', of: ({ key }) => estimate?.[key] ?? '', isFigure: true },
  ]);
  return `${head}\n\n${table}`;
}

async function list(
  cli: Cli,
  { shop, ...filter }: { shop: string; status?: JobStatus; search?: string },
): Promise<void> {
  const { listJobCosts } = await import('@brakeven/use-cases');
  const jobs = await withShop(cli, shop, (context) => listJobCosts(context, filter));
  cli.answer({
    json: { jobs },
    text: () =>
      printTable(jobs, [
        { title: 'Job', of: ({ number }) => number },
        { title: 'Customer', of: ({ customer }) => customer ?? '' },
        { title: 'Title', of: ({ title }) => title },
        { title: 'Status', of: ({ status }) => status },
        { title: 'Hours', of: ({ hours }) => hours, isFigure: true },
        { title: 'Estimate', of: ({ estimate }) => estimate?.total ?? '', isFigure: true },
        { title: 'Cost', of: ({ total }) => total, isFigure: true },
        { title: 'Quoted', of: ({ quotedPrice }) => quotedPrice ?? '', isFigure: true },
        { title: 'Invoiced', of: ({ invoiced }) => invoiced, isFigure: true },
        { title: 'Margin', of: ({ margin }) => margin, isFigure: true },
      ]),
  });
}
