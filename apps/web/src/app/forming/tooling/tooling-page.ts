import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { type ComponentType } from '@angular/cdk/portal';
import { MatDialog } from '@angular/material/dialog';
import { type Die, type FormingMaterialDto, type FormingMachine, type Punch } from '@brakeven/contract';
import { EmptyState, ForcePipe, LengthPipe, StatusTag } from '@brakeven/ui';
import { type Observable } from 'rxjs';
import { FormingApi } from '../../api/forming-api';
import { toProblemSentence } from '../../api/problem-text';
import { confirm } from '../../forms/confirm-dialog';
import { STRESS_UNITS, toStressText } from '../../materials/stock-text';
import { SessionStore } from '../../session/session-store';
import { Notifier } from '../../shell/notifier';
import { toAngleWords, toNumberWords } from '../forming-words';
import { FormingStore } from '../forming-store';
import { listPresses } from '../press-tooling';
import { DieDialog } from './die-dialog';
import { GaugeCard } from './gauge-card';
import { LineDialog } from './line-dialog';
import { BendMaterialDialog } from './material-dialog';
import { PunchDialog } from './punch-dialog';
import { LIMIT_UNITS, toLimitText } from './tool-text';
import { ToolActions } from './tool-actions';

/** The tools of each press and the figures that bends are computed from, each with where it comes from. */
@Component({
  selector: 'app-tooling-page',
  imports: [EmptyState, ForcePipe, GaugeCard, LengthPipe, StatusTag, ToolActions],
  templateUrl: './tooling-page.html',
  styleUrl: './tooling-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ToolingPage {
  private readonly store = inject(FormingStore);
  private readonly session = inject(SessionStore);
  private readonly api = inject(FormingApi);
  private readonly dialog = inject(MatDialog);
  private readonly notifier = inject(Notifier);
  private readonly units = this.session.shopFormat().units;

  protected readonly limitUnit = LIMIT_UNITS[this.units];
  protected readonly stressUnit = STRESS_UNITS[this.units];
  protected readonly canEdit = computed(() => this.session.can('tooling.edit'));
  protected readonly known = this.store.known;
  protected readonly presses = computed(() => {
    const { punches, dies } = this.known();
    return listPresses(this.known()).map((machine) => ({
      machine,
      punches: punches.filter(({ machineId }) => machineId === machine.machineId),
      dies: dies.filter(({ machineId }) => machineId === machine.machineId),
    }));
  });

  protected limit(kilonewtonsPerM: string | null): string {
    return toLimitText(kilonewtonsPerM, this.units) || '–';
  }

  /** To one decimal of a ksi, or a whole MPa, below which no two sheets agree. */
  protected stress(mpa: string | null): string {
    if (mpa === null) return '–';
    return toNumberWords(Number(toStressText(mpa, this.units)), this.units === 'us' ? 1 : 0);
  }

  protected density({ densityKgM3 }: FormingMaterialDto): string {
    return toNumberWords(Number(densityKgM3) / 1000, 2);
  }

  protected angle(degrees: string | null): string {
    return degrees === null ? '–' : toAngleWords(Number(degrees));
  }

  protected editPunch({ machineId }: FormingMachine, punch: Punch | null): void {
    this.open(PunchDialog, { machineId, punch, units: this.units });
  }

  protected editDie({ machineId }: FormingMachine, die: Die | null): void {
    this.open(DieDialog, { machineId, die, units: this.units });
  }

  protected editMaterial(material: FormingMaterialDto | null): void {
    this.open(BendMaterialDialog, { material, units: this.units });
  }

  protected editLine(): void {
    this.open(LineDialog, { forceLinePercent: this.known().forceLinePercent });
  }

  protected removePunch(punch: Punch): void {
    this.ask(`Take ${punch.name} out?`, this.api.deletePunch(punch.punchId));
  }

  protected removeDie(die: Die): void {
    this.ask(`Take ${die.name} with all its openings out?`, this.api.deleteDie(die.dieId));
  }

  protected removeMaterial({ code, name, origin }: FormingMaterialDto): void {
    const question = origin === 'own' ? `Take ${name} out?` : `Put ${name} back to what is shipped?`;
    this.ask(question, this.api.deleteMaterial(code));
  }

  protected reload(): void {
    this.store.reload();
  }

  private ask(title: string, change: Observable<void>): void {
    const text = ['What has been bent and logged with it stays as it is; if there is any, this is refused.'];
    confirm(this.dialog, { title, text, action: 'Do it' }).subscribe((isConfirmed) => {
      if (!isConfirmed) return;
      change.subscribe({
        next: () => this.store.reload(),
        error: (error: unknown) => this.notifier.warn(toProblemSentence(error)),
      });
    });
  }

  private open<D>(dialog: ComponentType<unknown>, data: D): void {
    this.dialog
      .open<unknown, D>(dialog, { data, width: '620px' })
      .afterClosed()
      .subscribe((answer) => {
        if (answer) this.store.reload();
      });
  }
}
