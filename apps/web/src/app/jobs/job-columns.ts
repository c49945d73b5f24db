import { type Figure, type FigureRef, type Job, type JobPage, type JobSort } from '@brakeven/contract';
import { type GridColumn, type GridNote, type GridTotals } from '@brakeven/ui';
import { toStatusTone } from './job-status';
import { toMarginNote } from './margin-note';

/** Which jobs the totals are over. */
export type JobFilter = Pick<FigureRef, 'search' | 'status' | 'customerId'>;

type FigureField = keyof Pick<
  Job,
  | 'hours'
  | 'machineHours'
  | 'labour'
  | 'overtime'
  | 'machine'
  | 'overhead'
  | 'material'
  | 'outside'
  | 'total'
  | 'quotedPrice'
  | 'estimatedHours'
  | 'estimate'
  | 'variance'
  | 'invoiced'
  | 'margin'
  | 'workInProgress'
>;

interface FigureColumn {
  field: FigureField;
  header: string;
  figure: Figure;
  kind: 'money' | 'hours';
  width: number;
  rest?: Partial<GridColumn<Job>>;
}

const hours = (field: FigureField, header: string, figure: Figure, width: number): FigureColumn => ({
  field,
  header,
  figure,
  kind: 'hours',
  width,
});
const money = (
  field: FigureField,
  header: string,
  figure: Figure,
  rest?: Partial<GridColumn<Job>>,
): FigureColumn => ({ field, header, figure, kind: 'money', width: rest?.width ?? 96, rest });

const HOURS: readonly FigureColumn[] = [
  hours('hours', 'Hours', 'job.hours', 84),
  hours('machineHours', 'Machine h', 'job.machineHours', 92),
];

const MONEY: readonly FigureColumn[] = [
  hours('estimatedHours', 'Est. hours', 'estimate.hours', 92),
  money('estimate', 'Estimate', 'estimate.total'),
  money('labour', 'Labour', 'job.labour'),
  money('overtime', 'Overtime', 'job.overtime'),
  money('machine', 'Machine', 'job.machine'),
  money('overhead', 'Overhead', 'job.overhead'),
  money('material', 'Material', 'job.material'),
  money('outside', 'Outside', 'job.outside'),
  money('total', 'Cost', 'job.total', { note: toGapNote, width: 100 }),
  money('variance', 'Variance', 'estimate.variance', { isLoss: ({ variance }) => isAboveZero(variance) }),
  money('quotedPrice', 'Quoted', 'job.quotedPrice'),
  money('invoiced', 'Invoiced', 'job.invoiced'),
  money('margin', 'Margin', 'job.margin', {
    note: toMarginNote,
    // What is done and not invoiced yet is work in progress, and the shop's own work a cost: neither is a loss.
    isLoss: (job) =>
      job.isBillable && job.marginIsProvisional === false && !job.isToInvoice && isBelowZero(job.margin),
    width: 166,
  }),
  money('workInProgress', 'In progress', 'job.workInProgress', { width: 100 }),
];

const MONEY_FIELDS: readonly string[] = MONEY.map(({ field }) => field);

/** Every column that the grid can have, by its place in the chooser; money only for those to whom it is sent. */
export function toJobColumns(withMoney: boolean): GridColumn<Job>[] {
  const figures = withMoney ? [...HOURS, ...MONEY] : HOURS;
  return [...WORDS, ...figures.map(toGridColumn), ...DATES];
}

/** Those of them that are chosen, in the order chosen; what is not known is left out. */
export function chooseColumns(
  columns: readonly GridColumn<Job>[],
  chosen: readonly string[],
): GridColumn<Job>[] {
  return chosen.flatMap((id) => columns.find((column) => column.id === id) ?? []);
}

const STANDARD: readonly JobSort[] = [
  'number',
  'title',
  'customer',
  'status',
  'estimate',
  'total',
  'variance',
  'invoiced',
  'margin',
  'workInProgress',
  'lastWorkedOn',
];
const STANDARD_WITHOUT_MONEY: readonly JobSort[] = [
  'number',
  'title',
  'customer',
  'status',
  'quantity',
  'hours',
  'machineHours',
  'dueOn',
  'lastWorkedOn',
];

