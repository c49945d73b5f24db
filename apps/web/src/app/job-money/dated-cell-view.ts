import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { Figure, MassPipe, StatusTag } from '@brakeven/ui';
import { type DatedCell } from './dated-rows';

/** The content of one cell of dated rows; what is voided is struck out and opens nothing. */
@Component({
  selector: 'app-dated-cell',
  imports: [Figure, MassPipe, RouterLink, StatusTag],
  template: `
    @let shown = cell();
    @if (shown.text !== undefined) {
      @if (shown.link; as link) {
        <a [routerLink]="link">{{ shown.text }}</a>
      } @else {
        <span class="said">{{ shown.text }}</span>
      }
    }
    @if (shown.tag; as tag) {
      <app-status-tag [word]="tag" tone="blue" />
    }
    @if (shown.aside; as aside) {
      <span class="muted"> {{ aside }}</span>
    }
    @if (shown.massKg; as mass) {
      <span class="said">{{ mass | mass }}</span>
    }
    @if (shown.amount; as amount) {
      <app-figure
        class="said"
        [value]="amount"
        [ref]="(!isVoided() && shown.ref) || null"
        [label]="shown.label ?? ''"
      />
    }
    @if (isVoided() && isName()) {
      <app-status-tag word="voided" />
    }
  `,
  host: { '[class.voided]': 'isVoided()' },
  styles: `
    :host(.voided) .said {
      text-decoration: line-through;
    }
    app-status-tag {
      margin-left: 4px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DatedCellView {
  readonly cell = input.required<DatedCell>();
  readonly isVoided = input(false);
  /** Whether it names the row: then it says that the row is voided. */
  readonly isName = input(false);
}
