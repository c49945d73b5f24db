import { ChangeDetectionStrategy, Component, inject, input, signal } from '@angular/core';
import { type FormGroup, ReactiveFormsModule } from '@angular/forms';
import { MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { type Observable } from 'rxjs';
import { type ShownProblem, toShownProblem } from '../api/problem-text';
import { showIssues } from './parsed-by';

/**
 * The frame of every dialog that saves a form: keeps it open and filled while the server refuses, puts the server's
 * words at the fields, and asks before what was typed is thrown away. Closes with the server's answer.
 */
@Component({
  selector: 'app-form-dialog',
  imports: [MatDialogModule, ReactiveFormsModule],
  template: `
    <form [formGroup]="form()" (ngSubmit)="submit()" novalidate>
      <h2 mat-dialog-title>{{ heading() }}</h2>
      <mat-dialog-content>
        <ng-content select="[lead]" />
        <div class="fields"><ng-content /></div>
        @if (problem(); as problem) {
          <div class="problem" role="alert">
            <strong>{{ problem.title }}</strong>
            <span>{{ problem.text }}</span>
            @for (issue of otherIssues(); track issue.field) {
              <span>{{ issue.message }}</span>
            }
            @if (problem.requestId) {
              <span class="muted">Number: {{ problem.requestId }}</span>
            }
          </div>
        }
      </mat-dialog-content>
      <mat-dialog-actions align="end">
        @if (isLeaving()) {
          <span class="question" role="alert">Throw away what you typed?</span>
          <button type="button" class="button" (click)="isLeaving.set(false)">Go on editing</button>
          <button type="button" class="button danger" (click)="close()">Throw away</button>
        } @else {
          <button type="button" class="button quiet" (click)="leave()">Cancel</button>
          <button type="submit" class="button primary" [disabled]="isSaving()">
            {{ isSaving() ? 'Saving…' : submitLabel() }}
          </button>
        }
      </mat-dialog-actions>
    </form>
  `,
  styleUrl: './form-dialog.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FormDialog {
  readonly heading = input.required<string>();
  readonly submitLabel = input('Save');
  readonly form = input.required<FormGroup>();
  readonly save = input.required<() => Observable<unknown>>();

  protected readonly isSaving = signal(false);
  protected readonly isLeaving = signal(false);
  protected readonly problem = signal<ShownProblem | null>(null);
  protected readonly otherIssues = signal<readonly { field: string; message: string }[]>([]);

  private readonly dialog = inject<MatDialogRef<unknown>>(MatDialogRef);

  constructor() {
    this.dialog.disableClose = true;
    this.dialog.backdropClick().subscribe(() => this.leave());
    this.dialog.keydownEvents().subscribe((event) => {
      if (event.key === 'Escape' && !event.defaultPrevented) this.leave();
    });
  }

  protected submit(): void {
    const form = this.form();
    form.markAllAsTouched();
    if (form.invalid || this.isSaving()) {
      this.focusFirstError();
      return;
    }
    this.isSaving.set(true);
    this.problem.set(null);
    this.save()().subscribe({
      next: (answer) => this.dialog.close(answer ?? true),
      error: (error: unknown) => this.refuse(toShownProblem(error)),
    });
  }

  protected leave(): void {
    if (this.isSaving()) return;
    if (this.form().dirty) this.isLeaving.set(true);
    else this.close();
  }

  protected close(): void {
    this.dialog.close();
  }

  private refuse(problem: ShownProblem): void {
    this.isSaving.set(false);
    this.otherIssues.set(showIssues(this.form(), problem.issues));
    this.problem.set(problem);
    this.focusFirstError();
  }

  private focusFirstError(): void {
    queueMicrotask(() => {
      const container = document.getElementById(this.dialog.id);
      container
        ?.querySelector<HTMLElement>('input.ng-invalid, select.ng-invalid, .mat-mdc-select-invalid')
        ?.focus();
    });
  }
}
