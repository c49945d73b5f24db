import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { Router, RouterLink } from '@angular/router';
import { type DepthCard } from '@brakeven/contract';
import { EmptyState, LoadingSkeleton, LocalDatePipe } from '@brakeven/ui';
import { todayIn } from '@brakeven/values';
import { TrialBendsApi } from '../../api/trial-bends-api';
import { SessionStore } from '../../session/session-store';
import { LoadError } from '../../shell/load-error';
import { Notifier } from '../../shell/notifier';
import { toAngleWords, toLengthNumber, toNumberWords, toSizeWords } from '../forming-words';
import { FormingStore } from '../forming-store';
import { findFirstPress } from '../press-tooling';
import { PrintButton } from '../print-button';
import { CardEditor } from './card-editor';

type CardCell = DepthCard['sheets'][number]['cells'][number];

/** The card for the press: the shop's usual sheets by angles, to print on one page and hang beside it. */
@Component({
  selector: 'app-card-page',
  imports: [CardEditor, EmptyState, LoadError, LoadingSkeleton, LocalDatePipe, PrintButton, RouterLink],
  templateUrl: './card-page.html',
  styleUrl: './card-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CardPage {
  /** Code of the machine, from the address. */
  readonly machine = input<string>();

  private readonly store = inject(FormingStore);
  private readonly session = inject(SessionStore);
  private readonly api = inject(TrialBendsApi);
  private readonly notifier = inject(Notifier);
  private readonly router = inject(Router);
  private readonly units = this.session.shopFormat().units;
  protected readonly unitWord = this.units === 'us' ? 'inches' : 'mm';
  protected readonly shopName = computed(() => this.session.shop()?.name ?? '');
  protected readonly today = todayIn(this.session.shopFormat().timeZone);
  protected readonly canEdit = computed(() => this.session.can('tooling.edit'));
  protected readonly isEditing = signal(false);

  protected readonly presses = this.store.presses;
  protected readonly press = computed(() => {
    const presses = this.presses();
    return presses.find(({ code }) => code === this.machine()) ?? findFirstPress(presses) ?? null;
  });
  protected readonly card = rxResource({
    params: () => this.press()?.machineId,
    stream: ({ params }) => this.api.getCard(params),
  });
  protected readonly angles = computed(() =>
    this.card.hasValue() ? this.card.value().angles.map((angle) => toAngleWords(angle)) : [],
  );
  protected readonly rows = computed(() =>
    this.card.hasValue() ? this.card.value().sheets.map((sheet) => this.toRow(sheet)) : [],
  );
  protected readonly hasGuess = computed(() =>
    this.rows().some(({ cells }) => cells.some(({ isGuess }) => isGuess)),
  );
  protected readonly refusals = computed(() => [
    ...new Set(this.rows().flatMap(({ cells }) => cells.flatMap(({ refusal }) => refusal ?? []))),
  ]);

  protected choose(code: string): void {
    this.isEditing.set(false);
    void this.router.navigate([], { queryParams: { machine: code }, replaceUrl: true });
  }

  protected take(card: DepthCard): void {
    this.card.set(card);
    this.isEditing.set(false);
    this.notifier.say('The card is changed.');
  }

  private toRow(sheet: DepthCard['sheets'][number]) {
    return {
      sheet: `${toSizeWords(Number(sheet.thicknessMm), this.units)} ${sheet.material}`,
      tools: `${sheet.punch} · ${toSizeWords(Number(sheet.openingMm), this.units)} on ${sheet.die}`,
      cells: sheet.cells.map((cell) => this.toCell(cell)),
    };
  }

  private toCell(cell: CardCell) {
    if (!('depthMm' in cell)) return { depth: '–', band: '', isGuess: false, refusal: cell.message };
    return {
      depth: toLengthNumber(cell.depthMm, this.units),
      band: `±${toNumberWords(cell.bandAngle, 1)}°`,
      isGuess: cell.isGuess,
      refusal: null,
    };
  }
}
