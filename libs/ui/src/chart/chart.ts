import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { type FigureRef } from '@brakeven/contract';
import { type EChartsCoreOption } from 'echarts/core';
import { NgxEchartsDirective, provideEchartsCore } from 'ngx-echarts';
import { Figure, type FigureUnit } from '../figure/figure';
import { type ChartPalette, ChartPaletteSource } from './chart-palette';

/** What a chart draws; made anew for each change, never altered. */
export type ChartOption = EChartsCoreOption;

/** The chart's facts as a table, for those who cannot see it or want the numbers. */
export interface ChartTable {
  headers: readonly string[];
  rows: readonly (readonly ChartCell[])[];
}

/** Words, or a figure that opens. */
export type ChartCell = string | ChartFigure;

export interface ChartFigure {
  value: string;
  unit?: FigureUnit;
  ref: FigureRef;
}

let count = 0;

/** A chart with a title, a sentence that says the same, and its numbers as a table on demand. */
@Component({
  selector: 'app-chart',
  imports: [Figure, NgxEchartsDirective],
  providers: [provideEchartsCore({ echarts: () => import('./echarts-parts') })],
  templateUrl: './chart.html',
  styleUrl: './chart.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Chart {
  private readonly palette = inject(ChartPaletteSource).palette;

  readonly title = input.required<string>();
  /** What the chart says, in a sentence. */
  readonly summary = input.required<string>();
  /** Builds the option from the colours of the theme. */
  readonly build = input.required<(palette: ChartPalette) => ChartOption>();
  readonly table = input.required<ChartTable>();
  readonly heightPx = input(280);

  protected readonly option = computed(() => this.build()(this.palette()));
  protected readonly isTable = signal(false);
  protected readonly id = `chart-${++count}`;

  protected toFigure(cell: ChartCell): ChartFigure | null {
    return typeof cell === 'string' ? null : cell;
  }
}
