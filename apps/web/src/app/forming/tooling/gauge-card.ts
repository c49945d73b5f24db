import { ChangeDetectionStrategy, Component, computed, inject, input, output, signal } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { type ShopGauge } from '@brakeven/contract';
import { GAUGE_NOTES, GAUGE_SOURCES, GAUGE_SYSTEMS, type GaugeSystem, listGauges } from '@brakeven/forming';
import { StatusTag } from '@brakeven/ui';
import { type UnitSystem } from '@brakeven/values';
import { FormingApi } from '../../api/forming-api';
import { toProblemSentence } from '../../api/problem-text';
import { SessionStore } from '../../session/session-store';
import { Notifier } from '../../shell/notifier';
import { toNumberWords } from '../forming-words';
import { GaugeDialog, type GaugeDialogData } from './gauge-dialog';

const MM_PER_IN = 25.4;

/** The gauge tables, one metal at a time; the shop's own chart goes before what is shipped. */
@Component({
  selector: 'app-gauge-card',
  imports: [StatusTag],
  template: `
    <section class="card" aria-labelledby="gauges-heading">
      <h2 id="gauges-heading">Gauges</h2>
      <div class="systems" role="group" aria-label="Gauges of">
        @for (one of systems; track one) {
          <button type="button" class="chip" [attr.aria-pressed]="one === system()" (click)="system.set(one)">
            {{ one }}
          </button>
        }
      </div>
      <p class="small">{{ source() }} {{ note() }}</p>
      <ul>
        @for (row of rows(); track row.gauge) {
          <li>
            <span class="gauge">{{ row.gauge }} ga</span>
            <span>
              {{ row.words }}
              @if (row.isOwn) {
                <app-status-tag word="own" tone="blue" />
                <span class="small">{{ row.source }}</span>
              }
            </span>
            @if (canEdit()) {
              <button
                type="button"
                class="button quiet"
                [attr.aria-label]="'Change ' + row.gauge + ' ga'"
                (click)="edit(row)"
              >
                Change
              </button>
              @if (row.isOwn) {
                <button
                  type="button"
                  class="button quiet"
                  [attr.aria-label]="'Put ' + row.gauge + ' ga back'"
                  (click)="putBack(row.gauge)"
                >
                  Put back
                </button>
              }
            }
          </li>
        }
      </ul>
    </section>
  `,
  styles: `
    .systems {
      display: flex;
      flex-wrap: wrap;
      gap: 6px;
      margin-bottom: 8px;
    }
    .small {
      color: var(--ink-muted);
      font-size: 12.5px;
    }
    ul {
      display: grid;
      grid-template-columns: repeat(auto-fill, minmax(min(300px, 100%), 1fr));
      gap: 2px 20px;
      margin-top: 8px;
      padding: 0;
      list-style: none;
    }
    li {
      display: flex;
      gap: 10px;
      align-items: center;
      min-height: 32px;
      border-bottom: 1px solid var(--line);
    }
    .gauge {
      min-width: 46px;
      color: var(--ink-muted);
    }
    .button {
      min-height: 26px;
      margin-left: auto;
      padding: 1px 8px;
      font-size: 13px;
    }
    .button + .button {
      margin-left: 0;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class GaugeCard {
  private readonly api = inject(FormingApi);
  private readonly dialog = inject(MatDialog);
  private readonly notifier = inject(Notifier);
  private readonly units = inject(SessionStore).shopFormat().units;
  readonly own = input.required<readonly ShopGauge[]>();
  readonly canEdit = input(false);
  readonly changed = output();

  protected readonly systems = GAUGE_SYSTEMS;
  protected readonly system = signal<GaugeSystem>('steel');
  protected readonly source = computed(() => GAUGE_SOURCES[this.system()]);
  protected readonly note = computed(() => GAUGE_NOTES[this.system()]);
  protected readonly rows = computed(() => {
    const own = this.own().filter(({ system }) => system === this.system());
    const shipped = listGauges(this.system()).filter(({ gauge }) => !own.some((one) => one.gauge === gauge));
    return [
      ...own.map(({ gauge, thicknessMm, source }) => this.toRow(gauge, Number(thicknessMm), source, true)),
      ...shipped.map(({ gauge, thicknessIn }) =>
        this.toRow(gauge, thicknessIn * MM_PER_IN, this.source(), false),
      ),
    ].sort((a, b) => a.gauge - b.gauge);
  });

  protected edit(row: { gauge: number; thicknessMm: string; source: string; isOwn: boolean }): void {
    const gauge = { ...row, system: this.system(), source: row.isOwn ? row.source : '' };
    this.dialog
      .open<GaugeDialog, GaugeDialogData>(GaugeDialog, { data: { gauge, units: this.units }, width: '520px' })
      .afterClosed()
      .subscribe((answer) => {
        if (answer) this.changed.emit();
      });
  }

  protected putBack(gauge: number): void {
    this.api.deleteGauge(this.system(), gauge).subscribe({
      next: () => this.changed.emit(),
      error: (error: unknown) => this.notifier.warn(toProblemSentence(error)),
    });
  }

  private toRow(gauge: number, millimetres: number, source: string, isOwn: boolean) {
    const thicknessMm = String(Number(millimetres.toFixed(5)));
    return { gauge, thicknessMm, words: toGaugeWords(millimetres, this.units), source, isOwn };
  }
}

/** A thickness as charts print it, all with the same decimals. */
function toGaugeWords(millimetres: number, units: UnitSystem): string {
  return units === 'us'
    ? `${toNumberWords(millimetres / MM_PER_IN, 4)}\u00a0in`
    : `${toNumberWords(millimetres, 3)}\u00a0mm`;
}
