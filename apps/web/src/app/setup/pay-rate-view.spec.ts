import { type Employee } from '@brakeven/contract';
import { toEmployeeView } from './pay-rate-view';

const employee: Employee = {
  employeeId: 'e1',
  number: '104',
  name: 'Jo Alvarez',
  isActive: true,
  aliases: [],
  rates: [
    { payRateId: 'r2', validFrom: '2027-01-04', wagePerHour: '30.00', burdenPercent: '29.00' },
    { payRateId: 'r1', validFrom: '2026-01-05', wagePerHour: '28.50', burdenPercent: '28.00' },
  ],
};

describe('toEmployeeView', () => {
  it('shows what an hour costs today and how that is made', () => {
    const { current } = toEmployeeView(employee, '2026-12-01', 'USD');
    expect(current).toMatchObject({
      payRateId: 'r1',
      loaded: '36.48',
      workings: '$28.50 × 1.28',
      state: 'current',
    });
  });

  it('has no rate of today for somebody who has not begun, and lists what is to come', () => {
    const view = toEmployeeView(employee, '2025-12-31', 'USD');
    expect(view.current).toBeUndefined();
    expect(view.rates.map(({ state }) => state)).toEqual(['to come', 'to come']);
  });
});
