import { ENDPOINTS } from '@brakeven/contract';
import {
  closeMonth,
  getMonth,
  listMonths,
  reopenMonth,
  reviewRefusals,
  savePayrollHours,
} from '@brakeven/use-cases';
import { type Api } from '../api';

/** Month end: checklist, hours against payroll, closing and reopening. */
export function mountMonths({ mount }: Api): void {
  mount(ENDPOINTS.listMonths, ({ context }) => listMonths(context));
  mount(ENDPOINTS.getMonth, ({ context, params }) => getMonth(context, params));
  mount(ENDPOINTS.closeMonth, ({ context, params }) => closeMonth(context, params));
  mount(ENDPOINTS.reopenMonth, ({ context, params, body }) => reopenMonth(context, params, body));
  mount(ENDPOINTS.savePayrollHours, ({ context, params, body }) => savePayrollHours(context, params, body));
  mount(ENDPOINTS.reviewRefusals, ({ context, params, body }) => reviewRefusals(context, params, body));
}
