import { type CanDeactivateFn } from '@angular/router';
import { type Observable } from 'rxjs';

/** A page that may hold what is not saved yet; see `guardUnsaved`. */
export interface Leavable {
  /** Whether the page may be left; asks if something is not saved. */
  readonly canLeave: () => boolean | Observable<boolean>;
}

/** For `canDeactivate` of a route whose page is `Leavable`. */
export const leaveGuard: CanDeactivateFn<Leavable> = (page) => page.canLeave();
