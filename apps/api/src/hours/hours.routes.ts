import { ENDPOINTS } from '@brakeven/contract';
import { getEntryChoices, getEntryTotals, listEntries, restoreEntry, voidEntry } from '@brakeven/use-cases';
import { type Api } from '../api';

/** Time entries: pages, totals, what the filters offer, voiding. */
export function mountHours({ mount }: Api): void {
  mount(ENDPOINTS.listEntries, ({ context, query }) => listEntries(context, query));
  mount(ENDPOINTS.getEntryTotals, ({ context, query }) => getEntryTotals(context, query));
  mount(ENDPOINTS.getEntryChoices, ({ context }) => getEntryChoices(context));
  mount(ENDPOINTS.voidEntry, ({ context, params }) => voidEntry(context, params));
  mount(ENDPOINTS.restoreEntry, ({ context, params }) => restoreEntry(context, params));
}
