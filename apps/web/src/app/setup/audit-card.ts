import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { type AuditEvent } from '@brakeven/contract';
import { EmptyState, InstantPipe, LoadingSkeleton, SHOP_FORMAT } from '@brakeven/ui';
import { ShopApi } from '../api/shop-api';
import { LoadError } from '../shell/load-error';
import { toAuditLine } from './audit-change';

const EVENTS_AT_ONCE = 25;

/** Who changed what, latest first. */
@Component({
  selector: 'app-audit-card',
  imports: [EmptyState, InstantPipe, LoadError, LoadingSkeleton],
  template: `
    <section class="card" aria-labelledby="audit-heading">
      <h2 id="audit-heading">Audit trail</h2>
      @if (lines().length > 0) {
        <ol>
          @for (line of lines(); track line.event.eventId) {
            <li>
              <p class="head">
                <strong>{{ line.event.actor }}</strong> {{ line.event.action }} {{ line.subject }}
                @if (line.name) {
                  <strong>{{ line.name }}</strong>
                }
                <span class="muted">{{ line.event.at | instant }}</span>
              </p>
              @if (line.changes.length > 0) {
                <ul>
                  @for (change of line.changes; track change.label) {
                    <li>
                      <span class="muted">{{ change.label }}</span>
                      @if (change.before !== null) {
                        <del>{{ change.before }}</del>
                      }
                      @if (change.before !== null && change.after !== null) {
                        <span aria-hidden="true">→</span>
                      }
                      @if (change.after !== null) {
                        <ins>{{ change.after }}</ins>
                      }
                    </li>
                  }
                </ul>
              }
            </li>
          }
        </ol>
      } @else if (isDone()) {
        <app-empty-state
          title="Nothing yet"
          text="Every change to the shop’s books and settings is listed here."
        />
      }
      @if (error(); as error) {
        <app-load-error [error]="error" (retried)="load()" />
      } @else if (isLoading()) {
        <app-loading-skeleton [lines]="4" />
      } @else if (!isDone()) {
        <button type="button" class="button" (click)="load()">Load earlier changes</button>
      }
    </section>
  `,
  styleUrl: './audit-card.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AuditCard {
  private readonly api = inject(ShopApi);
  private readonly format = inject(SHOP_FORMAT);
  private readonly events = signal<readonly AuditEvent[]>([]);
  private cursor: string | null = null;
  protected readonly isLoading = signal(false);
  protected readonly isDone = signal(false);
  protected readonly error = signal<unknown>(null);
  protected readonly lines = computed(() =>
    this.events().map((event) => toAuditLine(event, this.format().units)),
  );

  constructor() {
    this.load();
  }

  protected load(): void {
    this.isLoading.set(true);
    this.error.set(null);
    this.api.listAuditEvents(this.cursor ?? undefined, EVENTS_AT_ONCE).subscribe({
      next: ({ items, nextCursor }) => {
        this.events.update((events) => [...events, ...items]);
        this.cursor = nextCursor;
        this.isDone.set(nextCursor === null);
        this.isLoading.set(false);
      },
      error: (error: unknown) => {
        this.error.set(error);
        this.isLoading.set(false);
      },
    });
  }
}
