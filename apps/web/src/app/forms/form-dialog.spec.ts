import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { HttpErrorResponse } from '@angular/common/http';
import { TestBed } from '@angular/core/testing';
import { FormControl, FormGroup, Validators } from '@angular/forms';
import { MatDialog, type MatDialogRef } from '@angular/material/dialog';
import { Subject } from 'rxjs';
import { FormDialog } from './form-dialog';
import { FormField } from './form-field';

@Component({
  selector: 'app-name-dialog',
  imports: [FormDialog, FormField],
  template: `<app-form-dialog heading="Name" [form]="form" [save]="save">
    <app-form-field label="Name" [control]="form.controls.name" />
  </app-form-dialog>`,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
class NameDialog {
  readonly form = new FormGroup({
    name: new FormControl('', { nonNullable: true, validators: Validators.required }),
  });
  readonly answer = inject<Subject<string>>(Subject);
  readonly save = () => this.answer;
}

describe('FormDialog', () => {
  let answer: Subject<string>;
  let dialog: MatDialogRef<NameDialog>;
  let closedWith: unknown;
  const element = () => document.querySelector<HTMLElement>('mat-dialog-container');
  const press = (words: string) =>
    [...(element()?.querySelectorAll('button') ?? [])]
      .find((button) => button.textContent?.trim() === words)
      ?.click();
  const settle = async () => {
    TestBed.tick();
    await new Promise((resolve) => setTimeout(resolve, 20));
    TestBed.tick();
  };

  beforeEach(async () => {
    answer = new Subject<string>();
    closedWith = 'open';
    TestBed.configureTestingModule({ providers: [{ provide: Subject, useValue: answer }] });
    dialog = TestBed.inject(MatDialog).open(NameDialog, {
      enterAnimationDuration: 0,
      exitAnimationDuration: 0,
    });
    dialog.afterClosed().subscribe((result: unknown) => (closedWith = result));
    await settle();
  });

  afterEach(async () => {
    dialog.close();
    await settle();
  });

  it('does not save what is incomplete, and says what is missing', async () => {
    press('Save');
    await settle();
    expect(answer.observed).toBe(false);
    expect(element()?.textContent).toContain('Fill this in.');
  });

  it('stays open and filled when the server refuses, with the server’s words at the field', async () => {
    dialog.componentInstance.form.setValue({ name: 'Mara' });
    press('Save');
    answer.error(
      new HttpErrorResponse({
        status: 409,
        error: {
          code: 'conflict',
          detail: 'That name is taken.',
          issues: [{ field: 'name', code: 'taken', message: 'Taken.' }],
        },
      }),
    );
    await settle();
    expect(closedWith).toBe('open');
    expect(element()?.querySelector('mat-error')?.textContent).toBe('Taken.');
    expect(dialog.componentInstance.form.value.name).toBe('Mara');
  });

  it('closes with the server’s answer', async () => {
    dialog.componentInstance.form.setValue({ name: 'Mara' });
    press('Save');
    answer.next('saved');
    await settle();
    expect(closedWith).toBe('saved');
  });

  it('asks before it throws away what was typed', async () => {
    dialog.componentInstance.form.setValue({ name: 'Mara' });
    dialog.componentInstance.form.markAsDirty();
    press('Cancel');
    await settle();
    expect(closedWith).toBe('open');
    expect(element()?.textContent).toContain('Throw away what you typed?');
    press('Throw away');
    await settle();
    expect(closedWith).toBeUndefined();
  });

  it('closes at once when nothing was typed', async () => {
    press('Cancel');
    await settle();
    expect(closedWith).toBeUndefined();
  });
});
