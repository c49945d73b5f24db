import { computed, inject, Injectable, signal } from '@angular/core';
import { type RollupResult, type RollupStatus } from '@brakeven/contract';
import { firstValueFrom, Subject } from 'rxjs';
import { RollupApi } from '../api/rollup-api';
import { toProblemSentence } from '../api/problem-text';
import { Notifier } from './notifier';

/** Through which day costs are rolled up; pages reload when `rolledUp` says that costs have changed. */
@Injectable({ providedIn: 'root' })
export class RollupStore {
  private readonly api = inject(RollupApi);
  private readonly notifier = inject(Notifier);
  private readonly current = signal<RollupStatus | null>(null);
  private readonly running = signal(false);
  private readonly changes = new Subject<RollupResult>();

  readonly status = this.current.asReadonly();
  readonly isRunning = computed(() => this.running() || (this.current()?.isRunning ?? false));
  readonly rolledUp = this.changes.asObservable();

  /** Asks again how things stand; call it after anything that adds, voids or reprices entries. */
  async refresh(): Promise<void> {
    try {
      this.current.set(await firstValueFrom(this.api.getStatus()));
    } catch {
      // The bar keeps what it knew: a page that cannot load says so itself.
    }
  }

  async run(): Promise<void> {
    if (this.running()) return;
    this.running.set(true);
    try {
      const result = await firstValueFrom(this.api.run());
      this.notifier.say(toRollupSentence(result));
      this.changes.next(result);
    } catch (error) {
      this.notifier.warn(toProblemSentence(error), () => void this.run());
    } finally {
      this.running.set(false);
      await this.refresh();
    }
  }
}

/** What a rollup did, in words. */
export function toRollupSentence({ days, lines }: RollupResult): string {
  if (days === 0) return 'Costs were already rolled up; nothing has changed.';
  return `Rolled up ${days} ${days === 1 ? 'day' : 'days'}, ${lines.toLocaleString('en-US')} cost lines.`;
}
