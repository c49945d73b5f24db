import {
  AppError,
  type FigureRef,
  JOB_STATUSES,
  type JobStatus,
  type Workings,
  type WorkingsQuery,
} from '@brakeven/contract';
import {
  findCustomerName,
  findEmployeeName,
  findOperationName,
  type JobSelection,
  type ShopTransaction,
} from '@brakeven/database';
import { formatHours, formatLocalDate, type Hours, hoursText, toLocalDate } from '@brakeven/values';

/** What workings begin with, before their lines. */
export type WorkingsHead = Pick<Workings, 'figure' | 'title'>;

/** A page of lines, as far as it was asked for. */
export interface LinePaging {
  /** Names the list in its cursors. */
  list: string;
  cursor: string | undefined;
  limit: number;
}

/** Splits a request into the figure that is meant and the page of its lines. */
export function splitRequest(query: WorkingsQuery): { ref: FigureRef; paging: LinePaging } {
  const { cursor, limit, ...given } = query;
  const ref = Object.fromEntries(
    Object.entries(given).filter(([, value]) => value !== undefined && value !== ''),
  ) as FigureRef;
  if (ref.search !== undefined) ref.search = ref.search.replaceAll('\0', '');
  return { ref, paging: { list: `workings.${ref.figure}`, cursor, limit } };
}

/**
 * The status of a filter.
 * @throws AppError `invalid_input` if no job can have it
 */
function readStatus({ status }: FigureRef): JobStatus | undefined {
  const known = JOB_STATUSES.find((candidate) => candidate === status);
  if (status === undefined || known) return known;
  throw refused('status', `There are jobs that are ${JOB_STATUSES.join(', ')}, but none that are ${status}.`);
}

/**
 * The jobs that a figure is of, as a filter, and in words to follow its title.
 * @throws AppError `invalid_input` if no job can have the status, `not_found` (customer)
 */
export async function readJobFilter(
  trx: ShopTransaction,
  ref: FigureRef,
): Promise<{ jobs: JobSelection; whose: string }> {
  const { search, customerId, without } = ref;
  const jobs = { search, status: readStatus(ref), customerId, without };
  const given = Object.entries(jobs).flatMap(([name, value]) => (value === undefined ? [] : [name]));
  if (given.length === 0) return { jobs, whose: 'all jobs' };
  const [only] = given;
  if (given.length > 1 || only === 'search' || only === 'status') return { jobs, whose: 'the jobs found' };
  if (customerId === undefined) return { jobs, whose: 'the jobs without a customer' };
  const name = await findCustomerName(trx, customerId);
  if (name === null) throw new AppError('not_found', 'There is no such customer in this shop.');
  return { jobs, whose: `the jobs of ${name}` };
}

/**
 * An employee's name.
 * @throws AppError `not_found`
 */
export async function getEmployeeName(trx: ShopTransaction, employeeId: string): Promise<string> {
  const name = await findEmployeeName(trx, employeeId);
  if (name !== null) return name;
  throw new AppError('not_found', 'There is no such employee in this shop.');
}

/** Hours as an input or a detail says them. */
export function hoursIn(hours: Hours): string {
  return `${formatHours(hoursText(hours))}\u00a0h`;
}

/** An input in words. */
export function toInput(label: string, value: string): Workings['inputs'][number] {
  return { label, value, validFrom: null, figure: null };
}

/** A refusal of one part of the request. */
export function refused(field: string, message: string): AppError {
  return new AppError('invalid_input', message, { issues: [{ field, code: 'invalid', message }] });
}

/** The operation and the days that a figure is narrowed to, as words to follow its title. */
export async function describeNarrowing(trx: ShopTransaction, ref: FigureRef): Promise<string> {
  const operation = ref.operationId === undefined ? null : await findOperationName(trx, ref.operationId);
  const day = (date: string) => formatLocalDate(toLocalDate(date));
  const words = [
    ...(operation === null ? [] : [operation]),
    ...(ref.from === undefined ? [] : [`from ${day(ref.from)}`]),
    ...(ref.to === undefined ? [] : [`through ${day(ref.to)}`]),
  ];
  return words.length === 0 ? '' : `, ${words.join(' ')}`;
}
