import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  ElementRef,
  inject,
  input,
  output,
  signal,
  untracked,
} from '@angular/core';
import { type TimesheetCheck, type TimesheetField, type TimesheetMapping } from '@brakeven/contract';
import { DATE_FORMATS } from '@brakeven/values';
import { toMappingDraft, withColumn, withHeaderAt } from './mapping-draft';
import { count, FIELD_WORDS } from './timesheet-words';

const OPTIONAL_FIELDS: readonly TimesheetField[] = ['machine', 'good', 'scrap', 'note'];

/** Says which column holds what. */
@Component({
  selector: 'app-mapping-panel',
  templateUrl: './mapping-panel.html',
  styleUrl: './mapping-panel.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MappingPanel {
  readonly check = input.required<TimesheetCheck>();
  readonly mapping = input<TimesheetMapping | null>(null);
  readonly isBusy = input(false);
  /** What the server said of the mapping, field by field: `mapping.headerRow`. */
  readonly issues = input<readonly { field: string; message: string }[]>([]);
  /** A column that is not used and that the user wants to say something about; each time anew. */
  readonly columnAsked = input<{ column: string } | null>(null);
  readonly changed = output<TimesheetMapping>();

  protected readonly fields = Object.keys(FIELD_WORDS) as TimesheetField[];
  protected readonly words = FIELD_WORDS;
  protected readonly dateFormats = DATE_FORMATS;
  protected readonly draft = signal<TimesheetMapping>({ sheet: '', headerRow: 1, columns: {} });
  protected readonly columns = computed(() =>
    this.check().headerCells.map(({ column, text, sample }) => ({
      column,
      label: `${column} · ${text || 'no header'}${sample ? `, such as ${sample}` : ''}`,
    })),
  );
  /** Columns that the check found no use for, with what has been said of them since. */
  protected readonly unused = computed(() => {
    const { sheet, headerRow, columns } = this.draft();
    const { mapping, unusedColumns } = this.check();
    if (mapping?.sheet !== sheet || mapping.headerRow !== headerRow) return [];
    return unusedColumns.map((one) => ({
      ...one,
      field: this.fields.find((field) => columns[field] === one.column) ?? null,
    }));
  });
  protected readonly samples = computed(
    () => new Map(this.check().headerCells.map(({ column, sample }) => [column, sample])),
  );
  protected readonly missing = computed(() => {
    const { columns } = this.draft();
    return this.fields.filter((field) => !OPTIONAL_FIELDS.includes(field) && !columns[field]);
  });
  protected readonly missingWords = computed(() =>
    this.missing()
      .map((field) => FIELD_WORDS[field])
      .join(', '),
  );
  protected readonly mappingIssues = computed(() =>
    this.issues().filter(({ field }) => field.startsWith('mapping')),
  );

  constructor() {
    const host = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;
    effect(() => {
      const asked = this.columnAsked();
      if (asked) setTimeout(() => showField(host.querySelector(`#unused-${asked.column}`)));
    });
    effect(() => {
      const mapping = this.mapping() ?? toMappingDraft(this.check());
      untracked(() => this.draft.set(mapping));
    });
  }

  protected isRequired(field: TimesheetField): boolean {
    return !OPTIONAL_FIELDS.includes(field);
  }

  protected setColumn(field: TimesheetField, column: string): void {
    this.change(withColumn(this.draft(), field, column || null));
  }

  /** Says what an unused column holds; nothing for not used after all. */
  protected setField(column: string, text: string): void {
    const field = this.fields.find((one) => one === text);
    const held = this.fields.find((one) => this.draft().columns[one] === column);
    if (field) this.change(withColumn(this.draft(), field, column));
    else if (held) this.change(withColumn(this.draft(), held, null));
  }

  protected rowsOf(rows: number): string {
    return count(rows, 'row');
  }

  protected setSheet(sheet: string): void {
    this.change(withHeaderAt(this.draft(), sheet, 1));
  }

  protected setHeaderRow(text: string): void {
    const headerRow = Number(text);
    if (Number.isInteger(headerRow) && headerRow >= 1 && headerRow <= 1000) {
      this.change(withHeaderAt(this.draft(), this.draft().sheet, headerRow));
    }
  }

  protected setDateFormat(text: string): void {
    const dateFormat = DATE_FORMATS.find((format) => format === text);
    this.change({ ...this.draft(), dateFormat });
  }

  protected setDecimalMark(text: string): void {
    const decimalMark = text === '.' || text === ',' ? text : undefined;
    this.change({ ...this.draft(), decimalMark });
  }

  private change(mapping: TimesheetMapping): void {
    this.draft.set(mapping);
    this.changed.emit(mapping);
  }
}

function showField(field: HTMLElement | null): void {
  field?.scrollIntoView({ block: 'center' });
  field?.focus({ preventScroll: true });
}
