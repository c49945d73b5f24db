import { type Job } from '@brakeven/contract';
import { type GridColumn } from '@brakeven/ui';
import { toStatusTone } from '../jobs/job-status';
import { toMarginNote } from '../jobs/margin-note';

type MoneyField = 'total' | 'invoiced' | 'margin' | 'workInProgress';

const toMoneyColumn = (id: MoneyField, header: string): GridColumn<Job> => ({
  id,
  header,
  kind: 'money',
  value: (job) => job[id],
  figure: (job) => ({ figure: `job.${id}`, jobId: job.jobId }),
  note: (job) => (id === 'margin' ? toMarginNote(job) : null),
  isSortable: true,
  width: id === 'margin' ? 160 : 124,
});

/** The columns of a customer's jobs. */
export const CUSTOMER_JOB_COLUMNS: readonly GridColumn<Job>[] = [
  {
    id: 'number',
    header: 'Job',
    value: (job) => job.number,
    href: (job) => `/jobs/${job.jobId}`,
    isSortable: true,
    width: 90,
  },
  { id: 'title', header: 'Title', value: (job) => job.title, isSortable: true, minWidth: 140, flex: 2 },
  {
    id: 'status',
    header: 'Status',
    value: (job) => job.status,
    tone: (job) => toStatusTone(job.status),
    isSortable: true,
    width: 100,
  },
  toMoneyColumn('total', 'Cost'),
  toMoneyColumn('invoiced', 'Invoiced'),
  toMoneyColumn('margin', 'Margin'),
  toMoneyColumn('workInProgress', 'In progress'),
  {
    id: 'lastWorkedOn',
    header: 'Last worked',
    kind: 'date',
    value: (job) => job.lastWorkedOn,
    isSortable: true,
    width: 118,
  },
];
