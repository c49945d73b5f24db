import { ENDPOINTS } from '@brakeven/contract';
import {
  getBooksWorkings,
  getHoursWorkings,
  getJobHoursWorkings,
  getJobWorkings,
  getOvertimeWorkings,
  getPaybackWorkings,
  getStockWorkings,
} from '@brakeven/use-cases';
import { type Api } from '../api';

/** How each figure was made. */
export function mountWorkings({ mount }: Api): void {
  mount(ENDPOINTS.getJobWorkings, ({ context, query }) => getJobWorkings(context, query));
  mount(ENDPOINTS.getJobHoursWorkings, ({ context, query }) => getJobHoursWorkings(context, query));
  mount(ENDPOINTS.getPaybackWorkings, ({ context, query }) => getPaybackWorkings(context, query));
  mount(ENDPOINTS.getOvertimeWorkings, ({ context, query }) => getOvertimeWorkings(context, query));
  mount(ENDPOINTS.getBooksWorkings, ({ context, query }) => getBooksWorkings(context, query));
  mount(ENDPOINTS.getHoursWorkings, ({ context, query }) => getHoursWorkings(context, query));
  mount(ENDPOINTS.getStockWorkings, ({ context, query }) => getStockWorkings(context, query));
}
