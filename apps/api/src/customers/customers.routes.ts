import { ENDPOINTS } from '@brakeven/contract';
import { getCustomer, listCustomerFigures, renameCustomer } from '@brakeven/use-cases';
import { type Api } from '../api';

/** Customers with what their jobs cost and brought. */
export function mountCustomers({ mount }: Api): void {
  // Before the path that takes any word for a customer's id.
  mount(ENDPOINTS.listCustomerFigures, ({ context }) => listCustomerFigures(context));
  mount(ENDPOINTS.getCustomer, ({ context, params }) => getCustomer(context, params));
  mount(ENDPOINTS.renameCustomer, ({ context, params, body }) => renameCustomer(context, params, body));
}
