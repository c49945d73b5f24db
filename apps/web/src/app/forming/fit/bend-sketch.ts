import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { SHOP_FORMAT } from '@brakeven/ui';
import { toAngleWords, toSizeWords } from '../forming-words';
import { drawBend, type DrawnBend } from './bend-drawing';

let count = 0;

/** Punch, sheet and die at the end of the bend, right side up and to scale. */
@Component({
  selector: 'app-bend-sketch',
  template: `
    @let shape = drawing();
    @let frame = view();
    <svg
      [attr.viewBox]="frame.viewBox"
      role="img"
      [attr.aria-labelledby]="id"
      [style.--stroke]="frame.strokeMm"
    >
      <title [attr.id]="id">{{ words() }}</title>
      <g transform="scale(1 -1)">
        <path class="tool" [attr.d]="shape.die" />
        <path class="tool punch" [attr.d]="shape.punch" />
        <path class="sheet" [attr.d]="shape.sheet" />
        <circle
          class="contact"
          [attr.cx]="shape.contact.x"
          [attr.cy]="shape.contact.y"
          [attr.r]="frame.dotMm"
        />
        <path class="dimension" [attr.d]="frame.openingLines" />
        <path class="scale" [attr.d]="frame.scaleBar" />
      </g>
      <text
        class="opening"
        text-anchor="middle"
        [attr.y]="frame.openingTextY"
        [attr.font-size]="frame.textMm"
      >
        opening {{ openingWords() }}
      </text>
      <text
        class="scale-text"
        [attr.x]="frame.scaleTextX"
        [attr.y]="frame.scaleTextY"
        [attr.font-size]="frame.textMm * 0.88"
      >
        {{ scaleWords() }}
      </text>
    </svg>
    @if (shape.isFlangeOff) {
      <p class="off">The short flange has slipped off its shoulder.</p>
    }
  `,
  styleUrl: './bend-sketch.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BendSketch {
  private readonly format = inject(SHOP_FORMAT);
  readonly drawn = input.required<DrawnBend>();

  protected readonly id = `bend-sketch-${++count}`;
  protected readonly drawing = computed(() => drawBend(this.drawn()));
  protected readonly openingWords = computed(() =>
    toSizeWords(this.drawn().bend.openingMm, this.format().units),
  );
  private readonly scaleMm = computed(() =>
    findScaleMm(this.drawn().bend.openingMm, this.format().units === 'us' ? 25.4 : 10),
  );
  protected readonly scaleWords = computed(() => toSizeWords(this.scaleMm(), this.format().units));
  protected readonly words = computed(() => {
    const { bend, insideAngle } = this.drawn();
    const units = this.format().units;
    return `Side view: a sheet of ${toSizeWords(bend.thicknessMm, units)} between punch and die, bent to ${toAngleWords(insideAngle)} inside on an opening of ${this.openingWords()}, to scale`;
  });

  protected readonly view = computed(() => {
    const { box } = this.drawing();
    const half = this.drawn().bend.openingMm / 2;
    const width = Math.max(box.right - box.left, 1);
    const textMm = width * 0.042;
    const lineY = box.bottom - textMm * 1.1;
    const bottom = lineY - textMm * 2;
    const margin = width * 0.02;
    const barY = lineY - textMm * 0.4;
    const barEnd = box.left + this.scaleMm();
    const viewBox = [box.left - margin, -box.top - margin, width + 2 * margin, box.top - bottom + margin];
    return {
      viewBox: viewBox.join(' '),
      strokeMm: width * 0.003,
      dotMm: width * 0.008,
      textMm,
      openingLines: `M ${-half} 0 V ${lineY - textMm * 0.25} M ${half} 0 V ${lineY - textMm * 0.25} M ${-half} ${lineY} H ${half}`,
      openingTextY: -(lineY - textMm * 1.25),
      scaleBar: `M ${box.left} ${barY + textMm * 0.3} V ${barY - textMm * 0.3} M ${box.left} ${barY} H ${barEnd} M ${barEnd} ${barY + textMm * 0.3} V ${barY - textMm * 0.3}`,
      scaleTextX: box.left,
      scaleTextY: -(barY - textMm * 1.2),
    };
  });
}

/** A round length that is about a third of the opening. */
function findScaleMm(openingMm: number, unitMm: number): number {
  const wanted = openingMm / 3 / unitMm;
  const steps = [0.125, 0.25, 0.5, 1, 2, 3, 5, 10];
  return (steps.findLast((step) => step <= wanted) ?? 0.125) * unitMm;
}
