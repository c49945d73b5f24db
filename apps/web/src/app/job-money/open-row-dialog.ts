import { type ComponentType } from '@angular/cdk/portal';
import { type MatDialog } from '@angular/material/dialog';
import { defer, map, type Observable, switchMap } from 'rxjs';

/** Fetches a dialog's code, opens it, and emits what `tell` says of the row that it saved, or null. */
export function openRowDialog<Data, Row>(
  dialog: MatDialog,
  load: () => Promise<ComponentType<unknown>>,
  { data, width, tell }: { data: Data; width: string; tell: (saved: Row) => string },
): Observable<string | null> {
  return defer(load).pipe(
    switchMap((type) => dialog.open<unknown, Data, Row>(type, { data, width }).afterClosed()),
    map((saved) => (saved ? tell(saved) : null)),
  );
}
