import {
  ChangeDetectionStrategy,
  Component,
  computed,
  ElementRef,
  effect,
  inject,
  input,
} from '@angular/core';
import { type SheetExcerpt } from '@brakeven/contract';

/** A few rows of a kept workbook, drawn as a sheet with column letters and row numbers, one cell marked. */
@Component({
  selector: 'app-sheet-excerpt-table',
  template: `
    <div class="frame" tabindex="0" role="region" [attr.aria-label]="'Sheet ' + excerpt().sheet">
      <table>
        <caption class="visually-hidden">
          Rows of sheet
          {{
            excerpt().sheet
          }}
          as they stand in
          {{
            excerpt().fileName
          }}
        </caption>
        <thead>
          <tr>
            <td class="corner"></td>
            @for (column of excerpt().columns; track column) {
              <th scope="col" [class.here]="column === markedColumn()">{{ column }}</th>
            }
          </tr>
        </thead>
        <tbody>
          @for (row of rows(); track row.row) {
            @if (row.isAfterGap) {
              <tr class="gap">
                <th scope="row">
                  <span class="visually-hidden">Rows left out</span><span aria-hidden="true">⋮</span>
                </th>
                <td [attr.colspan]="excerpt().columns.length"></td>
              </tr>
            }
            <tr>
              <th scope="row" [class.here]="row.row === markedRow()">{{ row.row }}</th>
              @for (cell of row.cells; track cell.address) {
                <td
                  [class.number]="cell.isNumber"
                  [class.marked]="cell.address === cellMarked()"
                  [class.in-row]="row.row === markedRow()"
                  [attr.aria-current]="cell.address === cellMarked() ? 'true' : null"
                >
                  @if (cell.address === cellMarked()) {
                    <span class="visually-hidden">Cell {{ cell.address }}: </span>
                  }
                  {{ cell.text }}
                </td>
              }
            </tr>
          }
        </tbody>
      </table>
    </div>
  `,
  styleUrl: './sheet-excerpt-table.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SheetExcerptTable {
  readonly excerpt = input.required<SheetExcerpt>();
  readonly cellMarked = input<string | null>(null);
  readonly rowMarked = input<number | null>(null);

  protected readonly markedColumn = computed(() => /^[A-Z]+/.exec(this.cellMarked() ?? '')?.[0] ?? null);
  protected readonly markedRow = computed(() => this.rowMarked() ?? rowOf(this.cellMarked()));
  protected readonly rows = computed(() => toGrid(this.excerpt()));

  constructor() {
    const host = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;
    effect(() => {
      const address = this.cellMarked();
      this.rows();
      if (address)
        setTimeout(() =>
          host.querySelector('.marked')?.scrollIntoView({ block: 'nearest', inline: 'center' }),
        );
    });
  }
}

interface GridCell {
  address: string;
  text: string;
  isNumber: boolean;
}

interface GridRow {
  row: number;
  /** Rows between the one above and this are not shown. */
  isAfterGap: boolean;
  cells: GridCell[];
}

/** Fills the gaps between the cells that hold something, so that each stands under its letter. */
export function toGrid({ columns, rows }: Pick<SheetExcerpt, 'columns' | 'rows'>): GridRow[] {
  return rows.map(({ row, cells }, index) => {
    const texts = new Map(cells.map(({ address, text }) => [address, text]));
    return {
      row,
      isAfterGap: index > 0 && row > (rows[index - 1]?.row ?? row) + 1,
      cells: columns.map((column) => {
        const address = `${column}${row}`;
        const text = texts.get(address) ?? '';
        return { address, text, isNumber: /^[-−+]?[\d.,:]+$/.test(text) };
      }),
    };
  });
}

function rowOf(address: string | null): number | null {
  const digits = /\d+$/.exec(address ?? '')?.[0];
  return digits === undefined ? null : Number(digits);
}
