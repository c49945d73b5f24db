import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatDialog } from '@angular/material/dialog';
import { type OverheadRate } from '@brakeven/contract';
import { EmptyState, LoadingSkeleton, LocalDatePipe, RatePipe, StatusTag } from '@brakeven/ui';
import { type Observable } from 'rxjs';
import { PeopleApi } from '../api/people-api';
import { toProblemSentence } from '../api/problem-text';
import { stateRates } from '../rates/current-rate';
import { LoadError } from '../shell/load-error';
import { Notifier } from '../shell/notifier';
import { RollupStore } from '../shell/rollup-store';
import { OverheadRateDialog, type OverheadRateDialogData } from './overhead-rate-dialog';

/** What every labour hour on a job carries of the shop's overhead, from each day on. */
@Component({
  selector: 'app-overhead-card',
  imports: [EmptyState, LoadError, LoadingSkeleton, LocalDatePipe, RatePipe, StatusTag],
  template: `
    <section class="card" aria-labelledby="overhead-heading">
      <div class="head">
        <h2 id="overhead-heading">Overhead per labour hour</h2>
        @if (canEdit()) {
          <button type="button" class="button" (click)="edit(null)">New overhead rate</button>
        }
      </div>
      @if (rates.error(); as error) {
        <app-load-error [error]="error" (retried)="rates.reload()" />
      } @else if (rates.hasValue()) {
        @if (stated().length === 0) {
          <app-empty-state
            title="No overhead rate yet"
            text="Without one jobs carry labour and machine only, and their pages say that overhead is missing."
          />
        } @else {
          <div class="scroll-x">
            <table class="figures">
              <thead>
                <tr>
                  <th scope="col">From</th>
                  <th scope="col" class="number">Rate</th>
                  @if (canEdit()) {
                    <th scope="col"><span class="visually-hidden">Actions</span></th>
                  }
                </tr>
              </thead>
              <tbody>
                @for (rate of stated(); track rate.overheadRateId) {
                  <tr [class.past]="rate.state === 'earlier'">
                    <th scope="row">
                      <span class="date">{{ rate.validFrom | localDate }}</span>
                      @if (rate.state !== 'earlier') {
                        <app-status-tag
                          [word]="rate.state"
                          [tone]="rate.state === 'current' ? 'good' : 'plan'"
                        />
                      }
                    </th>
                    <td class="number">{{ rate.ratePerLabourHour | rate }}</td>
                    @if (canEdit()) {
                      <td class="actions">
                        <button
                          type="button"
                          class="button quiet"
                          [attr.aria-label]="'Correct the overhead rate from ' + (rate.validFrom | localDate)"
                          (click)="edit(rate)"
                        >
                          Correct
                        </button>
                        <button
                          type="button"
                          class="button quiet"
                          [attr.aria-label]="'Delete the overhead rate from ' + (rate.validFrom | localDate)"
                          (click)="delete(rate)"
                        >
                          Delete
                        </button>
                      </td>
                    }
                  </tr>
                }
              </tbody>
            </table>
          </div>
        }
      } @else {
        <app-loading-skeleton [lines]="3" />
      }
    </section>
  `,
  styleUrl: '../rates/dated-card.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class OverheadCard {
  readonly today = input.required<string>();
  readonly canEdit = input(false);

  private readonly api = inject(PeopleApi);
  private readonly dialog = inject(MatDialog);
  private readonly notifier = inject(Notifier);
  private readonly rollup = inject(RollupStore);

  protected readonly rates = rxResource({ stream: () => this.api.listOverheadRates() });
  protected readonly stated = computed(() =>
    this.rates.hasValue() ? stateRates(this.rates.value(), this.today()) : [],
  );

  protected edit(rate: OverheadRate | null): void {
    const data: OverheadRateDialogData = { rate, today: this.today() };
    this.dialog
      .open<OverheadRateDialog, OverheadRateDialogData, OverheadRate>(OverheadRateDialog, {
        data,
        width: '480px',
      })
      .afterClosed()
      .subscribe((saved) => {
        if (saved) this.reload();
      });
  }

  protected delete({ overheadRateId, validFrom, ratePerLabourHour }: OverheadRate): void {
    this.change(this.api.deleteOverheadRate(overheadRateId), 'Overhead rate deleted.', () =>
      this.change(this.api.addOverheadRate({ validFrom, ratePerLabourHour }), 'Overhead rate put back.'),
    );
  }

  private change(answer: Observable<unknown>, done: string, undo?: () => void): void {
    answer.subscribe({
      next: () => {
        this.notifier.say(done, undo);
        this.reload();
      },
      error: (error: unknown) => this.notifier.warn(toProblemSentence(error)),
    });
  }

  private reload(): void {
    this.rates.reload();
    void this.rollup.refresh();
  }
}
