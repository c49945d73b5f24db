import { DOCUMENT, inject } from '@angular/core';

/** Whether the window is too narrow for all columns of a grid when the page is made, as on a telephone. */
export function injectIsNarrow(): boolean {
  return inject(DOCUMENT).defaultView?.matchMedia('(width < 640px)').matches ?? false;
}
