import { type JobDetail } from '@brakeven/contract';
import { type ChartOption, type ChartPalette, type ChartTable } from '@brakeven/ui';
import { addDays, formatHours, formatLocalDate, formatMoney, toLocalDate } from '@brakeven/values';

type Category = (typeof CATEGORIES)[number]['field'];

const CATEGORIES = [
  { field: 'labour', word: 'Labour' },
  { field: 'overtime', word: 'Overtime' },
  { field: 'machine', word: 'Machine' },
  { field: 'overhead', word: 'Overhead' },
  { field: 'material', word: 'Material' },
  { field: 'outside', word: 'Outside' },
] as const satisfies readonly { field: keyof JobDetail; word: string }[];

/** Categories that a job has, in their order; those that are empty on both sides say nothing. */
function listCategories(job: JobDetail): readonly (typeof CATEGORIES)[number][] {
  return CATEGORIES.filter(
    ({ field }) => Number(job[field] ?? 0) !== 0 || Number(toEstimate(job, field)) !== 0,
  );
}

function toEstimate(job: JobDetail, field: Category): string {
  return job.comparison?.categories.find(({ category }) => category === field)?.estimate ?? '0';
}

/** Cost beside estimate by category, two bars each. */
export function toComparisonChartOption(
  job: JobDetail,
  currency: string,
  palette: ChartPalette,
): ChartOption {
  const categories = listCategories(job);
  const label = {
    show: true,
    position: 'right',
    color: palette.ink,
    formatter: ({ value }: { value: number }) => formatMoney(value.toFixed(2), currency),
  };
  const series = (name: string, values: number[], itemStyle: object) => ({
    name,
    type: 'bar',
    data: values,
    barMaxWidth: 15,
    barGap: '15%',
    silent: true,
    itemStyle: { borderRadius: 2, ...itemStyle },
    label,
  });
  return {
    ...toFrame(palette),
    grid: { left: 0, right: 8, top: 30, bottom: 4, outerBoundsMode: 'same', outerBoundsContain: 'axisLabel' },
    legend: { left: 0, top: 0, itemWidth: 14, textStyle: { color: palette.ink }, selectedMode: false },
    xAxis: { type: 'value', show: false, max: ({ max }: { max: number }) => max * 1.35 || 1 },
    yAxis: {
      type: 'category',
      inverse: true,
      data: categories.map(({ word }) => word),
      axisLine: { show: false },
      axisTick: { show: false },
      axisLabel: { color: palette.ink, fontSize: 13 },
    },
    series: [
      series(
        'Estimate',
        categories.map(({ field }) => Number(toEstimate(job, field))),
        { color: palette.sheet, borderColor: palette.brass, borderWidth: 1.5 },
      ),
      series(
        'Cost',
        categories.map(({ field }) => Number(job[field] ?? 0)),
        { color: palette.layoutBlue },
      ),
    ],
  };
}

/** Cost beside estimate by category, for reading. */
export function toComparisonTable(job: JobDetail): ChartTable {
  const { jobId } = job;
  return {
    headers: ['Category', 'Estimate', 'Cost'],
    rows: listCategories(job).map(({ field, word }) => [
      word,
      field === 'overtime'
        ? '–'
        : { value: toEstimate(job, field), ref: { figure: `estimate.${field}`, jobId } },
      { value: job[field] ?? '0', ref: { figure: `job.${field}`, jobId } },
    ]),
  };
}

/** What the chart of cost beside estimate says. */
export function toComparisonSummary(job: JobDetail, currency: string): string {
  return listCategories(job)
    .map(({ field, word }) => {
      const [cost, estimate] = [job[field] ?? '0', toEstimate(job, field)].map((one) =>
        formatMoney(one, currency),
      );
      return `${word} ${cost}, estimated ${estimate}`;
    })
    .join('; ');
}

/** A job's cost by category, as bars with their share. */
export function toCategoryChartOption(job: JobDetail, currency: string, palette: ChartPalette): ChartOption {
  const bars = listCategories(job).map(({ field }) => ({
    value: Number(job[field] ?? 0),
    itemStyle: { color: palette.layoutBlue },
    label: { formatter: toShareText(job, field, currency) },
  }));
  return {
    ...toFrame(palette),
    xAxis: { type: 'value', show: false, max: ({ max }: { max: number }) => max * 1.9 || 1 },
    yAxis: {
      type: 'category',
      inverse: true,
      data: listCategories(job).map(({ word }) => word),
      axisLine: { show: false },
      axisTick: { show: false },
      axisLabel: { color: palette.ink, fontSize: 13 },
    },
    series: [
      {
        type: 'bar',
        data: bars,
        barWidth: 22,
        silent: true,
        itemStyle: { borderRadius: 2 },
        label: { show: true, position: 'right', color: palette.ink },
      },
    ],
  };
}

