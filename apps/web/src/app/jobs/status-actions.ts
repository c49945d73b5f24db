import { ChangeDetectionStrategy, Component, computed, inject, input, output, signal } from '@angular/core';
import { type JobDetail, type JobStatus } from '@brakeven/contract';
import { JobsApi } from '../api/jobs-api';
import { toShownProblem } from '../api/problem-text';
import { Notifier } from '../shell/notifier';
import { findStatusSteps, type StatusStep } from './job-status';

/** The steps that a job can take from where it stands; each can be taken back. */
@Component({
  selector: 'app-status-actions',
  template: `
    @for (step of steps(); track step.to) {
      <button type="button" class="button" [disabled]="isBusy()" (click)="take(step)">
        {{ step.label }}
      </button>
    }
  `,
  styles: `
    :host {
      display: contents;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class StatusActions {
  private readonly api = inject(JobsApi);
  private readonly notifier = inject(Notifier);

  readonly job = input.required<JobDetail>();
  readonly changed = output();

  protected readonly isBusy = signal(false);
  protected readonly steps = computed(() => findStatusSteps(this.job()));

  protected take({ to, done }: StatusStep): void {
    const { jobId, number, status } = this.job();
    this.change(jobId, to, () => {
      this.notifier.say(`Job ${number} ${done}.`, () => this.change(jobId, status, () => undefined));
    });
  }

  private change(jobId: string, status: JobStatus, then: () => void): void {
    this.isBusy.set(true);
    this.api.changeStatus(jobId, status).subscribe({
      next: () => {
        this.isBusy.set(false);
        this.changed.emit();
        then();
      },
      error: (error: unknown) => {
        this.isBusy.set(false);
        this.notifier.warn(toShownProblem(error).text);
      },
    });
  }
}
