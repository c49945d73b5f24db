import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { rxResource, takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MatDialog } from '@angular/material/dialog';
import { type FigureRef, type OutsideService } from '@brakeven/contract';
import { Figure, LoadingSkeleton, LocalDatePipe, MoneyPipe, StatusTag } from '@brakeven/ui';
import { todayIn } from '@brakeven/values';
import { JobMoneyApi } from '../api/job-money-api';
import { SessionStore } from '../session/session-store';
import { LoadError } from '../shell/load-error';
import { type OutsideServiceDialogData } from './outside-service-dialog';
import { RowChanges } from './row-changes';

/** What others did for a job, dated, with the total that the job bears. */
@Component({
  selector: 'app-outside-services-card',
  imports: [Figure, LoadError, LoadingSkeleton, LocalDatePipe, MoneyPipe, StatusTag],
  providers: [RowChanges],
  templateUrl: './outside-services-card.html',
  styleUrl: './voided-row.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class OutsideServicesCard {
  private readonly api = inject(JobMoneyApi);
  private readonly session = inject(SessionStore);
  private readonly dialog = inject(MatDialog);
  private readonly changes = inject(RowChanges);

  readonly jobId = input.required<string>();
  readonly changed = output();

  protected readonly list = rxResource({
    params: () => this.jobId(),
    stream: ({ params }) => this.api.listServices(params),
  });
  protected readonly canEdit = computed(() => this.session.can('jobs.edit'));
  protected readonly totalRef = computed<FigureRef>(() => ({ figure: 'job.outside', jobId: this.jobId() }));

  constructor() {
    this.changes.changed.pipe(takeUntilDestroyed()).subscribe(() => {
      this.list.reload();
      this.changed.emit();
    });
  }

  protected async edit(service: OutsideService | null): Promise<void> {
    const { OutsideServiceDialog } = await import('./outside-service-dialog');
    const today = todayIn(this.session.shopFormat().timeZone);
    const data: OutsideServiceDialogData = { jobId: this.jobId(), service, today };
    this.dialog
      .open<unknown, OutsideServiceDialogData>(OutsideServiceDialog, { data, width: '520px' })
      .afterClosed()
      .subscribe((saved) => {
        if (saved) this.changes.tell(service ? 'Outside service corrected.' : 'Outside service added.');
      });
  }

  protected voidRow(service: OutsideService): void {
    const id = service.outsideServiceId;
    this.changes.void(toName(service), this.api.voidService(id), () => this.api.restoreService(id));
  }

  protected restore(service: OutsideService): void {
    this.changes.restore(toName(service), this.api.restoreService(service.outsideServiceId));
  }

  protected readonly nameOf = toName;
}

function toName({ vendor, description }: OutsideService): string {
  return [vendor, description].filter((words) => words !== '').join(', ') || 'Outside service';
}
