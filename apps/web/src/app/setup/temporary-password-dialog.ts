import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { DOCUMENT } from '@angular/core';
import { MAT_DIALOG_DATA, MatDialogModule } from '@angular/material/dialog';
import { type UserCreated } from '@brakeven/contract';

/** Shows a temporary password the one time that it can be seen. */
@Component({
  selector: 'app-temporary-password-dialog',
  imports: [MatDialogModule],
  template: `
    <h2 mat-dialog-title>Temporary password for {{ data.user.name }}</h2>
    <mat-dialog-content>
      <p>Hand it over in person. It is shown this once only, and has to be changed at the first sign-in.</p>
      <p class="secret">
        <code #secret>{{ data.temporaryPassword }}</code>
        <button type="button" class="button" (click)="copy(secret)">Copy</button>
      </p>
      <p class="muted" role="status">{{ message() }}</p>
      <p class="muted">Sign-in e-mail: {{ data.user.email }}</p>
    </mat-dialog-content>
    <mat-dialog-actions align="end">
      <button type="button" class="button primary" [mat-dialog-close]="true">I have it</button>
    </mat-dialog-actions>
  `,
  styles: `
    .secret {
      display: flex;
      flex-wrap: wrap;
      align-items: center;
      gap: 12px;
      margin: 12px 0 4px;
    }
    code {
      padding: 8px 12px;
      border: 1px solid var(--line-strong);
      border-radius: 6px;
      background: var(--sheet-sunken);
      font-size: 17px;
      user-select: all;
    }
    mat-dialog-actions {
      padding: 12px 24px 18px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TemporaryPasswordDialog {
  protected readonly data = inject<UserCreated>(MAT_DIALOG_DATA);
  private readonly document = inject(DOCUMENT);
  protected readonly message = signal('');

  protected async copy(secret: HTMLElement): Promise<void> {
    try {
      await this.document.defaultView?.navigator.clipboard.writeText(this.data.temporaryPassword);
      this.message.set('Copied.');
    } catch {
      // The clipboard is closed to pages without https or without leave: mark the text, so that keys can copy it.
      this.document.getSelection()?.selectAllChildren(secret);
      this.message.set('Marked: copy it with Ctrl+C.');
    }
  }
}
