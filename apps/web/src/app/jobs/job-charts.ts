import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { type JobDetail } from '@brakeven/contract';
import { Chart, type ChartPalette, SHOP_FORMAT } from '@brakeven/ui';
import {
  toCategoryChartOption,
  toCategorySummary,
  toCategoryTable,
  toComparisonChartOption,
  toComparisonSummary,
  toComparisonTable,
  toWeekChartOption,
  toWeekTable,
} from './job-chart-options';

/** The picture of a job: by category and by week. */
@Component({
  selector: 'app-job-charts',
  imports: [Chart],
  template: `
    @if (job().comparison) {
      <app-chart
        class="card"
        title="Cost beside estimate"
        [summary]="comparisonSummary()"
        [build]="buildComparison()"
        [table]="comparisonTable()"
        [heightPx]="heightPx()"
      />
    } @else if (hasMoney()) {
      <app-chart
        class="card"
        title="By category"
        [summary]="categorySummary()"
        [build]="buildCategories()"
        [table]="categoryTable()"
        [heightPx]="heightPx()"
      />
    }
    <app-chart
      class="card"
      [title]="hasMoney() ? 'Cost by week' : 'Hours by week'"
      [summary]="weekSummary()"
      [build]="buildWeeks()"
      [table]="weekTable()"
      [heightPx]="heightPx()"
    />
  `,
  styles: `
    :host {
      display: grid;
      grid-template-columns: repeat(auto-fit, minmax(min(340px, 100%), 1fr));
      gap: 16px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class JobCharts {
  private readonly format = inject(SHOP_FORMAT);

  readonly job = input.required<JobDetail>();

  protected readonly hasMoney = computed(() => this.job().total !== undefined);
  private readonly currency = computed(() => this.format().currency);
  protected readonly categorySummary = computed(() => toCategorySummary(this.job(), this.currency()));
  protected readonly categoryTable = computed(() => toCategoryTable(this.job()));
  protected readonly weekTable = computed(() => toWeekTable(this.job()));
  protected readonly weekSummary = computed(() => {
    const weeks = this.job().byWeek.length;
    return `${weeks} ${weeks === 1 ? 'week' : 'weeks'} with work; the table has the numbers.`;
  });
  /** Room for a pair of bars for each category. */
  protected readonly heightPx = computed(() =>
    this.job().comparison ? Math.max(190, 40 + this.comparisonTable().rows.length * 46) : 190,
  );
  protected readonly comparisonSummary = computed(() => toComparisonSummary(this.job(), this.currency()));
  protected readonly comparisonTable = computed(() => toComparisonTable(this.job()));
  protected readonly buildComparison = computed(() => {
    const [job, currency] = [this.job(), this.currency()];
    return (palette: ChartPalette) => toComparisonChartOption(job, currency, palette);
  });
  protected readonly buildCategories = computed(() => {
    const [job, currency] = [this.job(), this.currency()];
    return (palette: ChartPalette) => toCategoryChartOption(job, currency, palette);
  });
  protected readonly buildWeeks = computed(() => {
    const [job, currency] = [this.job(), this.currency()];
    return (palette: ChartPalette) => toWeekChartOption(job, currency, palette);
  });
}
