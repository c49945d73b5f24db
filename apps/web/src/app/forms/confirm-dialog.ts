import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MAT_DIALOG_DATA, type MatDialog, MatDialogModule } from '@angular/material/dialog';
import { map, type Observable } from 'rxjs';

export interface Confirmation {
  title: string;
  /** What will happen, a paragraph each. */
  text: readonly string[];
  /** The action in words: 'Undo this import'. */
  action: string;
  tone?: 'danger' | 'primary';
}

/** Asks before something that is not taken back by one click. */
@Component({
  selector: 'app-confirm-dialog',
  imports: [MatDialogModule],
  template: `
    <h2 mat-dialog-title>{{ confirmation.title }}</h2>
    <mat-dialog-content>
      @for (paragraph of confirmation.text; track $index) {
        <p>{{ paragraph }}</p>
      }
    </mat-dialog-content>
    <mat-dialog-actions align="end">
      <button type="button" class="button quiet" [mat-dialog-close]="false" cdkFocusInitial>Cancel</button>
      <button type="button" class="button {{ confirmation.tone ?? 'danger' }}" [mat-dialog-close]="true">
        {{ confirmation.action }}
      </button>
    </mat-dialog-actions>
  `,
  styles: `
    p + p {
      margin-top: 8px;
    }
    mat-dialog-actions {
      gap: 8px;
      padding: 12px 24px 18px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ConfirmDialog {
  protected readonly confirmation = inject<Confirmation>(MAT_DIALOG_DATA);
}

/** Opens the question; emits whether it was confirmed, once. */
export function confirm(dialog: MatDialog, confirmation: Confirmation): Observable<boolean> {
  return dialog
    .open<ConfirmDialog, Confirmation, boolean>(ConfirmDialog, {
      data: confirmation,
      width: '460px',
      role: 'alertdialog',
    })
    .afterClosed()
    .pipe(map((isConfirmed) => isConfirmed === true));
}
