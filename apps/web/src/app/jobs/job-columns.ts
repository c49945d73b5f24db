import { type FigureRef, type Job, type JobPage } from '@brakeven/contract';
import { type GridColumn, type GridKind, type GridNote, type GridTotals } from '@brakeven/ui';
import { toStatusTone } from './job-status';

type FigureField = 'hours' | 'machineHours' | 'labour' | 'machine' | 'overhead' | 'total';

const WIDTHS: Readonly<Record<FigureField, number>> = {
  hours: 86,
  machineHours: 90,
  labour: 104,
  machine: 104,
  overhead: 104,
  total: 142,
};

/** Which jobs the totals are over. */
export type JobFilter = Pick<FigureRef, 'search' | 'status'>;

const HOURS: readonly [FigureField, string][] = [
  ['hours', 'Hours'],
  ['machineHours', 'Machine h'],
];
const MONEY: readonly [FigureField, string][] = [
  ['labour', 'Labour'],
  ['machine', 'Machine'],
  ['overhead', 'Overhead'],
  ['total', 'Cost'],
];

/** The columns of the jobs grid; money only for those to whom the server sends it. */
export function toJobColumns(withMoney: boolean): GridColumn<Job>[] {
  const money = withMoney ? [...MONEY.map((field) => toFigureColumn(field, 'money')), QUOTED] : [];
  return [...WORDS, ...HOURS.map((field) => toFigureColumn(field, 'hours')), ...money, DUE, LAST_WORKED];
}

/** The totals over all jobs of the filter. */
export function toJobTotals(totals: JobPage['totals'], filter: JobFilter): GridTotals {
  const fields = [...HOURS, ...MONEY].map(([field]) => field);
  const figures = fields.map((field) => [
    field,
    { value: totals[field] ?? null, figure: { figure: `job.${field}` as const, ...filter } },
  ]);
  const jobs = totals.jobs.toLocaleString('en-US');
  return {
    ...Object.fromEntries(figures),
    number: { value: 'Total', isText: true },
    title: { value: `${jobs} ${totals.jobs === 1 ? 'job' : 'jobs'}`, isText: true },
    quotedPrice: {
      value: totals.quotedPrice ?? null,
      figure: { figure: 'job.quotedPrice', ...filter },
    },
  };
}

const WORDS: readonly GridColumn<Job>[] = [
  {
    id: 'number',
    header: 'Job',
    value: (job) => job.number,
    href: (job) => `/jobs/${job.jobId}`,
    isSortable: true,
    isPinned: true,
    width: 80,
  },
  { id: 'title', header: 'Title', value: (job) => job.title, isSortable: true, minWidth: 130, flex: 2 },
  {
    id: 'customer',
    header: 'Customer',
    value: (job) => job.customer,
    isSortable: true,
    minWidth: 130,
    flex: 1,
  },
  {
    id: 'status',
    header: 'Status',
    value: (job) => job.status,
    tone: (job) => toStatusTone(job.status),
    isSortable: true,
    width: 90,
  },
];

const QUOTED: GridColumn<Job> = {
  id: 'quotedPrice',
  header: 'Quoted',
  kind: 'money',
  value: (job) => job.quotedPrice,
  figure: (job) => ({ figure: 'job.quotedPrice', jobId: job.jobId }),
  isSortable: true,
  width: 106,
};

const DUE: GridColumn<Job> = {
  id: 'dueOn',
  header: 'Due',
  kind: 'date',
  value: (job) => job.dueOn,
  isSortable: true,
  width: 110,
};

const LAST_WORKED: GridColumn<Job> = {
  id: 'lastWorkedOn',
  header: 'Last worked',
  kind: 'date',
  value: (job) => job.lastWorkedOn,
  isSortable: true,
  width: 112,
};

function toFigureColumn([field, header]: readonly [FigureField, string], kind: GridKind): GridColumn<Job> {
  return {
    id: field,
    header,
    kind,
    value: (job) => job[field],
    figure: (job) => ({ figure: `job.${field}`, jobId: job.jobId }),
    note: field === 'total' ? toGapNote : undefined,
    isSortable: true,
    width: WIDTHS[field],
  };
}

/** Entries without a rate cost nothing yet: the figure is not the whole. */
function toGapNote({ entriesWithoutRate }: Job): GridNote | null {
  return entriesWithoutRate > 0 ? { severity: 'warning', text: 'no rate' } : null;
}
