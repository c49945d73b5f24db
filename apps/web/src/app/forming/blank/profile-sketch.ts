import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { type BlankInput } from '@brakeven/forming';
import { type BendWay, drawProfile } from './profile-drawing';

let count = 0;

/** The part from its end, to scale; the dots on it are the flanges' numbers. */
@Component({
  selector: 'app-profile-sketch',
  template: `
    @let shape = drawing();
    @let frame = view();
    <svg [attr.viewBox]="frame.viewBox" role="img" [attr.aria-labelledby]="id">
      <title [attr.id]="id">
        The part seen from its end, to scale: {{ part().flangesMm.length }} flanges
      </title>
      <path transform="scale(1 -1)" [attr.d]="shape.path" [attr.stroke-width]="frame.strokeMm" />
      @for (label of shape.labels; track label.flange) {
        <circle [attr.cx]="label.x" [attr.cy]="-label.y" [attr.r]="frame.dotMm" />
        <text
          text-anchor="middle"
          [attr.x]="label.x"
          [attr.y]="-label.y + frame.dotMm * 0.42"
          [attr.font-size]="frame.dotMm * 1.25"
        >
          {{ label.flange }}
        </text>
      }
    </svg>
  `,
  styles: `
    svg {
      display: block;
      width: 100%;
      height: 220px;
    }
    path {
      fill: none;
      stroke: var(--layout-blue);
    }
    circle {
      fill: var(--sheet);
      stroke: var(--layout-blue);
      stroke-width: 0.4%;
    }
    text {
      fill: var(--ink);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ProfileSketch {
  readonly part = input.required<BlankInput>();
  readonly ways = input.required<readonly BendWay[]>();

  protected readonly id = `profile-sketch-${++count}`;
  protected readonly drawing = computed(() => drawProfile(this.part(), this.ways()));
  protected readonly view = computed(() => {
    const { box } = this.drawing();
    const [width, height] = [box.right - box.left, box.top - box.bottom];
    const size = Math.max(width, height * 1.8);
    const margin = size * 0.06 + this.part().thicknessMm;
    const viewBox = [box.left - margin, -box.top - margin, width + 2 * margin, height + 2 * margin];
    return { viewBox: viewBox.join(' '), strokeMm: this.part().thicknessMm, dotMm: size * 0.032 };
  });
}
