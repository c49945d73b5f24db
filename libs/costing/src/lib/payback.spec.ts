import { addDays, moneyText, toLocalDate, toMoney } from '@brakeven/values';
import { computePayback, PACE_DAYS_MAX, type PaybackDay, type PaybackInput } from './payback';

const start = toLocalDate('2026-01-01');

/** A day that earned so much and cost a third of `cost` in labour, the rest in running cost. */
function dayOf(workedOn: string, earned: string, cost = '0'): PaybackDay {
  const operatorLabour = toMoney(toMoney(cost).div(3));
  return {
    workedOn: toLocalDate(workedOn),
    earned: toMoney(earned),
    operatorLabour,
    running: toMoney(toMoney(cost).minus(operatorLabour)),
  };
}

function paybackOf(
  input: Partial<Omit<PaybackInput, 'outlay' | 'asOf'>> & { outlay?: string; asOf?: string | null },
) {
  const { outlay = '1000', asOf = '2026-01-10', ...rest } = input;
  return computePayback({
    days: [],
    inServiceOn: start,
    ...rest,
    outlay: toMoney(outlay),
    asOf: asOf === null ? null : toLocalDate(asOf),
  });
}

describe('the parts of a payback', () => {
  const payback = paybackOf({
    days: [dayOf('2026-01-05', '400', '100'), dayOf('2026-01-02', '250.50', '80.25')],
  });

  it('add up: earned − running cost = earned back, outlay − earned back = remaining', () => {
    expect(moneyText(payback.earned)).toBe('650.50');
    expect(moneyText(payback.operatorLabour)).toBe('60.08');
    expect(moneyText(payback.running)).toBe('120.17');
    expect(moneyText(payback.runningCost)).toBe('180.25');
    expect(moneyText(payback.earnedBack)).toBe('470.25');
    expect(moneyText(payback.remaining)).toBe('529.75');
  });

  it('draw the curve by date, whatever the order of days', () => {
    expect(payback.curve.map((point) => [point.date, moneyText(point.net)])).toEqual([
      ['2026-01-02', '170.25'],
      ['2026-01-05', '470.25'],
    ]);
  });

  it('take the pace from the days in service while they are fewer than 182', () => {
    // 470.25 in 10 days: 329.175 a week
    expect(payback.paceWindow).toEqual({
      from: '2026-01-01',
      to: '2026-01-10',
      days: 10,
      net: toMoney('470.25'),
    });
    expect(payback.pacePerWeek && moneyText(payback.pacePerWeek)).toBe('329.18');
  });

  it('draw the straight line at the unrounded pace, whole days, up', () => {
    // 529.75 ÷ 47.025 = 11.27 days after 10 January
    expect(payback.breakEven).toEqual({ date: '2026-01-22', method: 'straight-line' });
  });

  it('leave out days before service and after the day costed', () => {
    const same = paybackOf({
      days: [
        dayOf('2025-12-31', '9999'),
        dayOf('2026-01-05', '400', '100'),
        dayOf('2026-01-02', '250.50', '80.25'),
        dayOf('2026-01-11', '9999'),
      ],
    });
    expect(same).toEqual(payback);
  });

  it('show a loss as such: earned back below nought, remaining above the outlay', () => {
    const loss = paybackOf({ days: [dayOf('2026-01-05', '100', '160')] });
    expect(moneyText(loss.earnedBack)).toBe('-60.00');
    expect(moneyText(loss.remaining)).toBe('1060.00');
    expect(loss.breakEven).toEqual({ date: null, method: 'not-at-this-pace' });
  });
});

describe('break-even', () => {
  it('is reached on the first day that covers the outlay to the cent', () => {
    const days = [dayOf('2026-01-02', '999.99'), dayOf('2026-01-03', '0.01'), dayOf('2026-01-04', '500')];
    const payback = paybackOf({ days });
    expect(payback.breakEven).toEqual({ date: '2026-01-03', method: 'reached' });
    expect(moneyText(payback.remaining)).toBe('0.00');
  });

  it('stays reached when a later day loses', () => {
    const payback = paybackOf({ days: [dayOf('2026-01-02', '1000'), dayOf('2026-01-03', '0', '50')] });
    expect(payback.breakEven).toEqual({ date: '2026-01-02', method: 'reached' });
    expect(moneyText(payback.remaining)).toBe('50.00');
  });

  it('falls on a whole day exactly where the pace divides what remains', () => {
    // 500 in 10 days; 500 remain: 10 days more
    expect(paybackOf({ days: [dayOf('2026-01-04', '500')] }).breakEven.date).toBe('2026-01-20');
    // one cent more takes one day more
    expect(paybackOf({ outlay: '1000.01', days: [dayOf('2026-01-04', '500')] }).breakEven.date).toBe(
      '2026-01-21',
    );
  });

  it('uses the last 182 days alone once there are more', () => {
    const asOf = addDays(start, 299);
    const windowStart = addDays(asOf, 1 - PACE_DAYS_MAX);
    const days = [dayOf(addDays(windowStart, -1), '5000'), dayOf(windowStart, '100'), dayOf(asOf, '82')];
    const payback = paybackOf({ outlay: '6000', days, asOf });
    expect(payback.paceWindow).toEqual({ from: windowStart, to: asOf, days: 182, net: toMoney('182') });
    // 818 remain at 1 a day
    expect(payback.breakEven).toEqual({ date: addDays(asOf, 818), method: 'straight-line' });
    expect(payback.pacePerWeek && moneyText(payback.pacePerWeek)).toBe('7.00');
  });

  it('has no date where the last 182 days earned nothing, however good the days before', () => {
    const payback = paybackOf({ days: [dayOf('2026-01-02', '999')], asOf: '2026-12-31' });
    expect(payback.breakEven).toEqual({ date: null, method: 'not-at-this-pace' });
    expect(payback.pacePerWeek && moneyText(payback.pacePerWeek)).toBe('0.00');
  });

  it('has a date up to 20 years ahead, and none beyond', () => {
    // 1 a day; from 10 January 2026 to 10 January 2046 are 7305 days
    const days = [dayOf('2026-01-10', '10')];
    expect(paybackOf({ outlay: '7315', days }).breakEven).toEqual({
      date: '2046-01-10',
      method: 'straight-line',
    });
    expect(paybackOf({ outlay: '7315.01', days }).breakEven).toEqual({
      date: null,
      method: 'not-at-this-pace',
    });
  });

  it.each([
    ['nothing has been costed', { asOf: null, days: [dayOf('2026-01-02', '10')] }],
    ['the machine is not in service', { inServiceOn: null, days: [dayOf('2026-01-02', '10')] }],
    [
      'the machine goes into service later',
      { inServiceOn: addDays(start, 90), days: [dayOf('2026-01-02', '10')] },
    ],
    ['there are no hours on it', { days: [] }],
    ['there is no outlay', { outlay: '0', days: [dayOf('2026-01-02', '10')] }],
  ])('knows no date while %s', (_why, input) => {
    expect(paybackOf(input).breakEven).toEqual({ date: null, method: 'no-data' });
  });

  it('has no pace and no curve without figures', () => {
    expect(paybackOf({ asOf: null })).toMatchObject({ pacePerWeek: null, paceWindow: null, curve: [] });
  });
});
