import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { type OutsideService, type OutsideServiceList } from '@brakeven/contract';
import { todayIn } from '@brakeven/values';
import { JobMoneyApi } from '../api/job-money-api';
import { SessionStore } from '../session/session-store';
import { type DatedRows } from './dated-rows';
import { DatedRowsCard } from './dated-rows-card';
import { openRowDialog } from './open-row-dialog';
import { type OutsideServiceDialogData } from './outside-service-dialog';

/** What others did for a job, dated, with the total that the job bears. */
@Component({
  selector: 'app-outside-services-card',
  imports: [DatedRowsCard],
  template: `<app-dated-rows-card [rows]="rows()" (changed)="changed.emit()" />`,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class OutsideServicesCard {
  private readonly api = inject(JobMoneyApi);
  private readonly session = inject(SessionStore);
  private readonly dialog = inject(MatDialog);

  readonly jobId = input.required<string>();
  readonly changed = output();

  protected readonly rows = computed((): DatedRows<OutsideService, OutsideServiceList> => {
    const jobId = this.jobId();
    return {
      heading: 'Outside services',
      empty: ['None.', 'What others do for the job stands here: coating, galvanizing, machining.'],
      totalLabel: 'Total',
      columns: [
        { heading: 'Vendor', cell: ({ vendor }) => ({ text: vendor || '–' }) },
        { heading: 'Description', cell: ({ description }) => ({ text: description }) },
        {
          heading: 'Amount',
          isNumber: true,
          cell: ({ amount }) => ({ amount }),
          total: ({ total }) => ({
            amount: total,
            ref: { figure: 'job.outside', jobId },
            label: 'Outside services',
          }),
        },
      ],
      canEdit: this.session.can('jobs.edit'),
      actions: [{ label: 'Add an outside service', run: () => this.edit(null) }],
      load: () => this.api.listServices(jobId),
      idOf: ({ outsideServiceId }) => outsideServiceId,
      dateOf: ({ incurredOn }) => incurredOn,
      nameOf: toName,
      correct: (service) => this.edit(service),
      void: ({ outsideServiceId }) => this.api.voidService(outsideServiceId),
      restore: ({ outsideServiceId }) => this.api.restoreService(outsideServiceId),
    };
  });

  private edit(service: OutsideService | null) {
    const today = todayIn(this.session.shopFormat().timeZone);
    return openRowDialog<OutsideServiceDialogData, OutsideService>(
      this.dialog,
      async () => (await import('./outside-service-dialog')).OutsideServiceDialog,
      {
        data: { jobId: this.jobId(), service, today },
        width: '520px',
        tell: () => (service ? 'Outside service corrected.' : 'Outside service added.'),
      },
    );
  }
}

function toName({ vendor, description }: OutsideService): string {
  return [vendor, description].filter((words) => words !== '').join(', ') || 'Outside service';
}
