import { ENDPOINTS } from '@brakeven/contract';
import { deleteSavedView, listSavedViews, saveView } from '@brakeven/use-cases';
import { type Api } from '../api';

/** Views that people keep of pages. */
export function mountSavedViews({ mount }: Api): void {
  mount(ENDPOINTS.listSavedViews, ({ context, query }) => listSavedViews(context, query));
  mount(ENDPOINTS.saveView, ({ context, body }) => saveView(context, body));
  mount(ENDPOINTS.deleteSavedView, ({ context, params }) => deleteSavedView(context, params));
}
