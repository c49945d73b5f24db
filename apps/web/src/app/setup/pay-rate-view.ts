import { type Employee, type PayRate } from '@brakeven/contract';
import { computeLoadedRate } from '@brakeven/costing';
import { D, formatRate, rateText, toPercent, toRate } from '@brakeven/values';
import { findCurrentRate, type StatedRate, stateRates } from '../rates/current-rate';

/** A pay rate with what an hour costs by it, and how that is made. */
export type PayRateView = StatedRate<PayRate> & {
  loaded: string;
  /** '$28.50 × 1.28'. */
  workings: string;
};

export interface EmployeeView {
  employee: Employee;
  /** Absent for somebody whose first rate is still to come. */
  current: PayRateView | undefined;
  rates: PayRateView[];
}

/** An employee with the rates as the page shows them, latest first. */
export function toEmployeeView(employee: Employee, today: string, currency: string): EmployeeView {
  const rates = stateRates(employee.rates, today).map((rate) => toPayRateView(rate, currency));
  const currentId = findCurrentRate(employee.rates, today)?.payRateId;
  return { employee, rates, current: rates.find(({ payRateId }) => payRateId === currentId) };
}

function toPayRateView(rate: StatedRate<PayRate>, currency: string): PayRateView {
  const { factor, loaded } = computeLoadedRate(toRate(D(rate.wagePerHour)), toPercent(D(rate.burdenPercent)));
  return {
    ...rate,
    loaded: rateText(loaded),
    workings: `${formatRate(rate.wagePerHour, currency)} × ${factor.toFixed()}`,
  };
}
