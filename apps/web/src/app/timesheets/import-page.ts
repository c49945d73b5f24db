import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { RouterLink } from '@angular/router';
import {
  EmptyState,
  HoursPipe,
  InstantPipe,
  LoadingSkeleton,
  LocalDatePipe,
  PageHeader,
  StatusTag,
} from '@brakeven/ui';
import { of } from 'rxjs';
import { TimesheetsApi } from '../api/timesheets-api';
import { LoadError } from '../shell/load-error';
import { ImportHistoryStore } from './import-history-store';
import { SheetExcerptTable } from './sheet-excerpt-table';
import { count } from './timesheet-words';

/** One import: its facts, what was refused, and the kept workbook around the cell that a figure came from. */
@Component({
  selector: 'app-import-page',
  imports: [
    EmptyState,
    HoursPipe,
    InstantPipe,
    LoadError,
    LoadingSkeleton,
    LocalDatePipe,
    PageHeader,
    RouterLink,
    SheetExcerptTable,
    StatusTag,
  ],
  providers: [ImportHistoryStore],
  templateUrl: './import-page.html',
  styleUrl: './import-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ImportPage {
  readonly importId = input.required<string>();
  readonly sheet = input<string>();
  readonly row = input<string>();
  readonly cell = input<string>();

  private readonly api = inject(TimesheetsApi);
  protected readonly history = inject(ImportHistoryStore);

  protected readonly detail = rxResource({
    params: () => this.importId(),
    stream: ({ params }) => this.api.get(params),
  });
  /** The row that is asked for; without one, the head of the sheet. */
  protected readonly rowAsked = computed(() => {
    const asked = Number(this.row() ?? /\d+$/.exec(this.cell() ?? '')?.[0]);
    return Number.isInteger(asked) && asked > 0 ? asked : null;
  });
  private readonly place = computed(() => {
    const sheet = this.sheet() ?? (this.detail.hasValue() ? this.detail.value().sheet : undefined);
    return sheet === undefined ? undefined : { importId: this.importId(), sheet, row: this.rowAsked() ?? 1 };
  });
  protected readonly excerpt = rxResource({
    params: () => this.place(),
    stream: ({ params }) =>
      params ? this.api.getExcerpt(params.importId, params.sheet, params.row) : of(undefined),
  });
  protected readonly fileUrl = computed(() => this.api.fileUrl(this.importId()));
  protected readonly refusedWords = computed(() =>
    this.detail.hasValue() ? count(this.detail.value().refused, 'row') : '',
  );

  protected undo(): void {
    if (!this.detail.hasValue()) return;
    this.history.undo(this.detail.value(), () => this.detail.reload());
  }
}
