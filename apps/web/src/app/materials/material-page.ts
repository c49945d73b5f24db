import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  input,
  signal,
  viewChild,
} from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatDialog } from '@angular/material/dialog';
import { Router, RouterLink } from '@angular/router';
import {
  type FigureRef,
  type IssueKind,
  type Material,
  type StockMove,
  type StockMoveQuery,
} from '@brakeven/contract';
import {
  EmptyState,
  Figure,
  Grid,
  type GridAction,
  LoadingSkeleton,
  LocalDatePipe,
  MassPipe,
  PageHeader,
  type PageSource,
} from '@brakeven/ui';
import { todayIn } from '@brakeven/values';
import { type Observable } from 'rxjs';
import { MaterialsApi } from '../api/materials-api';
import { toProblemSentence } from '../api/problem-text';
import { SessionStore } from '../session/session-store';
import { LoadError } from '../shell/load-error';
import { Notifier } from '../shell/notifier';
import { RollupStore } from '../shell/rollup-store';
import { type IssueStart } from './issue-form';
import { MOVE_WORDS, toLedgerColumns } from './ledger-columns';
import { type LotDialogData } from './lot-dialog';
import { type MaterialDialogData } from './material-dialog';
import { toMaterialFacts } from './material-words';
import { MASS_UNITS, toPriceWords } from './stock-text';
import { toIssueRow } from './to-issue-row';

const SHOWN: readonly { show: StockMoveQuery['show']; word: string }[] = [
  { show: 'all', word: 'All that counts' },
  { show: 'lot', word: 'Lots' },
  { show: 'issue', word: 'Issues' },
  { show: 'return', word: 'Returns' },
  { show: 'voided', word: 'Voided' },
];

/** One material: its stock at a glance, then every move that made it, each of which can be corrected or voided. */
@Component({
  selector: 'app-material-page',
  imports: [
    EmptyState,
    Figure,
    Grid,
    LoadError,
    LoadingSkeleton,
    LocalDatePipe,
    MassPipe,
    PageHeader,
    RouterLink,
  ],
  templateUrl: './material-page.html',
  styleUrl: './material-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MaterialPage {
  private readonly api = inject(MaterialsApi);
  private readonly session = inject(SessionStore);
  private readonly dialog = inject(MatDialog);
  private readonly notifier = inject(Notifier);
  private readonly rollup = inject(RollupStore);
  private readonly router = inject(Router);
  private readonly grid = viewChild<Grid<StockMove>>(Grid);

  /** From the address. */
  readonly materialId = input.required<string>();

  protected readonly material = rxResource({
    params: () => this.materialId(),
    stream: ({ params }) => this.api.get(params),
  });
  protected readonly canEdit = computed(() => this.session.can('materials.edit'));
  protected readonly hasMoney = computed(() => this.session.can('materials.money'));
  private readonly units = computed(() => this.session.shopFormat().units);
  protected readonly massUnit = computed(() => MASS_UNITS[this.units()]);
  protected readonly valueRef = computed<FigureRef>(() => ({
    figure: 'stock.value',
    materialId: this.materialId(),
  }));

  protected readonly choices = SHOWN;
  protected readonly show = signal<StockMoveQuery['show']>('all');
  protected readonly rowId = (move: StockMove): string => move.moveId;
  protected readonly columns = computed(() =>
    toLedgerColumns({
      units: this.units(),
      currency: this.session.shopFormat().currency,
      withMoney: this.hasMoney(),
      isVoided: this.show() === 'voided',
      actionsOf: this.canEdit() ? (move) => this.listActions(move) : null,
    }),
  );
  protected readonly source = computed<PageSource<StockMove>>(() => {
    const [materialId, show] = [this.materialId(), this.show()];
    return { load: ({ cursor, limit }) => this.api.listMoves(materialId, { show, cursor, limit }) };
  });

  protected toFacts(material: Material): string {
    return toMaterialFacts(material, this.units());
  }

  protected toPrice(ratePerKg: string | null | undefined): string {
    return toPriceWords(ratePerKg, this.session.shopFormat());
  }

  protected async edit(material: Material): Promise<void> {
    const { MaterialDialog } = await import('./material-dialog');
    const data: MaterialDialogData = { material, units: this.units() };
    const dialog = this.dialog.open<unknown, MaterialDialogData, Material>(MaterialDialog, {
      data,
      width: '600px',
    });
    dialog.afterClosed().subscribe((saved) => {
      if (saved) this.reload(`${saved.name} saved.`);
    });
  }

  protected async openLot(lot: StockMove | null): Promise<void> {
    if (!this.material.hasValue()) return;
    const { LotDialog } = await import('./lot-dialog');
    const data: LotDialogData = { material: this.material.value(), lot, ...this.toDay() };
    this.dialog
      .open<unknown, LotDialogData>(LotDialog, { data, width: '560px' })
      .afterClosed()
      .subscribe((saved) => saved && this.reload(lot ? 'Lot corrected.' : 'Lot received.'));
  }

  protected async openIssue(move: StockMove | null, kind: IssueKind): Promise<void> {
    const { IssueDialog } = await import('./issue-dialog');
    const materialId = this.materialId();
    const issue = move && toIssueRow(move, materialId);
    const data: IssueStart = { issue, kind, jobId: issue?.jobId ?? '', materialId, ...this.toDay() };
    this.dialog
      .open<unknown, IssueStart>(IssueDialog, { data, width: '560px' })
      .afterClosed()
      .subscribe((saved) => saved && this.reload(move ? 'Corrected.' : 'Entered.'));
  }

  protected openLink(url: string): void {
    void this.router.navigateByUrl(url);
  }

  private listActions(move: StockMove): readonly GridAction[] {
    if (move.voidedAt !== null)
      return [{ label: 'Restore', run: () => this.change(this.toRestore(move), 'Put back.') }];
    const correct = () => (move.kind === 'lot' ? this.openLot(move) : this.openIssue(move, move.kind));
    return [
      { label: 'Correct', run: () => void correct() },
      { label: 'Void', run: () => this.voidMove(move) },
    ];
  }

  private voidMove(move: StockMove): void {
    const request = move.kind === 'lot' ? this.api.voidLot(move.moveId) : this.api.voidIssue(move.moveId);
    this.change(request, `${MOVE_WORDS[move.kind]} row voided.`, () =>
      this.change(this.toRestore(move), 'Put back.'),
    );
  }

  private toRestore({ kind, moveId }: StockMove): Observable<void> {
    return kind === 'lot' ? this.api.restoreLot(moveId) : this.api.restoreIssue(moveId);
  }

  private change(request: Observable<void>, done: string, undo?: () => void): void {
    request.subscribe({
      next: () => this.reload(done, undo),
      error: (error: unknown) => this.notifier.warn(toProblemSentence(error)),
    });
  }

  private reload(done: string, undo?: () => void): void {
    this.notifier.say(done, undo);
    this.material.reload();
    this.grid()?.refresh();
    void this.rollup.refresh();
  }

  private toDay() {
    const { units, timeZone } = this.session.shopFormat();
    return { today: todayIn(timeZone), units };
  }
}
