import { type JobStatus } from '@brakeven/contract';
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
