import {
  type AliasKind,
  type CheckedRow,
  type Progress,
  type TimesheetCheck,
  type TimesheetField,
} from '@brakeven/contract';
import { formatHours } from '@brakeven/values';

/** What the columns of a timesheet are called on screen. */
export const FIELD_WORDS: Record<TimesheetField, string> = {
  date: 'Date',
  employee: 'Employee',
  job: 'Job',
  operation: 'Operation',
  machine: 'Machine',
  hours: 'Hours',
  good: 'Good pieces',
  scrap: 'Scrap pieces',
  note: 'Note',
};

/** The same where there is little room. */
export const FIELD_WORDS_SHORT: Record<TimesheetField, string> = {
  ...FIELD_WORDS,
  good: 'Good',
  scrap: 'Scrap',
};

export const STATE_WORDS: Record<CheckedRow['state'], string> = {
  ready: 'Ready',
  'already-there': 'Already there',
  refused: 'Refused',
};

export const STAGE_WORDS: Record<Progress['stage'], string> = {
  reading: 'Reading the workbook',
  checking: 'Checking each row',
  writing: 'Writing the entries',
  'rolling-up': 'Working out the costs',
  done: 'Done',
  failed: 'Stopped',
};

export const KIND_WORDS: Record<AliasKind, { one: string; many: string; page: string }> = {
  employee: { one: 'employee', many: 'employees', page: 'People & rates' },
  job: { one: 'job', many: 'jobs', page: 'Jobs' },
  operation: { one: 'operation', many: 'operations', page: 'Shop' },
  machine: { one: 'machine', many: 'machines', page: 'Machines' },
};

/** A number with its noun: '1 row', '1,204 rows'. */
export function count(number: number, one: string, many = `${one}s`): string {
  return `${number.toLocaleString('en-US')} ${number === 1 ? one : many}`;
}

/** Nouns whose plural is not a plain s. */
export function countEntries(number: number): string {
  return count(number, 'entry', 'entries');
}

/** What the button that commits says; null when there is nothing to add. */
export function commitWords(check: TimesheetCheck): string | null {
  if (check.entriesReady === 0) return null;
  const hours = `${formatHours(check.hoursReady)} h`;
  if (check.refused === 0) return `Add ${countEntries(check.entriesReady)} (${hours})`;
  return `Add the ${count(check.entriesReady, 'good row')}, leave ${check.refused.toLocaleString('en-US')} out`;
}

type Refused = Pick<TimesheetCheck, 'refused' | 'refusedWithoutHours'>;

/** How many rows are refused, and of how many the hours are not known: those are in no sum. */
export function refusedWords({ refused, refusedWithoutHours }: Refused): string {
  const rows = count(refused, 'row');
  if (refusedWithoutHours === 0) return rows;
  return `${rows}, ${unreadHoursWords({ refused, refusedWithoutHours })}`;
}

/** What goes in and what stays out when the refused rows are left out. */
export function leaveOutWords(check: TimesheetCheck): string {
  const { refused, refusedWithoutHours, entriesReady } = check;
  const goes = entriesReady === 1 ? 'goes' : 'go';
  const goesIn = `${countEntries(entriesReady)} with ${formatHours(check.hoursReady)} hours ${goes} in.`;
  const stays = refused === 1 ? 'stays out and costs' : 'stay out and cost';
  const areKnown = refusedWithoutHours < refused;
  const hours = areKnown ? ` with ${formatHours(check.hoursRefused)} hours` : '';
  const unread = refusedWithoutHours > 0 ? `; ${unreadHoursWords(check)}` : '';
  return `${goesIn} ${count(refused, 'row')}${hours} ${stays} no job anything${unread}.`;
}

function unreadHoursWords({ refused, refusedWithoutHours }: Refused): string {
  if (refusedWithoutHours < refused) {
    return `the hours of ${refusedWithoutHours.toLocaleString('en-US')} of them cannot be read`;
  }
  return `${refused === 1 ? 'its' : 'their'} hours cannot be read`;
}

/** Share of the work that is done, 0 to 100, or null when it is not known. */
export function percentDone(progress: Pick<Progress, 'done' | 'total'>): number | null {
  if (!progress.total) return null;
  return Math.min(100, Math.round((progress.done / progress.total) * 100));
}
