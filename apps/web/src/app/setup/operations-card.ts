import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatDialog } from '@angular/material/dialog';
import { type Operation } from '@brakeven/contract';
import { EmptyState, LoadingSkeleton } from '@brakeven/ui';
import { MachinesApi } from '../api/machines-api';
import { ShopApi } from '../api/shop-api';
import { LoadError } from '../shell/load-error';
import { RollupStore } from '../shell/rollup-store';
import { OperationDialog, type OperationDialogData } from './operation-dialog';

/** What is done to a job, and on which machine unless the timesheet says another. */
@Component({
  selector: 'app-operations-card',
  imports: [EmptyState, LoadError, LoadingSkeleton],
  template: `
    <section class="card" aria-labelledby="operations-heading">
      <div class="head">
        <h2 id="operations-heading">Operations</h2>
        <button type="button" class="button" (click)="edit(null)">Add an operation</button>
      </div>
      @if (operations.error(); as error) {
        <app-load-error [error]="error" (retried)="operations.reload()" />
      } @else if (operations.hasValue()) {
        @if (operations.value().length === 0) {
          <app-empty-state
            title="No operations yet"
            text="Add what the shop does: shear, saw, plasma, form, weld, grind, paint, assemble. Timesheets name them."
          />
        } @else {
          <div class="scroll-x">
            <table class="figures">
              <thead>
                <tr>
                  <th scope="col">Code</th>
                  <th scope="col">Name</th>
                  <th scope="col">Machine if none is named</th>
                  <th scope="col"><span class="visually-hidden">Actions</span></th>
                </tr>
              </thead>
              <tbody>
                @for (operation of operations.value(); track operation.operationId) {
                  <tr>
                    <td>{{ operation.code }}</td>
                    <th scope="row">{{ operation.name }}</th>
                    <td>{{ operation.defaultMachine ?? '–' }}</td>
                    <td class="actions">
                      <button
                        type="button"
                        class="button quiet"
                        [attr.aria-label]="'Change ' + operation.name"
                        (click)="edit(operation)"
                      >
                        Change
                      </button>
                    </td>
                  </tr>
                }
              </tbody>
            </table>
          </div>
        }
      } @else {
        <app-loading-skeleton [lines]="5" />
      }
    </section>
  `,
  styleUrl: '../rates/dated-card.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class OperationsCard {
  private readonly api = inject(ShopApi);
  private readonly machinesApi = inject(MachinesApi);
  private readonly dialog = inject(MatDialog);
  private readonly rollup = inject(RollupStore);

  protected readonly operations = rxResource({ stream: () => this.api.listOperations() });
  private readonly machines = rxResource({ stream: () => this.machinesApi.list(), defaultValue: [] });

  protected edit(operation: Operation | null): void {
    const machines = this.machines.hasValue() ? this.machines.value() : [];
    this.dialog
      .open<OperationDialog, OperationDialogData, Operation>(OperationDialog, {
        data: { operation, machines },
        width: '520px',
      })
      .afterClosed()
      .subscribe((saved) => {
        if (!saved) return;
        this.operations.reload();
        void this.rollup.refresh();
      });
  }
}
