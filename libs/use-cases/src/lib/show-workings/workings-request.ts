import {
  AppError,
  type FigureRef,
  JOB_STATUSES,
  type JobStatus,
  type Workings,
  type WorkingsQuery,
} from '@brakeven/contract';
import { findOperationName, type ShopTransaction } from '@brakeven/database';
import { formatLocalDate, toLocalDate } from '@brakeven/values';

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
export function readStatus({ status }: FigureRef): JobStatus | undefined {
  const known = JOB_STATUSES.find((candidate) => candidate === status);
  if (status === undefined || known) return known;
  throw refused('status', `There are jobs that are ${JOB_STATUSES.join(', ')}, but none that are ${status}.`);
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
