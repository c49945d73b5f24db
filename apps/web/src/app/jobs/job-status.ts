import { type Job, type JobStatus } from '@brakeven/contract';
import { type Tone } from '@brakeven/ui';

/** In the order of a job's life. */
export const JOB_STATUS_ORDER: readonly JobStatus[] = [
  'quoted',
  'open',
  'finished',
  'invoiced',
  'lost',
  'cancelled',
];

const TONES: Readonly<Record<JobStatus, Tone>> = {
  quoted: 'plan',
  open: 'blue',
  finished: 'good',
  invoiced: 'good',
  lost: 'loss',
  cancelled: 'plain',
};

/** The tint that goes with a status' word. */
export function toStatusTone(status: JobStatus): Tone {
  return TONES[status];
}

/** The status as a word that begins a line: 'Quoted'. */
export function toStatusWord(status: JobStatus): string {
  return status.charAt(0).toUpperCase() + status.slice(1);
}

/** Whether a text from the address names a status. */
export function isJobStatus(text: string | undefined): text is JobStatus {
  return JOB_STATUS_ORDER.some((status) => status === text);
}

/** A step from one status to another, as a button says it and as it is told afterwards. */
export interface StatusStep {
  to: JobStatus;
  label: string;
  done: string;
}

const OPEN: StatusStep = { to: 'open', label: 'Start work', done: 'is open for work' };
const REOPEN: StatusStep = { to: 'open', label: 'Reopen', done: 'is open again' };
const FINISH: StatusStep = { to: 'finished', label: 'Finish', done: 'is finished' };
const INVOICE: StatusStep = { to: 'invoiced', label: 'All invoiced', done: 'is invoiced' };
const LOSE: StatusStep = { to: 'lost', label: 'Lost', done: 'is lost' };
const CANCEL: StatusStep = { to: 'cancelled', label: 'Cancel job', done: 'is cancelled' };
const QUOTE: StatusStep = { to: 'quoted', label: 'Back to quoted', done: 'is quoted again' };

const STEPS: Readonly<Record<JobStatus, readonly StatusStep[]>> = {
  quoted: [OPEN, LOSE, CANCEL],
  open: [FINISH, CANCEL],
  finished: [INVOICE, REOPEN],
  invoiced: [REOPEN],
  lost: [QUOTE],
  cancelled: [REOPEN],
};

/** Where a job can go from where it stands, the next step first; nothing is all invoiced before an invoice. */
export function findStatusSteps({
  status,
  invoiced,
}: Pick<Job, 'status' | 'invoiced'>): readonly StatusStep[] {
  return STEPS[status].filter(({ to }) => to !== 'invoiced' || Number(invoiced ?? 0) !== 0);
}
