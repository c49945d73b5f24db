import { HttpParams } from '@angular/common/http';

/** Query parameters of what is set; what is undefined, null or empty is left out. */
export function toParams(query: object): HttpParams {
  return Object.entries(query).reduce((params, [name, value]) => {
    return value === undefined || value === null || value === '' ? params : params.set(name, String(value));
  }, new HttpParams());
}