/** A job's cost, or its hours where money is not shown, by week. */
export function toWeekChartOption(job: JobDetail, currency: string, palette: ChartPalette): ChartOption {
  const hasMoney = job.total !== undefined;
  const compact = new Intl.NumberFormat('en-US', {
    notation: 'compact',
    ...(hasMoney && { style: 'currency', currency, minimumFractionDigits: 0 }),
  });
  const toAxisText = (value: number) => `${compact.format(value)}${hasMoney ? '' : ' h'}`;
  const toText = (value: unknown) =>
    hasMoney ? formatMoney(Number(value).toFixed(2), currency) : `${formatHours(String(value))} h`;
  return {
    ...toFrame(palette),
    tooltip: {
      trigger: 'axis',
      backgroundColor: palette.sheet,
      borderColor: palette.line,
      textStyle: { color: palette.ink },
      valueFormatter: toText,
    },
    xAxis: {
      type: 'category',
      data: job.byWeek.map(({ weekFrom }) => formatLocalDate(toLocalDate(weekFrom), 'dayMonth')),
      axisLine: { lineStyle: { color: palette.line } },
      axisTick: { show: false },
      axisLabel: { color: palette.inkMuted, hideOverlap: true },
    },
    yAxis: {
      type: 'value',
      splitNumber: 3,
      splitLine: { lineStyle: { color: palette.line } },
      axisLabel: { color: palette.inkMuted, formatter: (value: number) => toAxisText(value) },
    },
    series: [
      {
        name: hasMoney ? 'Cost' : 'Hours',
        type: 'bar',
        data: job.byWeek.map((week) => Number(week.total ?? week.hours)),
        barMaxWidth: 34,
        itemStyle: { color: palette.layoutBlue, borderRadius: [2, 2, 0, 0] },
      },
    ],
  };
}

/** Cost by category, for reading. */
export function toCategoryTable(job: JobDetail): ChartTable {
  return {
    headers: ['Category', 'Cost', 'Share'],
    rows: listCategories(job).map(({ field, word }) => [
      word,
      { value: job[field] ?? '0', ref: { figure: `job.${field}`, jobId: job.jobId } },
      `${toShare(job, field)} %`,
    ]),
  };
}

/** Hours and cost by week, for reading. */
export function toWeekTable(job: JobDetail): ChartTable {
  const hasMoney = job.total !== undefined;
  const toRef = (figure: 'job.hours' | 'job.total', weekFrom: string) => {
    const from = toLocalDate(weekFrom);
    return { figure, jobId: job.jobId, from, to: addDays(from, 6) };
  };
  return {
    headers: ['Week from', 'Hours', ...(hasMoney ? ['Cost'] : [])],
    rows: job.byWeek.map(({ weekFrom, hours, total }) => [
      formatLocalDate(toLocalDate(weekFrom)),
      { value: hours, unit: 'hours' as const, ref: toRef('job.hours', weekFrom) },
      ...(total === undefined ? [] : [{ value: total, ref: toRef('job.total', weekFrom) }]),
    ]),
  };
}

/** What the chart by category says. */
export function toCategorySummary(job: JobDetail, currency: string): string {
  return listCategories(job)
    .map(({ field, word }) => `${word} ${toShareText(job, field, currency)}`)
    .join(', ');
}

function toShareText(job: JobDetail, field: Category, currency: string): string {
  return `${formatMoney(job[field] ?? '0', currency)} · ${toShare(job, field)} %`;
}

/** A whole percentage, only for the eye. */
function toShare(job: JobDetail, field: Category): number {
  const total = Number(job.total ?? 0);
  return total === 0 ? 0 : Math.round((Number(job[field] ?? 0) / total) * 100);
}

function toFrame(palette: ChartPalette): ChartOption {
  return {
    animation: false,
    textStyle: { fontFamily: 'Roboto, sans-serif', color: palette.inkMuted },
    grid: { left: 0, right: 8, top: 14, bottom: 4, outerBoundsMode: 'same', outerBoundsContain: 'axisLabel' },
  };
}
