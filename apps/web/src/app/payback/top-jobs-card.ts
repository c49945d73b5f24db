import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { type FigureRef, type Payback } from '@brakeven/contract';
import { EmptyState, Figure } from '@brakeven/ui';
import { toJobShareRef, toPaybackRef } from './payback-refs';

/** The jobs that have added most to the payback; one of them may still have lost money as a whole. */
@Component({
  selector: 'app-top-jobs-card',
  imports: [EmptyState, Figure, RouterLink],
  template: `
    <h2>Jobs whose machine hours paid most</h2>
    @if (payback().topJobs.length > 0) {
      <table class="figures">
        <tbody>
          @for (job of payback().topJobs; track job.jobId) {
            <tr>
              <th scope="row">
                <a [routerLink]="['/jobs', job.jobId]">{{ job.number }}</a> {{ job.title }}
                @if (job.loss; as loss) {
                  <p class="loss">
                    the job as a whole lost
                    <app-figure
                      [value]="loss"
                      [ref]="{ figure: 'job.margin', jobId: job.jobId }"
                      [label]="'Loss of job ' + job.number"
                    />
                  </p>
                }
              </th>
              <td class="number">
                <app-figure [value]="job.net" [ref]="ref(job.jobId)" [label]="'Net of job ' + job.number" />
              </td>
            </tr>
          }
          @if (payback().otherJobs.jobs > 0) {
            <tr class="muted">
              <th scope="row">
                {{ payback().otherJobs.jobs }} more {{ payback().otherJobs.jobs === 1 ? 'job' : 'jobs' }}
              </th>
              <td class="number">
                <app-figure
                  [value]="payback().otherJobs.net"
                  [ref]="othersRef()"
                  label="Net of the other jobs"
                />
              </td>
            </tr>
          }
        </tbody>
      </table>
    } @else {
      <app-empty-state
        title="No job has run on it yet"
        text="Hours on the machine from its first day in service appear here once they are rolled up."
      />
    }
  `,
  styles: `
    :host {
      display: block;
    }

    .loss {
      margin: 2px 0 0;
      color: var(--rust-text);
      font: var(--mat-sys-body-small);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TopJobsCard {
  readonly payback = input.required<Payback>();
  protected readonly othersRef = computed(() =>
    toPaybackRef('payback.otherJobs', this.payback().machine.machineId),
  );

  protected ref(jobId: string): FigureRef {
    return toJobShareRef(this.payback().machine.machineId, jobId);
  }
}
