import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { type JobDetail } from '@brakeven/contract';
import { Chart, type ChartPalette, SHOP_FORMAT } from '@brakeven/ui';
import {
  toCategoryChartOption,
  toCategorySummary,
  toCategoryTable,
  toWeekChartOption,
  toWeekTable,
} from './job-chart-options';

/** The picture of a job: by category and by week. */
@Component({
  selector: 'app-job-charts',
  imports: [Chart],
  template: `
    @if (hasMoney()) {
      <app-chart
        class="card"
        title="By category"
        [summary]="categorySummary()"
        [build]="buildCategories()"
        [table]="categoryTable()"
        [heightPx]="190"
      />
    }
    <app-chart
      class="card"
      [title]="hasMoney() ? 'Cost by week' : 'Hours by week'"
      [summary]="weekSummary()"
      [build]="buildWeeks()"
      [table]="weekTable()"
      [heightPx]="190"
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
  protected readonly categoryTable = computed(() => toCategoryTable(this.job(), this.currency()));
  protected readonly weekTable = computed(() => toWeekTable(this.job(), this.currency()));
  protected readonly weekSummary = computed(() => {
    const weeks = this.job().byWeek.length;
    return `${weeks} ${weeks === 1 ? 'week' : 'weeks'} with work; the table has the numbers.`;
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
