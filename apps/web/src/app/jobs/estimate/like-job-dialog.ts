import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { rxResource, toSignal } from '@angular/core/rxjs-interop';
import { FormControl, ReactiveFormsModule } from '@angular/forms';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { type EstimateDraft, type LikeJob } from '@brakeven/contract';
import { EmptyState, ErrorState, LoadingSkeleton, MoneyPipe } from '@brakeven/ui';
import { debounceTime, map, startWith } from 'rxjs';
import { EstimatesApi } from '../../api/estimates-api';
import { toShownProblem } from '../../api/problem-text';

export interface LikeJobDialogData {
  jobId: string;
  quantity: number | null;
  /** The day whose rates are those of today. */
  on: string;
}

/** A draft, and the job that it was copied from. */
export interface CopiedEstimate {
  from: LikeJob;
  draft: EstimateDraft;
}

const TYPING_PAUSE_MS = 250;

/** Finds a job like this one and copies its estimate, scaled by pieces. */
@Component({
  selector: 'app-like-job-dialog',
  imports: [EmptyState, ErrorState, LoadingSkeleton, MatDialogModule, MoneyPipe, ReactiveFormsModule],
  template: `
    <h2 mat-dialog-title>Copy from a like job</h2>
    <mat-dialog-content>
      <div class="choose">
        <label class="visually-hidden" for="like-search">Search title, customer or material</label>
        <input
          id="like-search"
          class="field"
          type="search"
          placeholder="Title, customer or material"
          maxlength="100"
          cdkFocusInitial
          [formControl]="search"
        />
        <label><input type="radio" value="today" [formControl]="rates" /> rates of today</label>
        <label><input type="radio" value="copied" [formControl]="rates" /> rates as copied</label>
      </div>
      @if (problem(); as failed) {
        <app-error-state [title]="failed.title" [text]="failed.text" (retried)="found.reload()" />
      } @else if (found.hasValue()) {
        @if (found.value().length === 0) {
          <app-empty-state
            title="No job like that"
            text="Only jobs that have an estimate can be copied. Try another word."
          />
        } @else {
          <ul>
            @for (job of found.value(); track job.jobId) {
              <li>
                <button type="button" class="job" [disabled]="isBusy()" (click)="copy(job)">
                  <b>{{ job.number }} {{ job.title }}</b>
                  <span class="muted">{{ toFacts(job) }}</span>
                  <span>
                    estimated {{ job.estimate | money }}, cost {{ job.actual | money }} ({{ job.status }})
                  </span>
                </button>
              </li>
            }
          </ul>
        }
      } @else {
        <app-loading-skeleton [lines]="5" [barHeight]="30" />
      }
      @if (failure()) {
        <p class="failure" role="alert">{{ failure() }}</p>
      }
    </mat-dialog-content>
    <mat-dialog-actions align="end">
      <button type="button" class="button quiet" mat-dialog-close>Cancel</button>
    </mat-dialog-actions>
  `,
  styles: `
    .choose {
      display: flex;
      flex-wrap: wrap;
      gap: 8px 16px;
      align-items: center;
      padding: 6px 0 10px;
    }
    .field {
      flex: 1 1 220px;
    }
    ul {
      margin: 0;
      padding: 0;
      list-style: none;
    }
    .job {
      display: grid;
      gap: 1px;
      width: 100%;
      padding: 8px 10px;
      border: 0;
      border-bottom: 1px solid var(--line);
      background: none;
      color: var(--ink);
      text-align: left;
      cursor: pointer;
    }
    .job:hover {
      background: var(--layout-blue-tint);
    }
    .failure {
      color: var(--rust-text);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LikeJobDialog {
  private readonly api = inject(EstimatesApi);
  private readonly dialog = inject<MatDialogRef<LikeJobDialog, CopiedEstimate>>(MatDialogRef);
  private readonly data = inject<LikeJobDialogData>(MAT_DIALOG_DATA);

  protected readonly search = new FormControl('', { nonNullable: true });
  protected readonly rates = new FormControl<'today' | 'copied'>('today', { nonNullable: true });
  protected readonly isBusy = signal(false);
  protected readonly failure = signal('');
  private readonly searched = toSignal(
    this.search.valueChanges.pipe(
      debounceTime(TYPING_PAUSE_MS),
      map((text) => text.trim()),
      startWith(''),
    ),
    { requireSync: true },
  );
  protected readonly found = rxResource({
    params: () => this.searched(),
    stream: ({ params }) => this.api.listLikeJobs(this.data.jobId, params),
  });
  protected readonly problem = computed(() => {
    const error = this.found.error();
    return error ? toShownProblem(error) : null;
  });

  protected toFacts({ customer, quantity, materials }: LikeJob): string {
    const pieces = quantity === null ? null : `${quantity} pieces`;
    return [customer, pieces, ...materials].filter(Boolean).join(' · ');
  }

  protected copy(from: LikeJob): void {
    this.isBusy.set(true);
    this.failure.set('');
    const { jobId, on } = this.data;
    this.api.draftEstimate(jobId, { fromJobId: from.jobId, rates: this.rates.value, on }).subscribe({
      next: (draft) => this.dialog.close({ from, draft }),
      error: (error: unknown) => {
        this.isBusy.set(false);
        this.failure.set(toShownProblem(error).text);
      },
    });
  }
}
