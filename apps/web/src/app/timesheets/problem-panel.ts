import {
  ChangeDetectionStrategy,
  Component,
  computed,
  ElementRef,
  inject,
  input,
  output,
} from '@angular/core';
import { type TimesheetProblem, type UnreadDates } from '@brakeven/contract';
import { type DateFormat } from '@brakeven/values';
import { DateOrderChoice } from './date-order-choice';
import { type ChosenName, groupUnknownNames, type UnknownName } from './group-unknown-names';
import { type KnownName } from './known-names';
import { NameChoice } from './name-choice';
import { count, KIND_WORDS } from './timesheet-words';

const LISTED_MAX = 40;

/** What is to be settled, beside the table: names once for all their rows, then everything else cell by cell. */
@Component({
  selector: 'app-problem-panel',
  imports: [DateOrderChoice, NameChoice],
  template: `
    @if (datesToSettle(); as unread) {
      <section aria-labelledby="dates-heading">
        <h3 id="dates-heading">Dates to settle</h3>
        <div class="name">
          <app-date-order-choice
            [unread]="unread"
            [isDisabled]="isBusy()"
            (chosen)="chooseDateFormat($event)"
          />
        </div>
      </section>
    }
    @if (names().length > 0) {
      <section aria-labelledby="names-heading">
        <h3 id="names-heading">
          Names to settle <span class="muted">{{ names().length }}</span>
        </h3>
        <ul>
          @for (name of names(); track name.kind + name.spelling) {
            <li class="name">
              <p>
                <strong>“{{ name.spelling }}”</strong>
                <span class="muted"
                  >{{ kindWords[name.kind].one }}, {{ rowsOf(name) }}, first in {{ name.firstCell }}</span
                >
              </p>
              <app-name-choice [name]="name" [isDisabled]="isBusy()" (chosen)="choose(name, $event)" />
            </li>
          }
        </ul>
      </section>
    }
    @if (chosen().length > 0 || dateFormat()) {
      <section aria-labelledby="chosen-heading">
        <h3 id="chosen-heading">Settled</h3>
        <p class="muted">Remembered for the next timesheet when this one is added.</p>
        <ul>
          @if (dateFormat(); as format) {
            <li class="settled">
              <span
                >Text dates are written <strong>{{ format }}</strong></span
              >
              <button
                type="button"
                class="button quiet"
                [disabled]="isBusy()"
                [attr.aria-label]="'Take back: text dates are written ' + format"
                (click)="chooseDateFormat(null)"
              >
                Take back
              </button>
            </li>
          }
          @for (name of chosen(); track name.kind + name.spelling) {
            <li class="settled">
              <span
                >“{{ name.spelling }}” is <strong>{{ name.label }}</strong></span
              >
              <button
                type="button"
                class="button quiet"
                [disabled]="isBusy()"
                [attr.aria-label]="'Take back: ' + name.spelling + ' is ' + name.label"
                (click)="takeBack(name)"
              >
                Take back
              </button>
            </li>
          }
        </ul>
      </section>
    }
    @if (others().length > 0) {
      <section aria-labelledby="others-heading">
        <h3 id="others-heading">
          Cells to correct <span class="muted">{{ others().length }}</span>
        </h3>
        <p class="muted">
          Correct them in your workbook, save, and drop the file again. Nothing is added twice.
        </p>
        <ul class="cells">
          @for (problem of listed(); track problem.cell + problem.code) {
            <li>
              <button type="button" class="jump" (click)="shown.emit(problem)">
                <span class="cell" [class.doubtful]="problem.severity === 'warning'">{{
                  problem.cell
                }}</span>&ngsp;<span>
                  @if (problem.severity === 'warning') {
                    <strong>Warning:</strong>
                  }
                  {{ problem.message }}
                </span>
              </button>
            </li>
          }
        </ul>
        @if (others().length > listed().length) {
          <p class="muted">{{ others().length - listed().length }} more in the table.</p>
        }
      </section>
    }
  `,
  styleUrl: './problem-panel.scss',
  host: { tabindex: '-1' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ProblemPanel {
  readonly problems = input.required<readonly TimesheetProblem[]>();
  readonly chosen = input.required<readonly ChosenName[]>();
  readonly unreadDates = input<UnreadDates | null>(null);
  /** The order of text dates that was settled here. */
  readonly dateFormat = input<DateFormat | null>(null);
  readonly isBusy = input(false);
  readonly nameChosen = output<ChosenName>();
  readonly takenBack = output<ChosenName>();
  /** Null takes the choice back. */
  readonly dateFormatChosen = output<DateFormat | null>();
  readonly shown = output<TimesheetProblem>();

  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef);
  protected readonly kindWords = KIND_WORDS;
  protected readonly names = computed(() => groupUnknownNames(this.problems()));
  protected readonly datesToSettle = computed(() => {
    const unread = this.unreadDates();
    return unread && unread.offers.length > 0 ? unread : null;
  });
  protected readonly others = computed(() => {
    const settled = new Set(this.datesToSettle()?.cells);
    return this.problems().filter(
      ({ alias, code, cell }) => alias === null && !(code.startsWith('date_') && settled.has(cell)),
    );
  });
  protected readonly listed = computed(() => this.others().slice(0, LISTED_MAX));

  protected rowsOf(name: UnknownName): string {
    return count(name.rows.length, 'row');
  }

  protected choose(name: UnknownName, known: KnownName): void {
    this.nameChosen.emit({ kind: name.kind, spelling: name.spelling, ...known });
    this.keepFocus();
  }

  protected chooseDateFormat(format: DateFormat | null): void {
    this.dateFormatChosen.emit(format);
    this.keepFocus();
  }

  protected takeBack(name: ChosenName): void {
    this.takenBack.emit(name);
    this.keepFocus();
  }

  /** What was pressed goes away with the next check; the keyboard goes on from here. */
  private keepFocus(): void {
    this.host.nativeElement.focus({ preventScroll: true });
  }
}
