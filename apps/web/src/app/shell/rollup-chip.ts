import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { LocalDatePipe } from '@brakeven/ui';
import { SessionStore } from '../session/session-store';
import { RollupStore } from './rollup-store';

/** 'Costs through …, 14 entries since', and the button that rolls up the rest. */
@Component({
  selector: 'app-rollup-chip',
  imports: [LocalDatePipe],
  template: `
    @if (rollup.status(); as status) {
      <div class="stand">
        <span class="words" role="status">
          @if (status.through) {
            <span class="wide">Costs through </span><b>{{ status.through | localDate: 'weekday' }}</b>
          } @else {
            <span>No costs yet</span>
          }
          @if (status.entriesWaiting > 0) {
            <span class="wide"> · {{ waiting() }}</span>
          }
        </span>
        @if (canRun()) {
          <button type="button" [attr.aria-disabled]="rollup.isRunning()" (click)="runRollup()">
            {{ rollup.isRunning() ? 'Rolling up…' : 'Roll up now' }}
          </button>
        }
      </div>
    }
  `,
  styleUrl: './rollup-chip.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RollupChip {
  protected readonly rollup = inject(RollupStore);
  private readonly session = inject(SessionStore);

  protected readonly canRun = computed(() => this.session.can('rollup.run'));
  protected readonly waiting = computed(() => {
    const entries = this.rollup.status()?.entriesWaiting ?? 0;
    return `${entries.toLocaleString('en-US')} ${entries === 1 ? 'entry' : 'entries'} since`;
  });

  constructor() {
    void this.rollup.refresh();
  }

  protected runRollup(): void {
    if (!this.rollup.isRunning()) void this.rollup.run();
  }
}
