import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { type FigureRef, type MachineCostItem } from '@brakeven/contract';
import { EmptyState, Figure, LocalDatePipe, MoneyPipe } from '@brakeven/ui';
import { COST_KIND_WORDS } from './machine-words';

/** What the machine cost until it stood and ran, item by item, with the total that the payback is counted against. */
@Component({
  selector: 'app-landed-cost-card',
  imports: [EmptyState, Figure, LocalDatePipe, MoneyPipe],
  template: `
    <section class="card" aria-labelledby="cost-heading">
      <div class="head">
        <h2 id="cost-heading">Landed cost</h2>
        @if (canEdit()) {
          <button type="button" class="button" (click)="added.emit()">Add a cost</button>
        }
      </div>
      @if (items().length === 0) {
        <app-empty-state
          title="Nothing entered"
          text="Add the price first, then freight, rigging, electrical work, tooling, installation and training."
        />
      } @else {
        <div class="scroll-x">
          <table class="figures">
            <thead>
              <tr>
                <th scope="col">Date</th>
                <th scope="col">Kind</th>
                <th scope="col">Description</th>
                <th scope="col" class="number">Amount</th>
                @if (canEdit()) {
                  <th scope="col"><span class="visually-hidden">Actions</span></th>
                }
              </tr>
            </thead>
            <tbody>
              @for (item of items(); track item.machineCostItemId) {
                <tr>
                  <td class="date">{{ item.incurredOn | localDate }}</td>
                  <th scope="row">{{ words[item.kind] }}</th>
                  <td>{{ item.description }}</td>
                  <td class="number">{{ item.amount | money }}</td>
                  @if (canEdit()) {
                    <td class="actions">
                      <button
                        type="button"
                        class="button quiet"
                        [attr.aria-label]="'Correct ' + nameOf(item)"
                        (click)="edited.emit(item)"
                      >
                        Correct
                      </button>
                      <button
                        type="button"
                        class="button quiet"
                        [attr.aria-label]="'Take out ' + nameOf(item)"
                        (click)="deleted.emit(item)"
                      >
                        Take out
                      </button>
                    </td>
                  }
                </tr>
              }
            </tbody>
            <tfoot>
              <tr class="total">
                <th scope="row" colspan="3">Outlay</th>
                <td class="number"><app-figure [value]="outlay()" [ref]="outlayRef()" label="Outlay" /></td>
                @if (canEdit()) {
                  <td></td>
                }
              </tr>
            </tfoot>
          </table>
        </div>
      }
    </section>
  `,
  styleUrl: '../rates/dated-card.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LandedCostCard {
  readonly machineId = input.required<string>();
  readonly items = input.required<readonly MachineCostItem[]>();
  readonly outlay = input<string>();
  readonly canEdit = input(false);
  readonly added = output();
  readonly edited = output<MachineCostItem>();
  readonly deleted = output<MachineCostItem>();

  protected readonly words = COST_KIND_WORDS;
  protected readonly outlayRef = computed<FigureRef>(() => ({
    figure: 'payback.outlay',
    machineId: this.machineId(),
  }));

  protected nameOf(item: MachineCostItem): string {
    return `${COST_KIND_WORDS[item.kind]} ${item.description}`.trim();
  }
}
