import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  type ElementRef,
  inject,
  input,
  output,
  signal,
  viewChild,
} from '@angular/core';
import { toObservable, toSignal } from '@angular/core/rxjs-interop';
import { MatAutocompleteModule } from '@angular/material/autocomplete';
import { RouterLink } from '@angular/router';
import { catchError, debounceTime, map, of, startWith, switchMap } from 'rxjs';
import { type UnknownName } from './group-unknown-names';
import { type KnownName, KnownNames } from './known-names';
import { KIND_WORDS } from './timesheet-words';

type Found = { names: KnownName[]; state: 'searching' | 'found' | 'failed' };

const NOTHING_YET: Found = { names: [], state: 'searching' };
const PAGES = { employee: '/people', job: '/jobs', operation: '/shop', machine: '/machines' } as const;

/** Near matches of a spelling as buttons, and a search through all that is known when none of them is right. */
@Component({
  selector: 'app-name-choice',
  imports: [MatAutocompleteModule, RouterLink],
  template: `
    <div class="chips" role="group" [attr.aria-label]="'What “' + name().spelling + '” stands for'">
      @for (offer of name().offers; track offer.targetId) {
        <button type="button" class="chip" [disabled]="isDisabled()" (click)="chosen.emit(offer)">
          {{ offer.label }}
        </button>
      }
      @if (!isSearching()) {
        <button type="button" class="chip other" [disabled]="isDisabled()" (click)="isSearching.set(true)">
          {{ name().offers.length > 0 ? 'Another…' : 'Choose…' }}
        </button>
      }
    </div>
    @if (isSearching()) {
      <div class="search">
        <label>
          <span class="visually-hidden">Search all {{ words().many }}</span>
          <input
            #box
            class="field"
            type="search"
            [placeholder]="'Search all ' + words().many"
            [matAutocomplete]="list"
            [value]="text()"
            (input)="text.set(box.value)"
          />
        </label>
        <mat-autocomplete
          #list="matAutocomplete"
          [displayWith]="toLabel"
          (optionSelected)="chosen.emit($event.option.value)"
        >
          @for (known of found().names; track known.targetId) {
            <mat-option [value]="known">{{ known.label }}</mat-option>
          }
        </mat-autocomplete>
        <p class="muted" role="status">
          @switch (found().state) {
            @case ('failed') {
              The list could not be fetched. Type again to retry.
            }
            @case ('found') {
              @if (found().names.length === 0) {
                No {{ words().one }} matches.
              }
              Not in the list? Add it under <a [routerLink]="page()">{{ words().page }}</a>, then check again.
            }
          }
        </p>
      </div>
    }
  `,
  styleUrl: './name-choice.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NameChoice {
  readonly name = input.required<Pick<UnknownName, 'kind' | 'spelling' | 'offers'>>();
  readonly isDisabled = input(false);
  readonly chosen = output<KnownName>();

  private readonly known = inject(KnownNames);
  private readonly box = viewChild<ElementRef<HTMLInputElement>>('box');
  protected readonly isSearching = signal(false);
  protected readonly text = signal('');
  protected readonly words = computed(() => KIND_WORDS[this.name().kind]);
  protected readonly page = computed(() => PAGES[this.name().kind]);
  private readonly wanted = computed(() => ({
    kind: this.name().kind,
    text: this.text(),
    isSearching: this.isSearching(),
  }));
  protected readonly found = toSignal(
    toObservable(this.wanted).pipe(
      debounceTime(150),
      switchMap(({ kind, text, isSearching }) => (isSearching ? this.search(kind, text) : of(NOTHING_YET))),
    ),
    { initialValue: NOTHING_YET },
  );

  constructor() {
    effect(() => this.box()?.nativeElement.focus());
  }

  protected readonly toLabel = (known: KnownName | string | null): string =>
    typeof known === 'object' && known !== null ? known.label : (known ?? '');

  private search(kind: UnknownName['kind'], text: string) {
    return this.known.search(kind, text).pipe(
      map((names): Found => ({ names, state: 'found' })),
      startWith<Found>({ ...NOTHING_YET, state: 'searching' }),
      catchError(() => of<Found>({ names: [], state: 'failed' })),
    );
  }
}
