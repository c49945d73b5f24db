import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { BENDS_MAX } from '@brakeven/forming';
import { type TextForm } from '../address-form';
import { type BlankTexts, LIST_MARK, splitList } from './blank-question';
import { type BendWay, toWays } from './profile-drawing';

/** One flange, with the bend that follows it. */
interface EditedFlange {
  flange: string;
  /** Null behind the last flange. */
  bend: { angle: string; way: BendWay } | null;
}

/** The flanges of a part in order with a bend between each two; rows are added and taken out. */
@Component({
  selector: 'app-part-editor',
  template: `
    <ol>
      @for (row of rows(); track $index; let index = $index) {
        <li>
          <label>
            <span>Flange {{ index + 1 }}</span>
            <input
              class="field"
              autocomplete="off"
              [value]="row.flange"
              (input)="setFlange(index, $any($event.target).value)"
            />
          </label>
          @if (row.bend; as bend) {
            <label class="bend">
              <span>Inside angle {{ index + 1 }}</span>
              <input
                class="field"
                inputmode="decimal"
                autocomplete="off"
                [value]="bend.angle"
                (input)="setAngle(index, $any($event.target).value)"
              />
            </label>
            <label class="way">
              <span>Way</span>
              <select class="field" [value]="bend.way" (change)="setWay(index, $any($event.target).value)">
                <option value="up" [selected]="bend.way === 'up'">up</option>
                <option value="down" [selected]="bend.way === 'down'">down</option>
              </select>
            </label>
          }
          @if (rows().length > 2) {
            <button
              type="button"
              class="button quiet"
              [attr.aria-label]="'Take flange ' + (index + 1) + ' out'"
              (click)="remove(index)"
            >
              ×
            </button>
          }
        </li>
      }
    </ol>
    @if (rows().length <= bendsMax) {
      <button type="button" class="button" (click)="add()">Add a flange</button>
    }
  `,
  styleUrl: './part-editor.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PartEditor {
  readonly form = input.required<TextForm<BlankTexts>>();
  /** What the form says now, so that the rows follow. */
  readonly flanges = input.required<string>();
  readonly angles = input.required<string>();
  readonly ways = input.required<string>();

  protected readonly bendsMax = BENDS_MAX;
  protected readonly rows = computed<EditedFlange[]>(() => {
    const [flanges, angles] = [splitList(this.flanges()), splitList(this.angles())];
    const ways = toWays(this.ways());
    return flanges.map((flange, index) => ({
      flange,
      bend: index === flanges.length - 1 ? null : { angle: angles[index] ?? '90', way: ways[index] ?? 'up' },
    }));
  });

  protected setFlange(index: number, flange: string): void {
    this.write(this.rows().map((row, at) => (at === index ? { ...row, flange } : row)));
  }

  protected setAngle(index: number, angle: string): void {
    this.write(
      this.rows().map((row, at) =>
        at === index && row.bend ? { ...row, bend: { ...row.bend, angle } } : row,
      ),
    );
  }

  protected setWay(index: number, way: BendWay): void {
    this.write(
      this.rows().map((row, at) => (at === index && row.bend ? { ...row, bend: { ...row.bend, way } } : row)),
    );
  }

  protected add(): void {
    const rows = this.rows().map((row) => ({
      ...row,
      bend: row.bend ?? { angle: '90', way: 'up' as const },
    }));
    this.write([...rows, { flange: rows.at(-1)?.flange ?? '', bend: null }]);
  }

  protected remove(index: number): void {
    this.write(this.rows().filter((_, at) => at !== index));
  }

  private write(rows: readonly EditedFlange[]): void {
    const bends = rows.slice(0, -1).map(({ bend }) => bend ?? { angle: '90', way: 'up' });
    this.form().patchValue({
      flanges: rows.map(({ flange }) => withoutMark(flange)).join(LIST_MARK),
      angles: bends.map(({ angle }) => withoutMark(angle)).join(LIST_MARK),
      ways: bends.map(({ way }) => way).join(LIST_MARK),
    });
  }
}

function withoutMark(text: string): string {
  return text.replaceAll(LIST_MARK, '');
}
