import {
  afterNextRender,
  ChangeDetectionStrategy,
  Component,
  computed,
  type ElementRef,
  inject,
  input,
  output,
  viewChild,
} from '@angular/core';
import { type FigureRef, type SourceCell, type Workings } from '@brakeven/contract';
import { toFigureText } from '../figure/figure';
import { isPlainClick } from '../link-click';
import { LocalDatePipe } from '../local-date-pipe';
import { SHOP_FORMAT } from '../shop-format';
import { ErrorState } from '../states/error-state';
import { LoadingSkeleton } from '../states/loading-skeleton';
import { checkWorkings } from './check-workings';
import { toLineView } from './line-view';

const INPUTS_SHOWN = 4;
const LINES_BELOW = 12;

/** How a figure was made: rule, inputs, the figures and rows it sums, each row down to its cell. */
@Component({
  selector: 'app-workings-drawer',
  imports: [ErrorState, LoadingSkeleton, LocalDatePipe],
  templateUrl: './workings-drawer.html',
  styleUrl: './workings-drawer.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class WorkingsDrawer {
  private readonly format = inject(SHOP_FORMAT);
  private readonly dialog = viewChild.required<ElementRef<HTMLDialogElement>>('dialog');

  readonly workings = input.required<Workings | null>();
  readonly isLoading = input(false);
  readonly problem = input<{ title: string; text: string } | null>(null);
  readonly canGoBack = input(false);
  /** The address of a source cell, so that it can be opened in a tab of its own too. */
  readonly sourceHref = input.required<(source: SourceCell) => string>();

  /** A part was pressed: its workings are wanted. */
  readonly opened = output<FigureRef>();
  readonly back = output();
  readonly closed = output();
  readonly moreWanted = output();
  readonly retried = output();
  readonly sourceFollowed = output<SourceCell>();

  protected readonly signs = { agrees: '✓', disagrees: '!', open: '…' } as const;
  protected readonly lines = computed(() => {
    const workings = this.workings();
    return workings?.lines.map((line) => toLineView(line, workings.unit, this.format())) ?? [];
  });
  protected readonly checks = computed(() => {
    const workings = this.workings();
    return workings ? checkWorkings(workings, this.format().currency) : [];
  });

  constructor() {
    // The browser keeps the focus inside a modal dialog, closes it on Escape and gives the focus back.
    afterNextRender(() => this.dialog().nativeElement.showModal());
  }

  /** A longer list of rates would push many rows out of sight. */
  protected areInputsShort({ inputs, lineCount }: Workings): boolean {
    return inputs.length <= INPUTS_SHOWN || lineCount <= LINES_BELOW;
  }

  protected close(): void {
    this.dialog().nativeElement.close();
  }

  protected toText(amount: string): string {
    return toFigureText(amount, this.workings()?.unit ?? 'money', this.format().currency);
  }

  protected followSource(event: MouseEvent, source: SourceCell): void {
    if (!isPlainClick(event)) return;
    event.preventDefault();
    this.close();
    this.sourceFollowed.emit(source);
  }
}
