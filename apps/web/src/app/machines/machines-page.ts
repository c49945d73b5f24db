import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatDialog } from '@angular/material/dialog';
import { Router, RouterLink } from '@angular/router';
import { type FigureRef, type Machine } from '@brakeven/contract';
import {
  EmptyState,
  Figure,
  ForcePipe,
  LengthPipe,
  LoadingSkeleton,
  LocalDatePipe,
  PageHeader,
  RatePipe,
  StatusTag,
} from '@brakeven/ui';
import { todayIn } from '@brakeven/values';
import { MachinesApi } from '../api/machines-api';
import { SessionStore } from '../session/session-store';
import { LoadError } from '../shell/load-error';
import { findCurrentRate } from '../rates/current-rate';
import { MachineDialog, type MachineDialogData } from './machine-dialog';
import { PlateCaution } from './plate-caution';

/** The register: what stands in the shop, what it is rated for, and what an hour on it costs and earns. */
@Component({
  selector: 'app-machines-page',
  imports: [
    EmptyState,
    Figure,
    ForcePipe,
    LengthPipe,
    LoadError,
    LoadingSkeleton,
    LocalDatePipe,
    PageHeader,
    PlateCaution,
    RatePipe,
    RouterLink,
    StatusTag,
  ],
  templateUrl: './machines-page.html',
  styleUrl: './machines-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MachinesPage {
  private readonly api = inject(MachinesApi);
  private readonly session = inject(SessionStore);
  private readonly dialog = inject(MatDialog);
  private readonly router = inject(Router);

  protected readonly machines = rxResource({ stream: () => this.api.list() });
  protected readonly canEdit = computed(() => this.session.can('machines.edit'));
  protected readonly cards = computed(() =>
    this.machines.hasValue()
      ? this.machines.value().map((machine) => ({ machine, rate: this.findRate(machine) }))
      : [],
  );

  protected outlayRef(machineId: string): FigureRef {
    return { figure: 'payback.outlay', machineId };
  }

  protected add(): void {
    const data: MachineDialogData = { machine: null, units: this.session.shopFormat().units };
    this.dialog
      .open<MachineDialog, MachineDialogData, Machine>(MachineDialog, { data, width: '560px' })
      .afterClosed()
      .subscribe((machine) => {
        if (machine) void this.router.navigate(['/machines', machine.machineId]);
      });
  }

  private findRate(machine: Machine) {
    return machine.rates && findCurrentRate(machine.rates, todayIn(this.session.shopFormat().timeZone));
  }
}
