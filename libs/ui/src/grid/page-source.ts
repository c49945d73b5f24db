import { type Observable } from 'rxjs';
import { type GridOrder } from './grid-column';

export interface PageRequest {
  cursor: string | undefined;
  sort: string | undefined;
  direction: 'asc' | 'desc' | undefined;
  limit: number;
}

export interface CursorPage<T> {
  items: readonly T[];
  nextCursor: string | null;
}

/** Where a grid gets its rows, page by page. A new object means another question: the grid starts again. */
export interface PageSource<T> {
  load(request: PageRequest): Observable<CursorPage<T>>;
}

/** The order in which rows are asked for, as the server knows it. */
export function toPageRequest(
  cursor: string | undefined,
  order: GridOrder | undefined,
  limit: number,
): PageRequest {
  return { cursor, sort: order?.sort, direction: order?.direction, limit };
}
