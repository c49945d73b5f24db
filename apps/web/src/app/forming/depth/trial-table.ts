import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { type DepthFit, type TrialBendDto } from '@brakeven/contract';
import { LocalDatePipe, SHOP_FORMAT, StatusTag } from '@brakeven/ui';
import { toAngleWords, toLengthWords, toNumberWords, toSizeWords } from '../forming-words';

/** The trial bends with how far each lies from the fit, and from the fit of the others. */
@Component({
  selector: 'app-trial-table',
  imports: [LocalDatePipe, StatusTag],
  template: `
    <div class="scroll-x" tabindex="0" role="region" aria-label="Table of trial bends">
      <table class="figures">
        <thead>
          <tr>
            <th scope="col">Bent on</th>
            <th scope="col">By</th>
            <th scope="col" class="number">Opening</th>
            <th scope="col" class="number">Thickness</th>
            <th scope="col" class="number">Strip width</th>
            <th scope="col" class="number">Reading</th>
            <th scope="col" class="number">Angle</th>
            <th scope="col" class="number">Error</th>
            <th scope="col" class="number">Left out</th>
            <th scope="col"><span class="visually-hidden">Remarks and actions</span></th>
          </tr>
        </thead>
        <tbody>
          @for (row of rows(); track row.trial.trialBendId) {
            <tr>
              <th scope="row" class="date">{{ row.trial.bentOn | localDate }}</th>
              <td>{{ row.trial.bentBy }}</td>
              <td class="number">{{ row.opening }}</td>
              <td class="number">{{ row.thickness }}</td>
              <td class="number">{{ row.width }}</td>
              <td class="number">{{ row.depth }}</td>
              <td class="number">{{ row.angle }}</td>
              <td class="number">{{ row.error }}</td>
              <td class="number">{{ row.looError }}</td>
              <td class="end">
                @if (row.isOutlier) {
                  <app-status-tag word="outlier" tone="loss" />
                }
                @if (row.trial.isFullLength) {
                  <app-status-tag [word]="row.isCorrection ? 'sets the datum' : 'full length'" tone="blue" />
                }
                @if (canVoid()) {
                  <button type="button" class="button quiet" (click)="voided.emit(row.trial)">Void</button>
                }
              </td>
            </tr>
          }
        </tbody>
      </table>
    </div>
    <p class="small">
      Errors are measured less fitted inside angle; ‘left out’ is against a fit without that bend.
    </p>
  `,
  styles: `
    table {
      min-width: 700px;
    }
    td {
      white-space: nowrap;
    }
    .end {
      text-align: right;
      white-space: nowrap;
    }
    .small {
      margin-top: 8px;
      color: var(--ink-muted);
      font-size: 12.5px;
    }
    @media print {
      table {
        min-width: 0;
      }
      button {
        display: none;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TrialTable {
  private readonly format = inject(SHOP_FORMAT);
  readonly trials = input.required<readonly TrialBendDto[]>();
  readonly bends = input.required<DepthFit['bends']>();
  readonly correctedBy = input.required<string | null>();
  readonly canVoid = input(false);
  readonly voided = output<TrialBendDto>();

  protected readonly rows = computed(() => {
    const { units } = this.format();
    return this.trials().map((trial) => {
      const bend = this.bends().find(({ trialBendId }) => trialBendId === trial.trialBendId);
      return {
        trial,
        opening: toSizeWords(Number(trial.openingMm), units),
        thickness: toSizeWords(Number(trial.thicknessMm), units),
        width: trial.stripWidthMm === null ? '–' : toSizeWords(Number(trial.stripWidthMm), units),
        depth: toLengthWords(Number(trial.depthMm), units),
        angle: toAngleWords(Number(trial.measuredAngle)),
        error: toErrorWords(bend?.error ?? null),
        looError: toErrorWords(bend?.looError ?? null),
        isOutlier: bend?.isOutlier ?? false,
        isCorrection: trial.trialBendId === this.correctedBy(),
      };
    });
  });
}

function toErrorWords(degrees: number | null): string {
  if (degrees === null) return '–';
  return `${degrees >= 0.005 ? '+' : ''}${toNumberWords(degrees, 2)}°`;
}
