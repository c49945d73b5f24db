import { ENDPOINTS } from '@brakeven/contract';
import {
  createEmployee,
  createOverheadRate,
  createPayRate,
  deleteAlias,
  deleteOverheadRate,
  deletePayRate,
  listEmployees,
  listOverheadRates,
  updateEmployee,
  updateOverheadRate,
  updatePayRate,
} from '@brakeven/use-cases';
import { type Api } from '../api';

/** Employees, their pay rates and spellings, and overhead rates. */
export function mountPeople({ mount }: Api): void {
  mount(ENDPOINTS.listEmployees, ({ context }) => listEmployees(context));
  mount(ENDPOINTS.createEmployee, ({ context, body }) => createEmployee(context, body));
  mount(ENDPOINTS.updateEmployee, ({ context, params, body }) => updateEmployee(context, params, body));
  mount(ENDPOINTS.createPayRate, ({ context, params, body }) => createPayRate(context, params, body));
  mount(ENDPOINTS.updatePayRate, ({ context, params, body }) => updatePayRate(context, params, body));
  mount(ENDPOINTS.deletePayRate, ({ context, params }) => deletePayRate(context, params));
  mount(ENDPOINTS.deleteAlias, ({ context, params }) => deleteAlias(context, params));
  mount(ENDPOINTS.listOverheadRates, ({ context }) => listOverheadRates(context));
  mount(ENDPOINTS.createOverheadRate, ({ context, body }) => createOverheadRate(context, body));
  mount(ENDPOINTS.updateOverheadRate, ({ context, params, body }) =>
    updateOverheadRate(context, params, body),
  );
  mount(ENDPOINTS.deleteOverheadRate, ({ context, params }) => deleteOverheadRate(context, params));
}
