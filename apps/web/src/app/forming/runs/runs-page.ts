import { ChangeDetectionStrategy, Component, computed, inject, input, viewChild } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatDialog } from '@angular/material/dialog';
import { Router } from '@angular/router';
import { type PressRun, type PressRunFilter, type PressRunQuery } from '@brakeven/contract';
import {
  Chart,
  type ChartPalette,
  EmptyState,
  Grid,
  type GridOrder,
  LoadingSkeleton,
  type PageSource,
} from '@brakeven/ui';
import { PressRunsApi } from '../../api/press-runs-api';
import { toProblemSentence } from '../../api/problem-text';
import { SessionStore } from '../../session/session-store';
import { injectGridAddress, toGridOrder } from '../../shell/grid-address';
import { LoadError } from '../../shell/load-error';
import { Notifier } from '../../shell/notifier';
import { toPercentWords, toSizeWords } from '../forming-words';
import { FormingStore } from '../forming-store';
import { toDistributionOption, toDistributionTable, toDistributionWords } from './distribution-option';
import { toRunColumns } from './run-columns';
import { RunDialog, type RunDialogData } from './run-dialog';

const DEFAULT_ORDER: GridOrder = { sort: 'runOn', direction: 'desc' };

/** Press runs: what was bent with what, and how much of the rating it took. */
@Component({
  selector: 'app-runs-page',
  imports: [Chart, EmptyState, Grid, LoadError, LoadingSkeleton],
  templateUrl: './runs-page.html',
  styleUrl: './runs-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RunsPage {
  readonly search = input<string>();
  readonly machineId = input<string>();
  readonly dieOpeningId = input<string>();
  readonly materialCode = input<string>();
  readonly aboveLine = input<string>();
  readonly sort = input<string>();
  readonly direction = input<string>();

  private readonly api = inject(PressRunsApi);
  private readonly store = inject(FormingStore);
  private readonly session = inject(SessionStore);
  private readonly notifier = inject(Notifier);
  private readonly dialog = inject(MatDialog);
  private readonly router = inject(Router);
  private readonly grid = viewChild<Grid<PressRun>>(Grid);
  protected readonly address = injectGridAddress();
  private readonly units = this.session.shopFormat().units;

  protected readonly forceUnit = this.units === 'us' ? 'US tons' : 'kN';
  protected readonly canSeeAll = computed(() => this.session.can('press-runs.view'));
  protected readonly line = computed(() => toPercentWords(this.store.lineShare()));
  protected readonly presses = this.store.presses;
  protected readonly materials = this.store.materials;
  protected readonly openings = computed(() =>
    this.store.presses().flatMap((press) =>
      press.openings.map((opening) => ({
        id: opening.code,
        label: `${press.name}: ${toSizeWords(opening.openingMm, this.units)}, ${opening.dieName}`,
      })),
    ),
  );
  protected readonly filter = computed<PressRunFilter>(() => ({
    search: this.search(),
    machineId: this.machineId(),
    dieOpeningId: this.dieOpeningId(),
    materialCode: this.materialCode(),
    aboveLine: this.aboveLine() === 'true' ? 'true' : undefined,
  }));
  protected readonly isFiltered = computed(() => Object.values(this.filter()).some(Boolean));
  protected readonly source = computed<PageSource<PressRun>>(() => {
    const filter = this.filter();
    return { load: (request) => this.api.list({ ...filter, ...(request as Partial<PressRunQuery>) }) };
  });
  protected readonly order = computed(() => toGridOrder(this.sort(), this.direction(), DEFAULT_ORDER));
  protected readonly columns = computed(() =>
    toRunColumns({
      units: this.units,
      canOpenJobs: this.session.can('jobs.view'),
      isNarrow: this.address.isNarrow,
      correctRun: (run) => this.openDialog(run, 'The run is corrected.'),
      voidRun: (run) => this.void(run),
    }),
  );
  protected readonly distribution = rxResource({
    params: () => (this.canSeeAll() ? this.filter() : undefined),
    stream: ({ params }) => this.api.getDistribution(params),
  });
  protected readonly chart = computed(() => {
    if (!this.distribution.hasValue()) return null;
    const facts = this.distribution.value();
    return {
      runs: facts.runs,
      above: facts.runsAboveLine,
      summary: toDistributionWords(facts),
      build: (palette: ChartPalette) => toDistributionOption(facts, palette),
      table: toDistributionTable(facts),
    };
  });
  protected readonly rowId = (run: PressRun): string => run.pressRunId;
  protected readonly rowTone = (run: PressRun): 'problem' | null => (run.isAboveLine ? 'problem' : null);

  protected clear(): void {
    void this.router.navigate([], { queryParams: {} });
  }

  protected log(): void {
    this.openDialog(null, 'The run is logged.');
  }

  private openDialog(run: PressRun | null, done: string): void {
    const data: RunDialogData = { facts: this.store.facts(), run };
    this.dialog
      .open<RunDialog, RunDialogData, PressRun>(RunDialog, { data, width: '640px' })
      .afterClosed()
      .subscribe((saved) => {
        if (!saved) return;
        this.reload();
        const share = saved.share === null ? '' : ` It took ${toPercentWords(saved.share)} of the rating.`;
        this.notifier.say(`${done}${share}`);
      });
  }

  private void(run: PressRun): void {
    this.api.void(run.pressRunId).subscribe({
      next: () => {
        this.reload();
        this.notifier.say(`Voided the run of ${run.jobNumber}.`, () => this.restore(run));
      },
      error: (error: unknown) => this.notifier.warn(toProblemSentence(error)),
    });
  }

  private restore({ pressRunId }: PressRun): void {
    this.api.restore(pressRunId).subscribe({
      next: () => this.reload(),
      error: (error: unknown) => this.notifier.warn(toProblemSentence(error)),
    });
  }

  private reload(): void {
    this.grid()?.refresh();
    this.distribution.reload();
  }
}
