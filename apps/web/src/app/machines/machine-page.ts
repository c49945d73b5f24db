import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatDialog } from '@angular/material/dialog';
import { Router, RouterLink } from '@angular/router';
import { type Machine, type MachineCostItem, type MachineRate } from '@brakeven/contract';
import { ForcePipe, LengthPipe, LoadingSkeleton, LocalDatePipe, PageHeader } from '@brakeven/ui';
import { todayIn } from '@brakeven/values';
import { type Observable } from 'rxjs';
import { MachinesApi } from '../api/machines-api';
import { toProblemSentence } from '../api/problem-text';
import { SessionStore } from '../session/session-store';
import { LoadError } from '../shell/load-error';
import { Notifier } from '../shell/notifier';
import { RollupStore } from '../shell/rollup-store';
import { CostItemDialog, type CostItemDialogData } from './cost-item-dialog';
import { findCurrentRate } from '../rates/current-rate';
import { LandedCostCard } from './landed-cost-card';
import { MachineDialog, type MachineDialogData } from './machine-dialog';
import { MachineRateDialog, type MachineRateDialogData } from './machine-rate-dialog';
import { MachineRatesCard } from './machine-rates-card';
import { PlateCaution } from './plate-caution';

/** One machine: facts, landed cost and rates, each of which can be corrected and the correction taken back. */
@Component({
  selector: 'app-machine-page',
  imports: [
    ForcePipe,
    LandedCostCard,
    LengthPipe,
    LoadError,
    LoadingSkeleton,
    LocalDatePipe,
    MachineRatesCard,
    PageHeader,
    PlateCaution,
    RouterLink,
  ],
  templateUrl: './machine-page.html',
  styleUrl: './machine-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MachinePage {
  readonly machineId = input.required<string>();

  private readonly api = inject(MachinesApi);
  private readonly session = inject(SessionStore);
  private readonly dialog = inject(MatDialog);
  private readonly notifier = inject(Notifier);
  private readonly rollup = inject(RollupStore);
  private readonly router = inject(Router);

  protected readonly machine = rxResource({
    params: () => this.machineId(),
    stream: ({ params }) => this.api.get(params),
  });
  protected readonly canEdit = computed(() => this.session.can('machines.edit'));
  protected readonly canSeePayback = computed(() => this.session.can('payback.view'));
  protected readonly today = computed(() => todayIn(this.session.shopFormat().timeZone));

  protected edit(machine: Machine): void {
    const data: MachineDialogData = { machine, units: this.session.shopFormat().units };
    this.take(
      this.dialog
        .open<MachineDialog, MachineDialogData, Machine>(MachineDialog, { data, width: '560px' })
        .afterClosed(),
    );
  }

  protected editCostItem(item: MachineCostItem | null): void {
    const data: CostItemDialogData = { machineId: this.machineId(), item, today: this.today() };
    this.take(
      this.dialog
        .open<CostItemDialog, CostItemDialogData, Machine>(CostItemDialog, { data, width: '520px' })
        .afterClosed(),
    );
  }

  protected deleteCostItem(item: MachineCostItem): void {
    const { machineCostItemId, ...input } = item;
    this.change(this.api.deleteCostItem(this.machineId(), machineCostItemId), 'Cost taken out.', () =>
      this.change(this.api.addCostItem(this.machineId(), input), 'Cost put back.'),
    );
  }

  protected editRate(rate: MachineRate | null, rates: readonly MachineRate[]): void {
    if (rate?.basis) return this.buildAnew(rate);
    const current = findCurrentRate(rates, this.today()) ?? rates[0] ?? null;
    const data: MachineRateDialogData = { machineId: this.machineId(), rate, current, today: this.today() };
    this.take(
      this.dialog
        .open<MachineRateDialog, MachineRateDialogData, Machine>(MachineRateDialog, { data, width: '480px' })
        .afterClosed(),
    );
  }

  /** What was built is built anew: typed over, it would lose what it was built from. */
  private buildAnew({ machineRateId }: MachineRate): void {
    void this.router.navigate(['/machines', this.machineId(), 'rate'], {
      queryParams: { rate: machineRateId },
    });
  }

  protected deleteRate(rate: MachineRate): void {
    const { machineRateId, basis, ...input } = rate;
    const putBack = () =>
      basis
        ? this.api.addBuiltRate(this.machineId(), { ...input, basis })
        : this.api.addRate(this.machineId(), input);
    this.change(this.api.deleteRate(this.machineId(), machineRateId), 'Rates taken out.', () =>
      this.change(putBack(), 'Rates put back.'),
    );
  }

  private take(closed: Observable<Machine | undefined>): void {
    closed.subscribe((machine) => {
      if (machine) this.show(machine);
    });
  }

  private change(answer: Observable<Machine>, done: string, undo?: () => void): void {
    answer.subscribe({
      next: (machine) => {
        this.show(machine);
        this.notifier.say(done, undo);
      },
      error: (error: unknown) => this.notifier.warn(toProblemSentence(error)),
    });
  }

  private show(machine: Machine): void {
    this.machine.set(machine);
    void this.rollup.refresh();
  }
}
