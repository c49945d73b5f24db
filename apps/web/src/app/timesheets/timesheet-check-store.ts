import { computed, DestroyRef, inject, Injectable, signal } from '@angular/core';
import {
  type Progress,
  type TimesheetCheck,
  type TimesheetImported,
  type TimesheetMapping,
  type TimesheetOptions,
} from '@brakeven/contract';
import { finalize, type Observable, type Subscription } from 'rxjs';
import { type ShownProblem, toShownProblem } from '../api/problem-text';
import { v4 as uuid } from 'uuid';
import { ProgressApi } from '../api/progress-api';
import { TimesheetsApi, type Upload } from '../api/timesheets-api';
import { type ChosenName, withChosenName, withoutChosenName } from './group-unknown-names';

/** Columns are set one after the other: the check waits until no more are. */
const QUIET_MS = 600;

/** What runs on the server for the file at hand. */
export interface Activity {
  kind: 'checking' | 'committing';
  progress: Progress | null;
}

/**
 * The file at hand on its way from the drop zone to the books. The browser keeps the file and sends it with every
 * check, so that a check that fails loses nothing: the last good one stays on screen.
 */
@Injectable()
export class TimesheetCheckStore {
  private readonly api = inject(TimesheetsApi);
  private readonly progressApi = inject(ProgressApi);
  private running: Subscription | null = null;
  private timer: ReturnType<typeof setTimeout> | undefined;

  private readonly fileAtHand = signal<File | null>(null);
  private readonly lastCheck = signal<TimesheetCheck | null>(null);
  private readonly lastImport = signal<TimesheetImported | null>(null);
  private readonly chosenMapping = signal<TimesheetMapping | null>(null);
  private readonly names = signal<readonly ChosenName[]>([]);
  private readonly current = signal<Activity | null>(null);
  private readonly lastProblem = signal<ShownProblem | null>(null);

  readonly file = this.fileAtHand.asReadonly();
  readonly check = this.lastCheck.asReadonly();
  readonly imported = this.lastImport.asReadonly();
  readonly chosenNames = this.names.asReadonly();
  readonly activity = this.current.asReadonly();
  readonly problem = this.lastProblem.asReadonly();
  /** The mapping that the user has chosen, also when the server could not check it yet. */
  readonly mapping = computed(() => this.chosenMapping() ?? this.lastCheck()?.mapping ?? null);
  private readonly isWaiting = signal(false);
  /** A check is under way or about to be: what is shown may not be what would be committed. */
  readonly isBusy = computed(() => this.isWaiting() || this.current() !== null);

  constructor() {
    inject(DestroyRef).onDestroy(() => this.stop());
  }

  /** Takes a new file and checks it; choices made for another file are gone. */
  open(file: File): void {
    this.close();
    this.fileAtHand.set(file);
    this.runCheck();
  }

  /** Puts the file away. */
  close(): void {
    this.stop();
    this.fileAtHand.set(null);
    this.lastCheck.set(null);
    this.lastImport.set(null);
    this.chosenMapping.set(null);
    this.names.set([]);
    this.lastProblem.set(null);
  }

  setMapping(mapping: TimesheetMapping): void {
    this.chosenMapping.set(mapping);
    this.isWaiting.set(true);
    clearTimeout(this.timer);
    this.timer = setTimeout(() => this.runCheck(), QUIET_MS);
  }

  chooseName(name: ChosenName): void {
    this.names.update((names) => withChosenName(names, name));
    this.runCheck();
  }

  takeNameBack(name: ChosenName): void {
    this.names.update((names) => withoutChosenName(names, name));
    this.runCheck();
  }

  /** Checks the file again as it is. */
  runCheck(): void {
    const file = this.fileAtHand();
    if (!file) return;
    const options = this.toOptions();
    this.run('checking', options, this.api.check(file, options), (check) => this.lastCheck.set(check));
  }

  /** Commits; with `goodRows` those that are refused stay out. `done` hears of an import that went in. */
  commit(goodRows: boolean, done: (imported: TimesheetImported) => void): void {
    const file = this.fileAtHand();
    if (!file || this.isBusy()) return;
    const options = { ...this.toOptions(), goodRows };
    this.run('committing', options, this.api.commit(file, options), (imported) => {
      this.lastImport.set(imported);
      done(imported);
    });
  }

  private stop(): void {
    clearTimeout(this.timer);
    this.isWaiting.set(false);
    this.running?.unsubscribe();
  }

  private toOptions(): Partial<TimesheetOptions> & { progressId: string } {
    const mapping = this.chosenMapping();
    return {
      ...(mapping && { mapping }),
      aliases: this.names().map(({ kind, spelling, targetId }) => ({ kind, spelling, targetId })),
      progressId: uuid(),
    };
  }

  private run<T>(
    kind: Activity['kind'],
    options: { progressId: string },
    upload: Observable<Upload<T>>,
    take: (answer: T) => void,
  ): void {
    this.stop();
    this.current.set({ kind, progress: null });
    this.lastProblem.set(null);
    const news = this.progressApi
      .watch(options.progressId)
      .subscribe((progress) => this.current.update((activity) => activity && { ...activity, progress }));
    this.running = upload
      .pipe(
        finalize(() => {
          news.unsubscribe();
          this.current.set(null);
        }),
      )
      .subscribe({
        next: (event) => {
          if ('answer' in event) take(event.answer);
        },
        error: (error: unknown) => this.lastProblem.set(toShownProblem(error)),
      });
  }
}
