import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { FORMING_RULES, type FitRow } from '@brakeven/forming';
import { SHOP_FORMAT } from '@brakeven/ui';
import { toForceWords, toLengthWords, toNumberWords, toSizeWords } from '../forming-words';
import { type FitQuestion } from './fit-question';

const KSI_MPA = 6.894757293168361;

/** How the figures of one opening were made: rules, what went in, and where each comes from. */
@Component({
  selector: 'app-force-workings',
  template: `
    <section class="card" aria-labelledby="workings-heading">
      <h2 id="workings-heading">How the {{ opening() }} row was made</h2>
      <table class="figures">
        <tbody>
          <tr>
            <th scope="row">
              Tensile strength used<small>{{ question().material.tensileSource }}</small>
            </th>
            <td class="number">{{ strength() }}</td>
          </tr>
          @for (force of forces(); track force.words) {
            <tr>
              <th scope="row">
                {{ force.words }}<small>{{ force.source }}</small>
              </th>
              <td class="number">{{ force.value }}</td>
            </tr>
          }
          @if (rating(); as rating) {
            <tr>
              <th scope="row">
                The lowest rating over this length: the {{ rating.of }}’s<small>{{ band }}</small>
              </th>
              <td class="number">{{ rating.value }}</td>
            </tr>
          }
          <tr>
            <th scope="row">
              Inside radius<small>{{ radiusRule }}</small>
            </th>
            <td class="number">{{ radius() }}</td>
          </tr>
          <tr>
            <th scope="row">
              Shortest flange<small>{{ flangeRule }}</small>
            </th>
            <td class="number">{{ flange() }}</td>
          </tr>
        </tbody>
      </table>
      @for (objection of row().objections; track objection.code) {
        <p class="objection">{{ objection.words }}</p>
      }
    </section>
  `,
  styles: `
    small {
      display: block;
      color: var(--ink-muted);
      font-size: 12px;
    }
    .objection {
      margin-top: 8px;
      padding-left: 10px;
      border-left: 3px solid var(--brass);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ForceWorkings {
  private readonly format = inject(SHOP_FORMAT);
  readonly row = input.required<FitRow>();
  readonly question = input.required<FitQuestion>();

  protected readonly band = FORMING_RULES.forceBand;
  protected readonly radiusRule = FORMING_RULES.insideRadius;
  protected readonly flangeRule = FORMING_RULES.shortestFlange;
  private readonly units = computed(() => this.format().units);
  protected readonly opening = computed(() => toSizeWords(this.row().opening.openingMm, this.units()));
  protected readonly strength = computed(() => {
    const { tensileMpa } = this.question().material;
    return this.units() === 'us'
      ? `${toNumberWords(tensileMpa / KSI_MPA, 0)}\u00a0ksi`
      : `${toNumberWords(tensileMpa, 0)}\u00a0MPa`;
  });
  protected readonly forces = computed(() =>
    (this.row().force?.rules ?? []).map(({ words, source, forceKn }) => ({
      words,
      source,
      value: toForceWords(forceKn, this.units()),
    })),
  );
  protected readonly rating = computed(() => {
    const { rating } = this.row();
    return rating && { of: rating.of, value: toForceWords(rating.ratedKn, this.units()) };
  });
  protected readonly radius = computed(() => toLengthWords(this.row().insideRadiusMm, this.units()));
  protected readonly flange = computed(() => toLengthWords(this.row().shortestFlangeMm, this.units()));
}
