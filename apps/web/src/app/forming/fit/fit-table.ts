import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { type BendFit, type FitRow } from '@brakeven/forming';
import { SHOP_FORMAT, StatusTag } from '@brakeven/ui';
import { toForceBandNumbers, toLengthWords, toPercentWords, toSizeWords } from '../forming-words';
import { type RackOpening } from '../press-tooling';
import { toVerdictTag } from './fit-verdict';

/** Every opening owned with what it asks of the press, and a verdict in words. */
@Component({
  selector: 'app-fit-table',
  imports: [StatusTag],
  templateUrl: './fit-table.html',
  styleUrl: './fit-table.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FitTable {
  private readonly format = inject(SHOP_FORMAT);
  readonly fit = input.required<BendFit>();
  readonly openings = input.required<readonly RackOpening[]>();
  readonly lineShare = input.required<number>();
  /** Code of the opening looked at. */
  readonly chosen = input.required<string | null>();
  readonly choice = output<string>();

  protected readonly rows = computed(() => {
    const { rows, best } = this.fit();
    return rows.map((row) => this.toShownRow(row, row.opening.code === best));
  });
  protected readonly forceUnit = computed(() => (this.format().units === 'us' ? 'US tons' : 'kN'));
  protected readonly line = computed(() => toPercentWords(this.lineShare()));

  private toShownRow(row: FitRow, isBest: boolean) {
    const { units } = this.format();
    const { force, share, opening } = row;
    return {
      code: opening.code,
      isBest,
      dieName: this.openings().find(({ code }) => code === opening.code)?.dieName ?? '',
      opening: toSizeWords(opening.openingMm, units),
      ratio: row.openingOverThickness.toFixed(1),
      force: force ? toForceBandNumbers(force.lowKn, force.highKn, units) : '–',
      share: share === null ? null : toPercentWords(share),
      barPercent: share === null ? 0 : Math.min(100, share * 100),
      rating: row.rating?.of ?? null,
      radius: toLengthWords(row.insideRadiusMm, units),
      flange: toLengthWords(row.shortestFlangeMm, units),
      tag: toVerdictTag(row, isBest),
      reason: row.objections[0]?.words ?? '',
    };
  }
}
