import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatDialog } from '@angular/material/dialog';
import { Router, RouterLink } from '@angular/router';
import { type Material, type SheetLot } from '@brakeven/contract';
import {
  EmptyState,
  Figure,
  LoadingSkeleton,
  LocalDatePipe,
  MassPipe,
  MoneyPipe,
  PageHeader,
  StatusTag,
} from '@brakeven/ui';
import { D, moneyText, sum, todayIn, toMoney } from '@brakeven/values';
import { MaterialsApi } from '../api/materials-api';
import { SessionStore } from '../session/session-store';
import { LoadError } from '../shell/load-error';
import { Notifier } from '../shell/notifier';
import { RollupStore } from '../shell/rollup-store';
import { type LotDialogData } from './lot-dialog';
import { type MaterialDialogData } from './material-dialog';
import { toMaterialFacts } from './material-words';
import { MASS_UNITS, toPriceWords } from './stock-text';

/** What is in stock, what it has cost, and when each material last came in. */
@Component({
  selector: 'app-materials-page',
  imports: [
    EmptyState,
    Figure,
    LoadError,
    LoadingSkeleton,
    LocalDatePipe,
    MassPipe,
    MoneyPipe,
    PageHeader,
    RouterLink,
    StatusTag,
  ],
  templateUrl: './materials-page.html',
  styleUrl: './materials-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MaterialsPage {
  private readonly api = inject(MaterialsApi);
  private readonly session = inject(SessionStore);
  private readonly dialog = inject(MatDialog);
  private readonly router = inject(Router);
  private readonly notifier = inject(Notifier);
  private readonly rollup = inject(RollupStore);

  protected readonly materials = rxResource({ stream: () => this.api.list() });
  protected readonly canEdit = computed(() => this.session.can('materials.edit'));
  protected readonly hasMoney = computed(() => this.session.can('materials.money'));
  private readonly units = computed(() => this.session.shopFormat().units);
  protected readonly massUnit = computed(() => MASS_UNITS[this.units()]);

  protected readonly rows = computed(() => {
    const materials = this.materials.hasValue() ? this.materials.value() : [];
    const highest = Math.max(0, ...materials.map(({ stockValue }) => Number(stockValue ?? 0)));
    return materials.map((material) => ({
      material,
      facts: toMaterialFacts(material, this.units()),
      isInStock: D(material.stockKg).gt(0),
      perUnit: toPriceWords(material.averagePerKg, this.session.shopFormat()),
      share: highest > 0 ? (100 * Number(material.stockValue ?? 0)) / highest : 0,
    }));
  });
  protected readonly totals = computed(() => {
    const materials = this.rows().map(({ material }) => material);
    return {
      stockKg: sum(materials.map(({ stockKg }) => D(stockKg))).toFixed(),
      value: moneyText(sum(materials.map(({ stockValue }) => toMoney(stockValue ?? '0')))),
      inStock: this.rows().filter(({ isInStock }) => isInStock).length,
    };
  });

  protected async add(): Promise<void> {
    const { MaterialDialog } = await import('./material-dialog');
    const data: MaterialDialogData = { material: null, units: this.units() };
    this.dialog
      .open<unknown, MaterialDialogData, Material>(MaterialDialog, { data, width: '600px' })
      .afterClosed()
      .subscribe((material) => {
        if (material) void this.router.navigate(['/materials', material.materialId]);
      });
  }

  protected async receive(material: Material): Promise<void> {
    const { LotDialog } = await import('./lot-dialog');
    const { units, timeZone } = this.session.shopFormat();
    const data: LotDialogData = { material, lot: null, today: todayIn(timeZone), units };
    this.dialog
      .open<unknown, LotDialogData, SheetLot>(LotDialog, { data, width: '560px' })
      .afterClosed()
      .subscribe((lot) => {
        if (!lot) return;
        this.notifier.say(`Lot ${lot.number} of ${material.name} received.`);
        this.materials.reload();
        void this.rollup.refresh();
      });
  }
}
