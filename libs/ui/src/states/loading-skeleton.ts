import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';

/** Grey bars that keep the layout while something loads. */
@Component({
  selector: 'app-loading-skeleton',
  template: `
    <span class="visually-hidden">Loading…</span>
    @for (width of widths(); track $index) {
      <div class="bar" [style.width.%]="width" [style.height.px]="barHeight()"></div>
    }
  `,
  styles: `
    :host {
      display: grid;
      gap: 12px;
      padding: 6px 0;
    }
    .bar {
      border-radius: 4px;
      background: var(--line);
      animation: breathe 1.6s ease-in-out infinite;
    }
    @keyframes breathe {
      50% {
        opacity: 0.45;
      }
    }
  `,
  host: { role: 'status' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LoadingSkeleton {
  readonly lines = input(4);
  readonly barHeight = input(14);
  protected readonly widths = computed(() =>
    Array.from({ length: this.lines() }, (_, line) => 100 - ((line * 17) % 40)),
  );
}
