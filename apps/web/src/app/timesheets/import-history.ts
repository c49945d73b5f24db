import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { RouterLink } from '@angular/router';
import { type TimesheetImport } from '@brakeven/contract';
import { EmptyState, HoursPipe, InstantPipe, LoadingSkeleton, LocalDatePipe, StatusTag } from '@brakeven/ui';
import { TimesheetsApi } from '../api/timesheets-api';
import { LoadError } from '../shell/load-error';
import { ImportHistoryStore } from './import-history-store';

const ROWS_AT_FIRST = 12;

/** What has been imported: by whom, how much went in, and the ways to open, fetch and undo it. */
@Component({
  selector: 'app-import-history',
  imports: [
    EmptyState,
    HoursPipe,
    InstantPipe,
    LoadError,
    LoadingSkeleton,
    LocalDatePipe,
    RouterLink,
    StatusTag,
  ],
  template: `
    <section class="card" aria-labelledby="history-heading">
      <h2 id="history-heading">Imported so far</h2>
      @let imports = store.imports;
      @if (imports.error(); as error) {
        <app-load-error [error]="error" (retried)="store.load()" />
      } @else if (imports.hasValue()) {
        @if (imports.value().length === 0) {
          <app-empty-state
            title="No timesheet yet"
            text="Drop the first week’s workbook above. What it adds shows up under Hours, on the jobs and in the payback."
          />
        } @else {
          <div class="scroll-x" tabindex="0" role="region" aria-label="Table of imports">
            <table class="figures">
              <thead>
                <tr>
                  <th scope="col">File</th>
                  <th scope="col">Days</th>
                  <th scope="col">Imported</th>
                  <th scope="col" class="number">Added</th>
                  <th scope="col" class="number">Already there</th>
                  <th scope="col" class="number">Refused</th>
                  <th scope="col" class="number">Hours added</th>
                  <th scope="col">Status</th>
                  <th scope="col"><span class="visually-hidden">Actions</span></th>
                </tr>
              </thead>
              <tbody>
                @for (one of shown(); track one.importId) {
                  <tr [class.undone]="one.status === 'undone'">
                    <th scope="row">
                      <a [routerLink]="['/timesheets', one.importId]">{{ one.fileName }}</a>
                      <span class="muted sheet">{{ one.sheet }}</span>
                    </th>
                    <td class="date">
                      @if (one.firstDay && one.lastDay) {
                        {{ one.firstDay | localDate: 'dayMonth' }} – {{ one.lastDay | localDate }}
                      } @else {
                        –
                      }
                    </td>
                    <td class="date">
                      {{ one.importedAt | instant }}
                      <span class="muted sheet">{{ one.importedBy }}</span>
                    </td>
                    <td class="number">{{ one.entriesAdded.toLocaleString('en-US') }}</td>
                    <td class="number">{{ one.alreadyThere.toLocaleString('en-US') }}</td>
                    <td class="number">{{ one.refused.toLocaleString('en-US') }}</td>
                    <td class="number">{{ one.hoursAdded | hours }}</td>
                    <td>
                      @if (one.status === 'undone') {
                        <app-status-tag word="undone" tone="plan" />
                        <span class="muted sheet">{{ one.undoneBy }}, {{ one.undoneAt | instant }}</span>
                      } @else {
                        <app-status-tag word="in the books" tone="good" />
                      }
                    </td>
                    <td class="actions">
                      <a
                        class="button quiet"
                        [href]="fileUrl(one)"
                        [attr.download]="one.fileName"
                        [attr.aria-label]="'Download ' + one.fileName"
                        >Download</a
                      >
                      @if (one.status === 'committed') {
                        <button
                          type="button"
                          class="button quiet"
                          [attr.aria-label]="'Undo ' + one.fileName"
                          (click)="store.undo(one)"
                        >
                          Undo
                        </button>
                      }
                    </td>
                  </tr>
                }
              </tbody>
            </table>
          </div>
          @if (imports.value().length > shown().length) {
            <button type="button" class="button more" (click)="isWhole.set(true)">
              Show all {{ imports.value().length }}
            </button>
          }
        }
      } @else {
        <app-loading-skeleton [lines]="6" />
      }
    </section>
  `,
  styles: `
    .sheet {
      display: block;
      font-size: 12.5px;
    }
    .undone :is(th, td) {
      color: var(--ink-muted);
    }
    th a {
      display: inline-block;
      min-width: 185px;
      overflow-wrap: anywhere;
    }
    .more {
      margin-top: 12px;
    }
    .actions {
      text-align: right;
      white-space: nowrap;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ImportHistory {
  protected readonly store = inject(ImportHistoryStore);
  private readonly api = inject(TimesheetsApi);

  protected readonly isWhole = signal(false);
  protected readonly shown = computed(() => {
    const all = this.store.imports.hasValue() ? this.store.imports.value() : [];
    return this.isWhole() ? all : all.slice(0, ROWS_AT_FIRST);
  });

  protected fileUrl(one: TimesheetImport): string {
    return this.api.fileUrl(one.importId);
  }
}
