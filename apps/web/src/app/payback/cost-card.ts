import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { RouterLink } from '@angular/router';
import { type FigureRef } from '@brakeven/contract';
import { EmptyState, ErrorState, Figure, LoadingSkeleton, LocalDatePipe } from '@brakeven/ui';
import { MachinesApi } from '../api/machines-api';
import { toShownProblem } from '../api/problem-text';
import { toCostItemRef, toPaybackRef } from './payback-refs';

/** The outlay, item by item. */
@Component({
  selector: 'app-cost-card',
  imports: [EmptyState, ErrorState, Figure, LoadingSkeleton, LocalDatePipe, RouterLink],
  template: `
    <h2>What it cost</h2>
    @if (problem(); as failed) {
      <app-error-state [title]="failed.title" [text]="failed.text" (retried)="machine.reload()" />
    } @else if (items(); as items) {
      @if (items.length > 0) {
        <table class="figures">
          <tbody>
            @for (item of items; track item.machineCostItemId) {
              <tr>
                <th scope="row">
                  <span class="kind">{{ item.kind }}</span>
                  <span class="muted">
                    {{ item.description ? item.description + ' · ' : '' }}{{ item.incurredOn | localDate }}
                  </span>
                </th>
                <td class="number">
                  <app-figure
                    [value]="item.amount"
                    [ref]="itemRef(item.machineCostItemId)"
                    [label]="item.kind"
                  />
                </td>
              </tr>
            }
            <tr class="total">
              <th scope="row">Outlay</th>
              <td class="number"><app-figure [value]="outlay()" [ref]="outlayRef()" /></td>
            </tr>
          </tbody>
        </table>
      } @else {
        <app-empty-state
          title="Nothing entered"
          text="Price, freight, rigging, tooling, training: all that was paid for it."
        >
          <a class="button" [routerLink]="['/machines', machineId()]">Enter what it cost</a>
        </app-empty-state>
      }
    } @else {
      <app-loading-skeleton [lines]="5" />
    }
  `,
  styles: `
    :host {
      display: block;
    }
    .kind {
      display: inline-block;
      min-width: 104px;
    }
    .kind::first-letter {
      text-transform: uppercase;
    }
    .muted {
      font-size: 12.5px;
    }
    @media (width < 700px) {
      .muted {
        display: block;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CostCard {
  private readonly api = inject(MachinesApi);

  readonly machineId = input.required<string>();
  readonly outlay = input.required<string>();

  protected readonly machine = rxResource({
    params: () => this.machineId(),
    stream: ({ params: machineId }) => this.api.get(machineId),
  });
  protected readonly items = computed(() =>
    this.machine.hasValue() ? (this.machine.value().costItems ?? []) : null,
  );
  protected readonly problem = computed(() => {
    const error = this.machine.error();
    return error ? toShownProblem(error) : null;
  });
  protected readonly outlayRef = computed(() => toPaybackRef('payback.outlay', this.machineId()));

  protected itemRef(costItemId: string): FigureRef {
    return toCostItemRef(this.machineId(), costItemId);
  }
}
