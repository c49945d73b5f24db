import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { RouterLink } from '@angular/router';
import { type Shop } from '@brakeven/contract';
import { PageHeader } from '@brakeven/ui';
import { SessionStore } from '../session/session-store';
import { RollupStore } from '../shell/rollup-store';
import { AuditCard } from './audit-card';
import { OperationsCard } from './operations-card';
import { OVERTIME_CAUTION, toOvertimeSentence } from './overtime-words';
import { SetupCard } from './setup-card';
import { ShopDialog } from './shop-dialog';
import { UNIT_WORDS, WEEKDAYS } from './shop-words';
import { UsersCard } from './users-card';

const SECTIONS = [
  { id: 'settings', label: 'Settings' },
  { id: 'users', label: 'Users' },
  { id: 'operations', label: 'Operations' },
  { id: 'tools', label: 'Dies and punches' },
  { id: 'setup', label: 'Set-up workbook' },
  { id: 'audit', label: 'Audit trail' },
] as const;

/** The shop itself: settings, users, operations, set-up by workbook, and who changed what. */
@Component({
  selector: 'app-shop-page',
  imports: [AuditCard, OperationsCard, PageHeader, RouterLink, SetupCard, UsersCard],
  templateUrl: './shop-page.html',
  styleUrl: './shop-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ShopPage {
  private readonly session = inject(SessionStore);
  private readonly dialog = inject(MatDialog);
  private readonly rollup = inject(RollupStore);

  protected readonly shop = this.session.shop;
  protected readonly sections = SECTIONS;
  protected readonly weekdays = WEEKDAYS;
  protected readonly units = UNIT_WORDS;
  protected readonly caution = OVERTIME_CAUTION;
  protected readonly overtimeSentence = toOvertimeSentence;
  /** A new number after the register has changed under the cards: they are drawn anew. */
  protected readonly round = signal(0);

  protected edit(shop: Shop): void {
    this.dialog
      .open<ShopDialog, Shop, Shop>(ShopDialog, { data: shop, width: '520px' })
      .afterClosed()
      .subscribe((saved) => {
        if (!saved) return;
        void this.session.reload();
        void this.rollup.refresh();
      });
  }

  protected reload(): void {
    this.round.update((round) => round + 1);
    void this.rollup.refresh();
  }
}
