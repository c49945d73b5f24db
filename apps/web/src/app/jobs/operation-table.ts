import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { type Figure as FigureName, type FigureRef, type JobDetail } from '@brakeven/contract';
import { Figure } from '@brakeven/ui';

/** What each operation has taken of a job. */
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
                <td class="number">
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
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class OperationTable {
  readonly job = input.required<JobDetail>();

  protected readonly columns = computed(() =>
    this.job().total === undefined ? HOURS : [...HOURS, ...MONEY],
  );

  protected ref(figure: FigureName, operationId: string): FigureRef {
    return { figure, jobId: this.job().jobId, operationId };
  }
}

const HOURS = [
  { field: 'hours', figure: 'job.hours', word: 'Hours', unit: 'hours' },
  { field: 'machineHours', figure: 'job.machineHours', word: 'Machine hours', unit: 'hours' },
] as const;

const MONEY = [
  { field: 'labour', figure: 'job.labour', word: 'Labour', unit: 'money' },
  { field: 'machine', figure: 'job.machine', word: 'Machine', unit: 'money' },
  { field: 'overhead', figure: 'job.overhead', word: 'Overhead', unit: 'money' },
  { field: 'total', figure: 'job.total', word: 'Cost', unit: 'money' },
] as const;
