import {
  ChangeDetectionStrategy,
  Component,
  computed,
  type ElementRef,
  input,
  output,
  signal,
  viewChild,
} from '@angular/core';
import { type FileRule, findFileProblem, formatBytes } from './find-file-problem';

/** A place to drop one file on, with a button that does the same by keyboard. Says why a file cannot be taken. */
@Component({
  selector: 'app-file-drop',
  template: `
    <div
      class="zone"
      [class.over]="isOver()"
      [class.compact]="isCompact()"
      (dragenter)="enter($event)"
      (dragover)="enter($event)"
      (dragleave)="isOver.set(false)"
      (drop)="drop($event)"
    >
      <svg viewBox="0 0 48 40" aria-hidden="true" focusable="false">
        <path
          d="M7 3h24l10 10v24H7z"
          fill="none"
          stroke="currentColor"
          stroke-width="2"
          stroke-linejoin="round"
        />
        <path
          d="M31 3v10h10M14 20h20M14 26h20M14 32h20M21 20v12M28 20v12"
          fill="none"
          stroke="currentColor"
          stroke-width="2"
        />
      </svg>
      <p class="lead">{{ lead() }}</p>
      <button
        type="button"
        class="button"
        [class.primary]="!isCompact()"
        [disabled]="isDisabled()"
        (click)="browse()"
      >
        {{ buttonLabel() }}
      </button>
      <p class="limits muted">{{ limits() }}</p>
      <input
        #picker
        type="file"
        class="picker"
        tabindex="-1"
        aria-hidden="true"
        [accept]="accept()"
        (change)="take(picker.files); picker.value = ''"
      />
    </div>
    <p class="refused" role="alert">
      @if (problem()) {
        <strong>Not taken.</strong> {{ problem() }}
      }
    </p>
  `,
  styleUrl: './file-drop.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FileDrop {
  readonly rule = input.required<FileRule>();
  readonly lead = input.required<string>();
  readonly buttonLabel = input('Choose a file');
  readonly isCompact = input(false);
  readonly isDisabled = input(false);
  readonly chosen = output<File>();

  protected readonly isOver = signal(false);
  protected readonly problem = signal<string | null>(null);
  protected readonly accept = computed(() => this.rule().endings.join(','));
  protected readonly limits = computed(
    () => `${this.rule().endings.join(' or ')}, up to ${formatBytes(this.rule().bytesMax)}`,
  );
  private readonly picker = viewChild.required<ElementRef<HTMLInputElement>>('picker');

  protected browse(): void {
    this.picker().nativeElement.click();
  }

  protected enter(event: DragEvent): void {
    event.preventDefault();
    if (!this.isDisabled()) this.isOver.set(true);
  }

  protected drop(event: DragEvent): void {
    event.preventDefault();
    this.isOver.set(false);
    if (!this.isDisabled()) this.take(event.dataTransfer?.files ?? null);
  }

  protected take(files: FileList | null): void {
    const file = files?.[0];
    if (!file) return;
    const isMany = (files?.length ?? 0) > 1;
    const problem = isMany ? 'Drop one file at a time.' : findFileProblem(file, this.rule());
    this.problem.set(problem);
    if (!problem) this.chosen.emit(file);
  }
}
