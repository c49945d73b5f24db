import { ChangeDetectionStrategy, Component, computed, inject, output, signal } from '@angular/core';
import { MatProgressBarModule } from '@angular/material/progress-bar';
import { LIMITS, type SetupResult } from '@brakeven/contract';
import { ErrorState, StatusTag } from '@brakeven/ui';
import { finalize } from 'rxjs';
import { type ShownProblem, toShownProblem } from '../api/problem-text';
import { ShopApi } from '../api/shop-api';
import { FileDrop } from '../files/file-drop';
import { type FileRule } from '../files/find-file-problem';
import { findSetupVerdict, listSheetCounts } from './setup-words';

/** Sets the shop up, or brings it up to date, from one workbook: check first, then all of it or nothing. */
@Component({
  selector: 'app-setup-card',
  imports: [ErrorState, FileDrop, MatProgressBarModule, StatusTag],
  templateUrl: './setup-card.html',
  styleUrl: './setup-card.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SetupCard {
  /** The register has changed: other cards should look again. */
  readonly imported = output();

  private readonly api = inject(ShopApi);
  protected readonly templateUrl = this.api.setupTemplateUrl;
  protected readonly rule: FileRule = { endings: ['.xlsx'], bytesMax: LIMITS.uploadBytesMax };
  protected readonly file = signal<File | null>(null);
  protected readonly checked = signal<SetupResult | null>(null);
  protected readonly done = signal<SetupResult | null>(null);
  protected readonly busy = signal<'checking' | 'importing' | null>(null);
  protected readonly problem = signal<ShownProblem | null>(null);

  protected readonly result = computed(() => this.done() ?? this.checked());
  protected readonly counts = computed(() => listSheetCounts(this.result() ?? EMPTY));
  protected readonly verdict = computed(() => {
    const checked = this.checked();
    return checked && findSetupVerdict(checked);
  });

  protected open(file: File): void {
    this.file.set(file);
    this.checked.set(null);
    this.done.set(null);
    this.check();
  }

  protected check(): void {
    const file = this.file();
    if (!file) return;
    this.run('checking', this.api.checkSetup(file), (result) => this.checked.set(result));
  }

  protected import(): void {
    const file = this.file();
    if (!file) return;
    this.run('importing', this.api.importSetup(file), (result) => {
      this.done.set(result);
      this.imported.emit();
    });
  }

  private run(
    kind: 'checking' | 'importing',
    answer: ReturnType<ShopApi['checkSetup']>,
    take: (r: SetupResult) => void,
  ) {
    this.busy.set(kind);
    this.problem.set(null);
    answer.pipe(finalize(() => this.busy.set(null))).subscribe({
      next: take,
      error: (error: unknown) => this.problem.set(toShownProblem(error)),
    });
  }
}

const NONE = {
  people: 0,
  customers: 0,
  operations: 0,
  machines: 0,
  machineCosts: 0,
  machineRates: 0,
  overhead: 0,
  jobs: 0,
  punches: 0,
  dies: 0,
  materials: 0,
  sheetLots: 0,
  issues: 0,
  outsideServices: 0,
  invoices: 0,
  estimates: 0,
};
const EMPTY: SetupResult = { added: NONE, changed: NONE, alreadyThere: NONE, problems: [] };
