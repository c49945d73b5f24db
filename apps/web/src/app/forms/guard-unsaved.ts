import { DestroyRef, DOCUMENT, inject } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { confirm } from './confirm-dialog';
import { type Leavable } from './leave-guard';

/**
 * Keeps a page from being left unasked, by the browser or by the router, while something in it is not saved. To be
 * called where the page is made; what it returns is the page's `canLeave`, which its route asks by `leaveGuard`.
 */
export function guardUnsaved(hasUnsaved: () => boolean, text: string): Leavable['canLeave'] {
  const dialog = inject(MatDialog);
  const window = inject(DOCUMENT).defaultView;
  const warn = (event: BeforeUnloadEvent) => {
    if (hasUnsaved()) event.preventDefault();
  };
  window?.addEventListener('beforeunload', warn);
  inject(DestroyRef).onDestroy(() => window?.removeEventListener('beforeunload', warn));
  return () =>
    !hasUnsaved() ||
    confirm(dialog, { title: 'Leave without saving?', text: [text], action: 'Leave without saving' });
}
