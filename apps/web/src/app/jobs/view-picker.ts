import { ChangeDetectionStrategy, Component, inject, input, output } from '@angular/core';
import { type JobView } from './job-views';
import { JobViewsStore } from './job-views-store';

/** Chooses a view of the jobs, keeps the one that is shown, removes an own one. */
@Component({
  selector: 'app-view-picker',
  template: `
    <label class="visually-hidden" for="job-view">View</label>
    <select id="job-view" class="field" (change)="choose($event)">
      @if (!store.chosen()) {
        <option value="" selected>View…</option>
      }
      @for (view of store.views(); track view.id) {
        <option [value]="view.id" [selected]="view.id === store.chosenId()">{{ view.name }}</option>
      }
    </select>
    <button type="button" class="button quiet" (click)="store.save(filter())">Save view</button>
    @if (store.chosen()?.savedViewId) {
      <button type="button" class="button quiet" (click)="store.remove()">Remove view</button>
    }
  `,
  styles: `
    :host {
      display: inline-flex;
      flex-wrap: wrap;
      gap: 6px;
      align-items: center;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ViewPicker {
  protected readonly store = inject(JobViewsStore);

  /** What is kept with the view. */
  readonly filter = input.required<Record<string, string>>();
  readonly chosen = output<JobView>();

  protected choose({ target }: Event): void {
    const id = (target as HTMLSelectElement).value;
    const view = this.store.views().find((one) => one.id === id);
    if (view) this.chosen.emit(view);
  }
}
