import { type Payback } from '@brakeven/contract';
import {
  addDays,
  addYears,
  daysBetween,
  formatLocalDate,
  type LocalDate,
  monthOf,
  toLocalDate,
} from '@brakeven/values';
import { type ChartOption, type ChartPalette, type ChartTable } from '@brakeven/ui';
import { toNetCashRef } from './payback-refs';

type Point = [on: string, netCash: number];

/** Beyond this the actual line would shrink to nothing; a later break-even is told in words. */
const YEARS_AHEAD_MAX = 4;

export interface PaybackChartFacts {
  payback: Payback;
  today: LocalDate;
  currency: string;
}

/** Cumulative net cash: what was, the straight line on from it, and the line of even. */
export function toPaybackChartOption(facts: PaybackChartFacts, palette: ChartPalette): ChartOption {
  const { payback, currency } = facts;
  const continuation = toContinuation(payback);
  return {
    animation: false,
    textStyle: { fontFamily: 'Roboto, sans-serif', color: palette.inkMuted },
    grid: {
      left: 8,
      right: 28,
      top: 28,
      bottom: 4,
      outerBoundsMode: 'same',
      outerBoundsContain: 'axisLabel',
    },
    tooltip: toTooltip(palette, currency),
    xAxis: {
      type: 'time',
      min: findFirstDay(facts),
      max: findLastDay(facts),
      axisLine: { show: false },
      axisTick: { show: false },
      splitLine: { show: false },
      axisLabel: { color: palette.inkMuted, hideOverlap: true },
    },
    yAxis: {
      type: 'value',
      max: ({ min, max }: { min: number; max: number }) => Math.max(max, 0) + (max - min) * 0.1 || 1,
      splitLine: { showMaxLine: false, lineStyle: { color: palette.line } },
      axisLabel: {
        color: palette.inkMuted,
        showMaxLabel: false,
        formatter: (amount: number) => (amount === 0 ? 'even' : toAxisText(amount, currency)),
      },
    },
    series: [toActualSeries(facts, palette), toContinuationSeries(payback, continuation, palette)],
  };
}

/** The curve at the end of each month, for reading. */
export function toPaybackTable(payback: Payback): ChartTable {
  const byMonth = new Map(payback.curve.map((point) => [monthOf(toLocalDate(point.on)), point]));
  return {
    headers: ['Month', 'Last day with work', 'Cumulative net cash'],
    rows: [...byMonth.values()].map(({ on, netCash }) => [
      formatLocalDate(toLocalDate(on), 'monthYear'),
      formatLocalDate(toLocalDate(on)),
      { value: netCash, ref: toNetCashRef(payback.machine.machineId, on) },
    ]),
  };
}

/** From the last day with costs straight to even; empty if even is reached or out of sight. */
export function toContinuation({ curve, breakEven, remaining, asOf }: Payback): Point[] {
  if (breakEven.method !== 'straight-line' || !breakEven.date || !asOf || curve.length === 0) return [];
  return [
    [asOf, -Number(remaining)],
    [breakEven.date, 0],
  ];
}

function toActualSeries({ payback, today }: PaybackChartFacts, palette: ChartPalette): object {
  const points = toPoints(payback);
  const last = points.at(-1);
  if (last && payback.asOf && payback.asOf > last[0]) points.push([payback.asOf, last[1]]);
  const { date, method } = payback.breakEven;
  return {
    name: 'Actual',
    type: 'line',
    data: points,
    showSymbol: false,
    lineStyle: { color: palette.layoutBlue, width: 2.5 },
    itemStyle: { color: palette.layoutBlue },
    areaStyle: { color: palette.layoutBlueTint, opacity: 0.6, origin: 'start' },
    markLine: toReferenceLines(today, palette),
    markPoint: method === 'reached' && date ? toEvenMark(date, palette) : undefined,
  };
}

/** The curve, level from the day in service up to the first day with work. */
function toPoints({ curve }: Payback): Point[] {
  const points: Point[] = curve.map(({ on, netCash }) => [on, Number(netCash)]);
  const [inService, firstWork] = points;
  if (!inService || !firstWork) return points;
  const dayBefore = addDays(toLocalDate(firstWork[0]), -1);
  return dayBefore > inService[0] ? [inService, [dayBefore, inService[1]], ...points.slice(1)] : points;
}

function toContinuationSeries({ breakEven }: Payback, points: Point[], palette: ChartPalette): object {
  return {
    name: 'Straight line',
    type: 'line',
    data: points,
    showSymbol: false,
    lineStyle: { color: palette.layoutBlue, width: 2, type: [3, 5] },
    itemStyle: { color: palette.layoutBlue },
    markPoint: points.length > 0 && breakEven.date ? toEvenMark(breakEven.date, palette) : undefined,
  };
}

function toReferenceLines(today: LocalDate, palette: ChartPalette): object {
  return {
    symbol: 'none',
    silent: true,
    animation: false,
    data: [
      {
        yAxis: 0,
        lineStyle: { color: palette.ink, width: 1.5, type: 'solid' },
        label: { show: false },
      },
      {
        xAxis: today,
        lineStyle: { color: palette.inkMuted, width: 1, type: [2, 3] },
        label: { formatter: 'today', position: 'end', color: palette.inkMuted },
      },
    ],
  };
}

function toEvenMark(date: string, palette: ChartPalette): object {
  return {
    symbol: 'circle',
    symbolSize: 12,
    silent: true,
    itemStyle: { color: palette.sheet, borderColor: palette.layoutBlue, borderWidth: 3 },
    label: {
      formatter: `even, ${formatLocalDate(toLocalDate(date), 'medium')}`,
      position: 'top',
      distance: 8,
      offset: [-36, 0],
      color: palette.layoutBlue,
      fontWeight: 500,
      // So that the line of today does not strike it through.
      backgroundColor: palette.sheet,
      padding: [1, 4],
    },
    data: [{ coord: [date, 0] }],
  };
}

function toTooltip(palette: ChartPalette, currency: string): object {
  const money = new Intl.NumberFormat('en-US', { style: 'currency', currency });
  return {
    trigger: 'axis',
    backgroundColor: palette.sheet,
    borderColor: palette.line,
    textStyle: { color: palette.ink },
    valueFormatter: (amount: unknown) => money.format(Number(amount)),
  };
}

/** The day in service; the first day with work, if the machine was in service long before anybody logged hours. */
function findFirstDay({
  payback,
  today,
}: Pick<PaybackChartFacts, 'payback' | 'today'>): LocalDate | undefined {
  const [inService, firstWork] = payback.curve.map(({ on }) => toLocalDate(on));
  if (!inService || !firstWork) return inService;
  const idleDays = daysBetween(inService, firstWork);
  return idleDays > daysBetween(firstWork, today) ? addDays(firstWork, -1) : inService;
}

function findLastDay(facts: PaybackChartFacts): LocalDate {
  const { payback, today } = facts;
  const even = payback.breakEven.date;
  const end = even && even > today ? toLocalDate(even) : today;
  const limit = addYears(today, YEARS_AHEAD_MAX);
  const first = findFirstDay(facts) ?? today;
  // Room for the words beside the last mark.
  return end < limit ? addDays(end, Math.ceil(daysBetween(first, end) * 0.08)) : limit;
}

function toAxisText(amount: number, currency: string): string {
  const format = new Intl.NumberFormat('en-US', {
    style: 'currency',
    currency,
    notation: 'compact',
    minimumFractionDigits: 0,
    maximumFractionDigits: 1,
    signDisplay: 'exceptZero',
  });
  return format.format(amount).replace('-', '−');
}
