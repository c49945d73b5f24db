import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { type TimesheetCheck } from '@brakeven/contract';
import { HoursPipe, LocalDatePipe, StatusTag } from '@brakeven/ui';
import { count, countEntries, refusedWords } from './timesheet-words';

/** Hours read = ready + already there + refused, always in sight and adding up, and whether the sheet's own total agrees. */
@Component({
  selector: 'app-check-summary',
  imports: [HoursPipe, LocalDatePipe, StatusTag],
  template: `
    @let check = this.check();
    <dl class="sum" aria-label="Hours read, and where they go">
      <div class="term">
        <dt>Hours read</dt>
        <dd>{{ check.hoursRead | hours }}</dd>
        <dd class="rows">{{ rowsRead() }}</dd>
      </div>
      <span class="sign" aria-hidden="true">=</span>
      <div class="term ready">
        <dt>{{ readyWord() }}</dt>
        <dd>{{ hoursReady() | hours }}</dd>
        <dd class="rows">{{ ready() }}</dd>
      </div>
      <span class="sign" aria-hidden="true">+</span>
      <div class="term">
        <dt>Already there</dt>
        <dd>{{ check.hoursAlreadyThere | hours }}</dd>
        <dd class="rows">{{ alreadyThere() }}</dd>
      </div>
      <span class="sign" aria-hidden="true">+</span>
      <div class="term" [class.refused]="check.refused > 0">
        <dt>Refused</dt>
        @if (check.refused > 0 && check.refused === check.refusedWithoutHours) {
          <dd>–</dd>
        } @else {
          <dd>{{ check.hoursRefused | hours }}</dd>
        }
        <dd class="rows">{{ refused() }}</dd>
      </div>
    </dl>
    <div class="beside">
      @if (check.firstDay && check.lastDay) {
        <p>{{ check.firstDay | localDate }} to {{ check.lastDay | localDate }}</p>
      }
      @if (check.controlTotal; as total) {
        <p>
          <app-status-tag
            [tone]="total.agrees ? 'good' : 'loss'"
            [word]="total.agrees ? 'agrees' : 'disagrees'"
          />
          Total in cell {{ total.cell }}: {{ total.hours | hours }}
          @if (!total.agrees) {
            <strong>differs from the rows by {{ total.difference | hours }}</strong>
          }
        </p>
      }
    </div>
  `,
  styleUrl: './check-summary.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CheckSummary {
  readonly check = input.required<TimesheetCheck>();
  /** Hours that went in, once they have: the sum then speaks of what was added. */
  readonly hoursAdded = input<string | null>(null);
  readonly entriesAdded = input(0);

  protected readonly rowsRead = computed(() => count(this.check().rowsRead, 'row'));
  protected readonly readyWord = computed(() => (this.hoursAdded() === null ? 'Ready' : 'Added'));
  protected readonly hoursReady = computed(() => this.hoursAdded() ?? this.check().hoursReady);
  protected readonly ready = computed(() =>
    countEntries(this.hoursAdded() === null ? this.check().entriesReady : this.entriesAdded()),
  );
  protected readonly alreadyThere = computed(() => countEntries(this.check().alreadyThere));
  protected readonly refused = computed(() => refusedWords(this.check()));
}
