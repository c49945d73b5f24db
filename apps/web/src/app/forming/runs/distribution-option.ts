import { type ForceDistribution } from '@brakeven/contract';
import { type ChartOption, type ChartPalette, type ChartTable } from '@brakeven/ui';

type Bin = ForceDistribution['bins'][number];

/** Runs by share of the rating, ten percent a bar, with the shop's line. */
export function toDistributionOption(facts: ForceDistribution, palette: ChartPalette): ChartOption {
  const line = Number(facts.forceLinePercent);
  return {
    animation: false,
    textStyle: { fontFamily: 'Roboto, sans-serif', color: palette.inkMuted },
    grid: {
      left: 8,
      right: 12,
      top: 24,
      bottom: 4,
      outerBoundsMode: 'same',
      outerBoundsContain: 'axisLabel',
    },
    xAxis: {
      type: 'category',
      data: facts.bins.map(toBinWords),
      axisLine: { lineStyle: { color: palette.line } },
      axisTick: { show: false },
      axisLabel: { color: palette.inkMuted, hideOverlap: true },
    },
    yAxis: {
      type: 'value',
      minInterval: 1,
      splitLine: { lineStyle: { color: palette.line } },
      axisLabel: { color: palette.inkMuted },
    },
    series: [
      {
        name: 'runs',
        type: 'bar',
        barCategoryGap: '18%',
        silent: true,
        label: { show: true, position: 'top', color: palette.ink, formatter: toLabel },
        data: facts.bins.map((bin) => ({
          value: bin.runs,
          itemStyle: { color: toColour(bin, line, palette) },
        })),
      },
    ],
  };
}

/** The same as numbers. */
export function toDistributionTable({ bins }: ForceDistribution): ChartTable {
  return {
    headers: ['Share of the rating', 'Runs', 'Strokes'],
    rows: bins.map((bin) => [toBinWords(bin), String(bin.runs), String(bin.strokes)]),
  };
}

/** What the picture says, in a sentence. */
export function toDistributionWords(facts: ForceDistribution): string {
  if (facts.runs === 0) return 'No runs yet.';
  const rated = facts.runs - facts.runsWithoutRating;
  const highest =
    facts.highestShare === null ? '' : ` The heaviest took ${Math.round(facts.highestShare * 100)} %.`;
  return `${facts.runsAboveLine} of ${rated} runs were above the shop’s line of ${Number(facts.forceLinePercent)} %.${highest}`;
}

function toBinWords({ fromPercent, toPercent }: Bin): string {
  return toPercent === null ? `over ${fromPercent} %` : `${fromPercent}–${toPercent} %`;
}

function toLabel({ value }: { value: number }): string {
  return value === 0 ? '' : String(value);
}

function toColour({ fromPercent, toPercent }: Bin, line: number, palette: ChartPalette): string {
  if (toPercent === null) return palette.rust;
  return fromPercent >= line ? palette.brass : palette.layoutBlue;
}
