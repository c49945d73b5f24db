import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import {
  FIXED_RATE_PARTS,
  type MachineHourRate,
  type RatePart,
  RULES,
  RUNNING_RATE_PARTS,
} from '@brakeven/costing';
import { type Decimal, formatNumber, rateText, roundHalfUp } from '@brakeven/values';
import { RatePipe } from '@brakeven/ui';

const WORDS: Record<RatePart, { label: string; rule: string }> = {
  depreciation: { label: 'Depreciation', rule: RULES.rateDepreciation },
  interest: { label: 'Interest', rule: RULES.rateInterest },
  space: { label: 'Space', rule: RULES.rateSpace },
  insurance: { label: 'Insurance', rule: RULES.rateInsurance },
  upkeep: { label: 'Upkeep', rule: RULES.rateUpkeep },
  power: { label: 'Power', rule: RULES.ratePower },
  consumables: { label: 'Consumables', rule: RULES.rateConsumables },
};

/** A machine-hour rate as a bar of its parts, and the same as a table with each part's rule. */
@Component({
  selector: 'app-rate-parts',
  imports: [RatePipe],
  template: `
    <div class="bar" aria-hidden="true">
      @for (row of rows(); track row.part) {
        <span [style.flex-grow]="row.weight" [attr.data-part]="row.part" [title]="row.label"></span>
      }
    </div>
    <div class="scroll-x">
      <table class="figures">
        <thead>
          <tr>
            <th scope="col">Part</th>
            <th scope="col" class="number">Per hour</th>
            <th scope="col" class="number">Share</th>
          </tr>
        </thead>
        <tbody>
          @for (row of rows(); track row.part) {
            <tr>
              <th scope="row">
                <span class="swatch" aria-hidden="true" [attr.data-part]="row.part"></span>{{ row.label }}
                <span class="rule">{{ row.rule }}</span>
              </th>
              <td class="number">{{ row.perHour | rate }}</td>
              <td class="number">{{ row.share }}</td>
            </tr>
          }
        </tbody>
        <tfoot>
          <tr>
            <th scope="row">Stands still or runs</th>
            <td class="number">{{ fixed() | rate }}</td>
            <td></td>
          </tr>
          <tr>
            <th scope="row">Each hour of running</th>
            <td class="number">{{ running() | rate }}</td>
            <td></td>
          </tr>
          <tr class="total">
            <th scope="row">Machine-hour rate</th>
            <td class="number">{{ total() | rate }}</td>
            <td></td>
          </tr>
        </tfoot>
      </table>
    </div>
  `,
  styleUrl: './rate-parts.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RateParts {
  readonly rate = input.required<MachineHourRate>();

  protected readonly fixed = computed(() => rateText(this.rate().fixedPerHour));
  protected readonly running = computed(() => rateText(this.rate().runningPerHour));
  protected readonly total = computed(() => rateText(this.rate().ratePerHour));
  protected readonly rows = computed(() => {
    const { parts, fixedPerHour, runningPerHour } = this.rate();
    const whole = fixedPerHour.plus(runningPerHour);
    return [...FIXED_RATE_PARTS, ...RUNNING_RATE_PARTS].map((part) => ({
      part,
      ...WORDS[part],
      perHour: rateText(parts[part]),
      weight: parts[part].toFixed(),
      share: whole.isZero() ? '–' : toShareText(parts[part].times(100).div(whole)),
    }));
  });
}

function toShareText(percent: Decimal): string {
  return `${formatNumber(roundHalfUp(percent, 1), 'en-US', { minimumFractionDigits: 1 })} %`;
}