/** What a telephone has room for, before the rest. */
const FIRST_IF_NARROW: readonly JobSort[] = ['number', 'title', 'margin', 'hours', 'status'];

/** What somebody sees who has chosen nothing: all of it fits beside the rail at 1440 px. */
export function toStandardColumns(withMoney: boolean, isNarrow = false): JobSort[] {
  const columns = withMoney ? STANDARD : STANDARD_WITHOUT_MONEY;
  if (!isNarrow) return [...columns];
  const first = FIRST_IF_NARROW.filter((id) => columns.includes(id));
  return [...first, ...columns.filter((id) => !first.includes(id))];
}

/** What each job cost, category by category. */
export const COST_COLUMNS: readonly JobSort[] = [
  'number',
  'title',
  'status',
  'hours',
  'labour',
  'overtime',
  'machine',
  'overhead',
  'material',
  'outside',
  'total',
];

/** The totals over all jobs of the filter. */
export function toJobTotals(totals: JobPage['totals'], filter: JobFilter): GridTotals {
  const figures = [...HOURS, ...MONEY].map(({ field, figure }) => {
    const value = totals[field] ?? null;
    return [field, { value, figure: value === null ? null : { figure, ...filter } }];
  });
  return {
    ...Object.fromEntries(figures),
    number: { value: 'Total', isText: true },
    title: { value: toCountWords(totals.jobs), isText: true },
    customer: { value: toComparedWords(totals), isText: true },
  };
}

/** The variance is that of jobs with an estimate that cost something, so that these are counted apart. */
function toComparedWords({ jobs, comparedJobs = jobs }: JobPage['totals']): string | null {
  return comparedJobs === jobs ? null : `${comparedJobs.toLocaleString('en-US')} with variance`;
}

function toCountWords(jobs: number): string {
  return `${jobs.toLocaleString('en-US')} ${jobs === 1 ? 'job' : 'jobs'}`;
}

/** Whether a column shows money or what comes of an estimate. */
export function isMoneyColumn(id: string): boolean {
  return MONEY_FIELDS.includes(id);
}

const WORDS: readonly GridColumn<Job>[] = [
  {
    id: 'number',
    header: 'Job',
    value: (job) => job.number,
    href: (job) => `/jobs/${job.jobId}`,
    isSortable: true,
    isPinned: true,
    width: 70,
  },
  { id: 'title', header: 'Title', value: (job) => job.title, isSortable: true, minWidth: 106, flex: 1 },
  {
    id: 'customer',
    header: 'Customer',
    value: (job) => job.customer,
    isSortable: true,
    minWidth: 104,
    flex: 1.5,
  },
  {
    id: 'status',
    header: 'Status',
    value: (job) => job.status,
    tone: (job) => toStatusTone(job.status),
    isSortable: true,
    width: 86,
  },
  {
    id: 'quantity',
    header: 'Pieces',
    kind: 'count',
    value: (job) => job.quantity,
    isSortable: true,
    width: 84,
  },
];

const DATES: readonly GridColumn<Job>[] = [
  toDateColumn('openedOn', 'Opened', (job) => job.openedOn),
  toDateColumn('dueOn', 'Due', (job) => job.dueOn),
  toDateColumn('lastWorkedOn', 'Last worked', (job) => job.lastWorkedOn),
];

function toDateColumn(id: JobSort, header: string, value: GridColumn<Job>['value']): GridColumn<Job> {
  return { id, header, kind: 'date', value, isSortable: true, width: 118 };
}

function toGridColumn({ field, header, figure, kind, width, rest }: FigureColumn): GridColumn<Job> {
  return {
    id: field,
    header,
    kind,
    value: (job) => job[field],
    figure: (job) => (job[field] === null ? null : { figure, jobId: job.jobId }),
    isSortable: true,
    width,
    ...rest,
  };
}

/** Entries without a rate cost nothing yet: the figure is not the whole. */
function toGapNote({ entriesWithoutRate }: Job): GridNote | null {
  return entriesWithoutRate > 0 ? { severity: 'warning', text: 'no rate' } : null;
}

/** It cost more than estimated. */
function isAboveZero(amount: string | null | undefined): boolean {
  return typeof amount === 'string' && Number(amount) > 0;
}

function isBelowZero(amount: string | undefined): boolean {
  return amount?.startsWith('-') ?? false;
}
