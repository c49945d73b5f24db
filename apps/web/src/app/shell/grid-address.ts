import { DestroyRef, inject } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { Router } from '@angular/router';
import { type GridOrder } from '@brakeven/ui';
import { debounceTime, Subject } from 'rxjs';
import { injectIsNarrow } from './is-narrow';

/** Quiet time after the last keystroke before it is searched, in ms. */
const QUIET_MS = 300;

/** What a page with a grid asks for, kept in its address. */
export interface GridAddress {
  /** Whether the window was too narrow for all columns when the page was made. */
  readonly isNarrow: boolean;
  /** Changes what is asked; null takes a name out. */
  readonly ask: (queryParams: Record<string, string | null>) => void;
  /** Searches for what is typed, once nobody types on. */
  readonly searchFor: (text: string) => void;
  readonly follow: (href: string) => void;
}

/** To be called where the page is made. */
export function injectGridAddress(): GridAddress {
  const [router, destroyed] = [inject(Router), inject(DestroyRef)];
  const typed = new Subject<string>();
  const ask: GridAddress['ask'] = (queryParams) => {
    void router.navigate([], { queryParams, queryParamsHandling: 'merge', replaceUrl: true });
  };
  typed
    .pipe(debounceTime(QUIET_MS), takeUntilDestroyed(destroyed))
    .subscribe((text) => ask({ search: text.trim() || null }));
  return {
    isNarrow: injectIsNarrow(),
    ask,
    searchFor: (text) => typed.next(text),
    follow: (href) => void router.navigateByUrl(href),
  };
}

/** The order that an address asks for; the usual one if it asks for none. */
export function toGridOrder(
  sort: string | undefined,
  direction: string | undefined,
  usual: GridOrder,
): GridOrder {
  return sort ? { sort, direction: direction === 'asc' ? 'asc' : 'desc' } : usual;
}
