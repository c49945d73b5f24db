import {
  ChangeDetectionStrategy,
  Component,
  computed,
  ElementRef,
  inject,
  input,
  output,
  signal,
  viewChild,
} from '@angular/core';

export interface ColumnChoice {
  id: string;
  header: string;
  /** Always shown. */
  isFixed?: boolean;
}

/** Which columns a grid shows: a list to tick, closed by Escape or a press elsewhere. */
@Component({
  selector: 'app-column-chooser',
  template: `
    <button
      #opener
      type="button"
      class="button"
      aria-haspopup="true"
      [attr.aria-expanded]="isOpen()"
      (click)="isOpen.set(!isOpen())"
    >
      Columns
    </button>
    @if (isOpen()) {
      <fieldset class="panel">
        <legend class="visually-hidden">Columns shown</legend>
        @for (choice of choices(); track choice.id) {
          <label>
            <input
              type="checkbox"
              [checked]="isShown().has(choice.id)"
              [disabled]="choice.isFixed"
              (change)="toggle(choice.id)"
            />
            {{ choice.header }}
          </label>
        }
        <p class="muted">Drag a heading to move its column.</p>
      </fieldset>
    }
  `,
  styles: `
    :host {
      position: relative;
      display: inline-block;
    }
    .panel {
      position: absolute;
      z-index: 20;
      top: calc(100% + 4px);
      right: 0;
      display: grid;
      grid-template-columns: 1fr 1fr;
      gap: 2px 18px;
      width: min(360px, 86vw);
      max-height: min(480px, 70vh);
      overflow: auto;
      margin: 0;
      padding: 12px 14px;
      border: 1px solid var(--line-strong);
      border-radius: var(--radius);
      background: var(--sheet);
      box-shadow: 0 6px 22px rgb(0 0 0 / 18%);
    }
    label {
      display: flex;
      gap: 8px;
      align-items: center;
      min-height: 28px;
    }
    input {
      width: 17px;
      height: 17px;
      accent-color: var(--layout-blue);
    }
    p {
      grid-column: 1 / -1;
      margin-top: 6px;
      font-size: 12.5px;
    }
    @media (width < 700px) {
      .panel {
        right: auto;
        left: 0;
      }
    }
  `,
  host: {
    '(document:pointerdown)': 'closeFromOutside($event)',
    '(keydown.escape)': 'close($event)',
  },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ColumnChooser {
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef);
  private readonly opener = viewChild.required<ElementRef<HTMLElement>>('opener');

  readonly choices = input.required<readonly ColumnChoice[]>();
  /** Ids of the columns shown, in their order. */
  readonly shown = input.required<readonly string[]>();
  readonly shownChange = output<string[]>();

  protected readonly isOpen = signal(false);
  protected readonly isShown = computed(() => new Set(this.shown()));

  /** A column that is added takes the place that it has among the choices. */
  protected toggle(id: string): void {
    const shown = this.shown();
    if (shown.includes(id)) {
      this.shownChange.emit(shown.filter((other) => other !== id));
      return;
    }
    const rank = new Map(this.choices().map((choice, at) => [choice.id, at]));
    const rankOf = (other: string) => rank.get(other) ?? 0;
    const before = shown.filter((other) => rankOf(other) < rankOf(id)).at(-1);
    const at = before === undefined ? 0 : shown.indexOf(before) + 1;
    this.shownChange.emit([...shown.slice(0, at), id, ...shown.slice(at)]);
  }

  protected close(event: Event): void {
    if (!this.isOpen()) return;
    event.stopPropagation();
    this.isOpen.set(false);
    this.opener().nativeElement.focus();
  }

  protected closeFromOutside({ target }: Event): void {
    if (this.isOpen() && !this.host.nativeElement.contains(target as Node)) this.isOpen.set(false);
  }
}
