import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { type Figure as FigureName, type FigureRef, type JobDetail } from '@brakeven/contract';
import { Figure } from '@brakeven/ui';

/** What each operation has taken of a job, its hours beside the estimated ones. */
@Component({
  selector: 'app-operation-table',
  imports: [Figure],
  template: `
    <h2>By operation</h2>
    <div class="scroll-x" tabindex="0" role="region" aria-label="By operation">
      <table class="figures">
        <thead>
          <tr>
            <th scope="col">Operation</th>
            @for (column of columns(); track column.figure) {
              <th scope="col" class="number">{{ column.word }}</th>
            }
          </tr>
        </thead>
        <tbody>
          @for (row of job().byOperation; track row.operationId) {
            <tr>
              <th scope="row">{{ row.operation }}</th>
              @for (column of columns(); track column.figure) {
                <td class="number" [class.over]="column.field === 'hours' && isOver(row)">
                  <app-figure
                    [value]="row[column.field]"
                    [unit]="column.unit"
                    [ref]="ref(column.figure, row.operationId)"
                    [label]="column.word + ' of ' + row.operation"
                  />
                </td>
              }
            </tr>
          }
        </tbody>
      </table>
    </div>
  `,
  styles: `
    .over {
      color: var(--rust-text);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class OperationTable {
  readonly job = input.required<JobDetail>();

  protected readonly columns = computed<readonly Column[]>(() => {
    const { total, overtime, comparison } = this.job();
    if (total === undefined) return HOURS;
    const money = MONEY.filter(({ field }) => field !== 'overtime' || Number(overtime ?? 0) !== 0);
    return [...(comparison ? [ESTIMATED] : []), ...HOURS, ...money];
  });

  /** More hours than the estimate has for it; the numbers beside each other say it. */
  protected isOver({ hours, estimatedHours }: OperationRow): boolean {
    return estimatedHours !== undefined && Number(hours) > Number(estimatedHours);
  }

  protected ref(figure: FigureName, operationId: string): FigureRef {
    return { figure, jobId: this.job().jobId, operationId };
  }
}

type OperationRow = JobDetail['byOperation'][number];

interface Column {
  field: Exclude<keyof OperationRow, 'operationId' | 'operation'>;
  figure: FigureName;
  word: string;
  unit: 'hours' | 'money';
}

const ESTIMATED: Column = {
  field: 'estimatedHours',
  figure: 'estimate.hours',
  word: 'Estimated hours',
  unit: 'hours',
};

const HOURS: readonly Column[] = [
  { field: 'hours', figure: 'job.hours', word: 'Hours', unit: 'hours' },
  { field: 'machineHours', figure: 'job.machineHours', word: 'Machine hours', unit: 'hours' },
];

const MONEY: readonly Column[] = [
  { field: 'labour', figure: 'job.labour', word: 'Labour', unit: 'money' },
  { field: 'overtime', figure: 'job.overtime', word: 'Overtime', unit: 'money' },
  { field: 'machine', figure: 'job.machine', word: 'Machine', unit: 'money' },
  { field: 'overhead', figure: 'job.overhead', word: 'Overhead', unit: 'money' },
  { field: 'total', figure: 'job.total', word: 'Cost', unit: 'money' },
];
