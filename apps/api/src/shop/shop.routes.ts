import { ENDPOINTS } from '@brakeven/contract';
import { createOperation, getShop, listOperations, updateOperation, updateShop } from '@brakeven/use-cases';
import { type Api } from '../api';

/** The shop's settings and operations. */
export function mountShop({ mount }: Api): void {
  mount(ENDPOINTS.getShop, ({ context }) => getShop(context));
  mount(ENDPOINTS.updateShop, ({ context, body }) => updateShop(context, body));
  mount(ENDPOINTS.listOperations, ({ context }) => listOperations(context));
  mount(ENDPOINTS.createOperation, ({ context, body }) => createOperation(context, body));
  mount(ENDPOINTS.updateOperation, ({ context, params, body }) => updateOperation(context, params, body));
}
