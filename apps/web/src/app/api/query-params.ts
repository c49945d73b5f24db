import { HttpParams } from '@angular/common/http';

/** A query without what is not set, so that the server sees only what was asked. */
export function toQueryParams(query: object): HttpParams {
  let params = new HttpParams();
  for (const [name, value] of Object.entries(query) as [string, unknown][]) {
    if (value !== undefined && value !== null && value !== '') params = params.set(name, String(value));
  }
  return params;
}
