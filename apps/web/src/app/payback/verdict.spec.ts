import { makePayback } from './payback-fixture';
import { findEarlyCaution, findVerdictState, toChartSummary, toMonthHeading, toPaceWindow } from './verdict';

const noData = { date: null, method: 'no-data' } as const;

describe('findVerdictState', () => {
  it('tells a machine without cost from one without work', () => {
    expect(findVerdictState(makePayback({ breakEven: noData, outlay: '0.00' }))).toBe('no-outlay');
    expect(findVerdictState(makePayback({ breakEven: noData, asOf: null }))).toBe('not-rolled-up');
    expect(findVerdictState(makePayback())).toBe('straight-line');
  });
});

describe('toPaceWindow', () => {
  it('says what the pace was taken from', () => {
    expect(toPaceWindow(182)).toBe('the last 26 weeks');
    expect(toPaceWindow(40)).toBe('its first 40 days');
    expect(toPaceWindow(1)).toBe('its first day');
  });
});

describe('findEarlyCaution', () => {
  it('warns of a pace from fewer than eight weeks, and only of a pace', () => {
    expect(findEarlyCaution(makePayback({ paceDays: 55 }))).toContain('55 days only');
    expect(findEarlyCaution(makePayback({ paceDays: 56 }))).toBeNull();
    const reached = { date: '2026-04-01', method: 'reached' } as const;
    expect(findEarlyCaution(makePayback({ paceDays: 20, breakEven: reached }))).toBeNull();
  });
});

describe('toChartSummary', () => {
  const plain = (amount: string) => amount;

  it('says the same as the chart', () => {
    expect(toChartSummary(makePayback(), plain)).toBe(
      'Net cash stands at -18098.00 on November 24, 2026; a straight line from there reaches even on May 14, 2027.',
    );
    const never = { date: null, method: 'not-at-this-pace' } as const;
    expect(toChartSummary(makePayback({ breakEven: never }), plain)).toMatch(/even is not in sight\.$/);
    expect(toChartSummary(makePayback({ curve: [] }), plain)).toBe('There is nothing to draw yet.');
  });
});

describe('toMonthHeading', () => {
  it('says so while the month is not over', () => {
    expect(toMonthHeading('2026-11', '2026-11-26')).toBe('November 2026 so far');
    expect(toMonthHeading('2026-11', '2026-11-30')).toBe('November 2026');
    expect(toMonthHeading('2028-02', '2028-02-28')).toBe('February 2028 so far');
  });
});
