import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { type JobDetail } from '@brakeven/contract';
import { Figure } from '@brakeven/ui';
import { type SentencePart, toJobVerdict } from './job-verdict';

/** What a job came to: made or lost, and how that stands to its estimate. */
@Component({
  selector: 'app-verdict-card',
  imports: [Figure],
  template: `
    @if (verdict(); as verdict) {
      <section class="verdict" [attr.data-tone]="verdict.tone" aria-label="Verdict">
        <p class="headline">
          @for (part of verdict.headline; track $index) {
            @if (toFigure(part); as figure) {
              <app-figure [value]="figure.value" [ref]="figure.ref" />
            } @else {
              <span>{{ part }}</span>
            }
          }
        </p>
        <p class="sentence">
          @for (part of verdict.sentence; track $index) {
            @if (toFigure(part); as figure) {
              <app-figure [value]="figure.value" [ref]="figure.ref" />
            } @else {
              <span>{{ part }}</span>
            }
          }
        </p>
      </section>
    }
  `,
  styles: `
    .verdict {
      margin-bottom: 16px;
      padding: 12px 18px;
      border-left: 5px solid var(--line-strong);
      border-radius: 4px;
      background: var(--sheet);
    }
    .verdict[data-tone='good'] {
      border-left-color: var(--patina);
      background: var(--patina-tint);
    }
    .verdict[data-tone='loss'] {
      border-left-color: var(--rust);
      background: var(--rust-tint);
    }
    .verdict[data-tone='plan'] {
      border-left-color: var(--brass);
      background: var(--brass-tint);
    }
    .verdict[data-tone='blue'] {
      border-left-color: var(--layout-blue);
      background: var(--layout-blue-tint);
    }
    .headline {
      font-size: 24px;
      font-weight: 500;
      line-height: 1.3;
    }
    .sentence {
      margin-top: 2px;
      font-size: 15px;
    }
    span {
      white-space: pre-wrap;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class VerdictCard {
  readonly job = input.required<JobDetail>();

  protected readonly verdict = computed(() => toJobVerdict(this.job()));

  protected toFigure(part: SentencePart) {
    return typeof part === 'string' ? null : part;
  }
}
