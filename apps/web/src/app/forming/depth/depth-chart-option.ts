import { type ChartOption, type ChartPalette } from '@brakeven/ui';
import { type UnitSystem } from '@brakeven/values';
import { LENGTH_UNIT_OF, toLengthNumber } from '../forming-words';
import { type CurvePoint } from './depth-curve';

/** A bend on the chart. */
export interface ChartBend {
  depthMm: number;
  insideAngle: number;
  kind: 'measured' | 'full length' | 'outlier';
}

export interface DepthChartFacts {
  curve: readonly CurvePoint[];
  bends: readonly ChartBend[];
  /** The depth asked for and its angle; null if there is no answer. */
  answer: { depthMm: number; insideAngle: number } | null;
  units: UnitSystem;
}

/** How each kind of bend is marked: by shape as well as by colour. */
const MARKS = [
  { kind: 'measured', symbol: 'circle', symbolSize: 9, isFilled: false },
  { kind: 'full length', symbol: 'rect', symbolSize: 10, isFilled: true },
  { kind: 'outlier', symbol: 'diamond', symbolSize: 13, isFilled: true },
] as const;

/** Inside angle over ram depth: the fitted curve in its band, the bends that were made, and the answer. */
export function toDepthChartOption(facts: DepthChartFacts, palette: ChartPalette): ChartOption {
  const { curve, bends, units } = facts;
  const scale = units === 'us' ? 25.4 : 1;
  const at = (millimetres: number) => millimetres / scale;
  const line = (name: string, pick: (point: CurvePoint) => number, style: object) => ({
    name,
    type: 'line',
    data: curve.map((point) => [at(point.depthMm), pick(point)]),
    showSymbol: false,
    silent: true,
    lineStyle: { width: 0 },
    ...style,
  });
  return {
    animation: false,
    textStyle: { fontFamily: 'Roboto, sans-serif', color: palette.inkMuted },
    grid: {
      left: 8,
      right: 20,
      top: 18,
      bottom: 26,
      outerBoundsMode: 'same',
      outerBoundsContain: 'axisLabel',
    },
    xAxis: {
      type: 'value',
      scale: true,
      name: `reading of the ram, ${LENGTH_UNIT_OF[units]}`,
      nameLocation: 'middle',
      nameGap: 26,
      axisLine: { show: false },
      axisTick: { show: false },
      splitLine: { lineStyle: { color: palette.line } },
      axisLabel: { color: palette.inkMuted, hideOverlap: true },
    },
    yAxis: {
      type: 'value',
      scale: true,
      splitLine: { lineStyle: { color: palette.line } },
      axisLabel: { color: palette.inkMuted, formatter: '{value}°' },
    },
    series: [
      line('low', ({ low }) => low, { stack: 'band', stackStrategy: 'all' }),
      line('band', ({ low, high }) => high - low, {
        stack: 'band',
        stackStrategy: 'all',
        areaStyle: { color: palette.layoutBlue, opacity: 0.22 },
      }),
      line('fitted', ({ insideAngle }) => insideAngle, {
        lineStyle: { width: 1.5, color: palette.layoutBlue },
        markLine: toAnswerLines(facts, at, palette),
      }),
      ...MARKS.map(({ kind, symbol, symbolSize, isFilled }) => ({
        name: kind,
        type: 'line',
        data: bends.filter((bend) => bend.kind === kind).map((bend) => [at(bend.depthMm), bend.insideAngle]),
        symbol,
        symbolSize,
        showSymbol: true,
        lineStyle: { width: 0 },
        itemStyle: toMarkStyle(kind, isFilled, palette),
      })),
    ],
  };
}

function toMarkStyle(kind: ChartBend['kind'], isFilled: boolean, palette: ChartPalette): object {
  const borderColor = kind === 'outlier' ? palette.rust : palette.layoutBlue;
  return { color: isFilled ? borderColor : palette.sheet, borderColor, borderWidth: 2 };
}

function toAnswerLines(
  { answer, units }: DepthChartFacts,
  at: (millimetres: number) => number,
  palette: ChartPalette,
): object | undefined {
  if (!answer) return undefined;
  const lineStyle = { color: palette.brass, type: [4, 4], width: 1.5 };
  const words = `${toLengthNumber(answer.depthMm, units)} → ${answer.insideAngle.toFixed(1)}°`;
  return {
    symbol: 'none',
    silent: true,
    // Lines would be rounded to two decimals, off the curve.
    precision: 6,
    data: [
      {
        xAxis: at(answer.depthMm),
        lineStyle,
        label: { formatter: words, position: 'insideEndTop', rotate: 0, color: palette.brass, distance: 6 },
      },
      { yAxis: answer.insideAngle, lineStyle, label: { show: false } },
    ],
  };
}
