import { type ChartPalette } from '@brakeven/ui';
import { toLocalDate } from '@brakeven/values';
import { toPaybackChartOption, toPaybackTable, toContinuation } from './payback-chart-option';
import { makePayback } from './payback-fixture';

const palette: ChartPalette = {
  ink: 'ink',
  inkMuted: 'muted',
  line: 'line',
  sheet: 'sheet',
  layoutBlue: 'blue',
  layoutBlueTint: 'tint',
  brass: 'brass',
  patina: 'patina',
  rust: 'rust',
};
interface Series {
  data: [string, number][];
  markPoint?: { data: { coord: [string, number] }[]; label: { formatter: string } };
}
const draw = (change: Parameters<typeof makePayback>[0] = {}, today = '2026-12-01') => {
  const facts = { payback: makePayback(change), today: toLocalDate(today), currency: 'USD' };
  const option = toPaybackChartOption(facts, palette);
  const [actual, straight] = option['series'] as [Series, Series];
  const xAxis = option['xAxis'] as { min: string; max: string };
  const yAxis = option['yAxis'] as { axisLabel: { formatter: (amount: number) => string } };
  return { actual, straight, xAxis, yAxis };
};

describe('toPaybackChartOption', () => {
  it('draws what was up to the day costs are rolled up through', () => {
    expect(draw().actual.data).toEqual([
      ['2026-03-03', -38260],
      ['2026-03-26', -38260],
      ['2026-03-27', -36900.1],
      ['2026-11-24', -18098],
      ['2026-11-26', -18098],
    ]);
  });

  it('begins with the first work where the machine stood in service for years before', () => {
    const { curve } = makePayback();
    const early = curve.map((point, index) => (index === 0 ? { ...point, on: '2018-05-01' } : point));
    expect(draw({ curve: early }).xAxis.min).toBe('2026-03-26');
    expect(draw().xAxis.min).toBe('2026-03-03');
  });

  it('draws the straight line from there to even, and marks the day', () => {
    const { straight, xAxis } = draw();
    expect(straight.data).toEqual([
      ['2026-11-26', -18098],
      ['2027-05-14', 0],
    ]);
    expect(straight.markPoint?.label.formatter).toBe('even, May 14, 2027');
    expect(xAxis.max > '2027-05-14').toBe(true);
  });

  it('marks the day on the actual line once even is reached, and draws no line on', () => {
    const { actual, straight } = draw({ breakEven: { date: '2026-10-02', method: 'reached' } });
    expect(actual.markPoint?.data).toEqual([{ coord: ['2026-10-02', 0] }]);
    expect(straight.data).toEqual([]);
    expect(straight.markPoint).toBeUndefined();
  });

  it('does not stretch to a day many years ahead', () => {
    const { xAxis } = draw({ breakEven: { date: '2044-01-01', method: 'straight-line' } });
    expect(xAxis.max).toBe('2030-12-01');
  });

  it('names the line of even on the axis', () => {
    const { formatter } = draw().yAxis.axisLabel;
    expect([formatter(0), formatter(-20_000), formatter(10_000)]).toEqual(['even', '−$20K', '+$10K']);
  });
});

describe('toContinuation', () => {
  it('is empty when even is not in sight or nothing was rolled up', () => {
    expect(toContinuation(makePayback({ breakEven: { date: null, method: 'not-at-this-pace' } }))).toEqual(
      [],
    );
    expect(toContinuation(makePayback({ curve: [] }))).toEqual([]);
  });
});

describe('toPaybackTable', () => {
  it('keeps the last day of each month', () => {
    const { machineId } = makePayback().machine;
    const netCash = (value: string, to: string) => ({
      value,
      ref: { figure: 'payback.netCash', machineId, to },
    });
    expect(toPaybackTable(makePayback()).rows).toEqual([
      ['March 2026', 'Mar 27, 2026', netCash('-36900.10', '2026-03-27')],
      ['November 2026', 'Nov 24, 2026', netCash('-18098.00', '2026-11-24')],
    ]);
  });
});
