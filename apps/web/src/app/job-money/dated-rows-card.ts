import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { rxResource, takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { LoadingSkeleton, LocalDatePipe } from '@brakeven/ui';
import { type Observable } from 'rxjs';
import { LoadError } from '../shell/load-error';
import { DatedCellView } from './dated-cell-view';
import { type DatedRow, type DatedRows } from './dated-rows';
import { RowChanges } from './row-changes';

/** A card of dated rows: entered, corrected, voided and put back where they stand, with their total. */
@Component({
  selector: 'app-dated-rows-card',
  imports: [DatedCellView, LoadError, LoadingSkeleton, LocalDatePipe],
  providers: [RowChanges],
  templateUrl: './dated-rows-card.html',
  styleUrl: './dated-rows-card.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DatedRowsCard<Row extends DatedRow, List extends { items: readonly Row[] }> {
  private readonly changes = inject(RowChanges);

  readonly rows = input.required<DatedRows<Row, List>>();
  readonly changed = output();

  protected readonly list = rxResource({
    params: () => this.rows(),
    stream: ({ params: rows }) => rows.load(),
  });
  protected readonly headingId = computed(() => `dated-${this.rows().heading.replaceAll(/\W+/g, '-')}`);
  protected readonly actions = computed(() => {
    const { canEdit, actions } = this.rows();
    const hasRows = this.list.hasValue() && this.list.value().items.length > 0;
    return canEdit ? actions.filter(({ isSecond }) => !isSecond || hasRows) : [];
  });
  /** How many columns the word for the total covers: the date and all before the first total. */
  protected readonly totalSpan = computed(
    () => 1 + this.rows().columns.findIndex(({ total }) => total !== undefined),
  );

  constructor() {
    this.changes.changed.pipe(takeUntilDestroyed()).subscribe(() => {
      this.list.reload();
      this.changed.emit();
    });
  }

  protected run(done: Observable<string | null>): void {
    done.subscribe((text) => {
      if (text !== null) this.changes.tell(text);
    });
  }

  protected voidRow(row: Row): void {
    const rows = this.rows();
    this.changes.void(rows.nameOf(row), rows.void(row), () => rows.restore(row));
  }

  protected restore(row: Row): void {
    const rows = this.rows();
    this.changes.restore(rows.nameOf(row), rows.restore(row));
  }
}
