import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { FormGroup, Validators } from '@angular/forms';
import { MAT_DIALOG_DATA } from '@angular/material/dialog';
import { type Employee, type Role, type User } from '@brakeven/contract';
import { ShopApi } from '../api/shop-api';
import { FormDialog } from '../forms/form-dialog';
import { FormField } from '../forms/form-field';
import { textControl } from '../forms/text-control';
import { ROLE_OPTIONS, ROLE_WORDS } from './role-words';

export interface UserDialogData {
  /** Absent for a new user. */
  user: User | null;
  employees: readonly Employee[];
}

const ACTIVE_OPTIONS = [
  { value: 'yes', label: 'May sign in' },
  { value: 'no', label: 'May not sign in any more' },
];

/** Adds somebody who may sign in, or changes role, employee and whether they still may. */
@Component({
  selector: 'app-user-dialog',
  imports: [FormDialog, FormField],
  template: `
    <app-form-dialog
      [heading]="data.user ? 'Change ' + data.user.name : 'Add a user'"
      [submitLabel]="data.user ? 'Save' : 'Add user'"
      [form]="form"
      [save]="save"
    >
      <app-form-field class="wide" label="Name" [control]="form.controls.name" />
      @if (!data.user) {
        <app-form-field
          class="wide"
          label="E-mail"
          type="email"
          hint="They sign in with it"
          [control]="form.controls.email"
        />
      }
      <app-form-field
        class="wide"
        label="Role"
        [options]="roles"
        [hint]="roleText()"
        [control]="form.controls.role"
      />
      <app-form-field
        class="wide"
        label="Logs hours as"
        [options]="employees"
        [control]="form.controls.employeeId"
      />
      @if (data.user) {
        <app-form-field
          class="wide"
          label="Sign-in"
          [options]="activeOptions"
          [control]="form.controls.isActive"
        />
      }
    </app-form-dialog>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class UserDialog {
  protected readonly data = inject<UserDialogData>(MAT_DIALOG_DATA);
  private readonly api = inject(ShopApi);
  protected readonly roles = ROLE_OPTIONS;
  protected readonly activeOptions = ACTIVE_OPTIONS;
  protected readonly employees = [
    { value: '', label: 'Nobody' },
    ...this.data.employees.map(({ employeeId, number, name }) => ({
      value: employeeId,
      label: `${number} ${name}`,
    })),
  ];

  protected readonly form = new FormGroup({
    name: textControl(this.data.user?.name, Validators.required, Validators.maxLength(200)),
    email: textControl(
      this.data.user?.email,
      ...(this.data.user ? [] : [Validators.required, Validators.email]),
    ),
    role: textControl(this.data.user?.role ?? 'operator', Validators.required),
    employeeId: textControl(this.data.user?.employeeId),
    isActive: textControl(this.data.user?.isActive === false ? 'no' : 'yes'),
  });

  private readonly role = toSignal(this.form.controls.role.valueChanges, {
    initialValue: this.form.controls.role.value,
  });
  protected readonly roleText = computed(() => ROLE_WORDS[this.role() as Role].text);

  protected readonly save = () => {
    const { user } = this.data;
    const { name, email, isActive, ...value } = this.form.getRawValue();
    const role = value.role as Role;
    const employeeId = value.employeeId || null;
    if (!user) return this.api.createUser({ name, email, role, employeeId });
    return this.api.updateUser(user.userId, { name, role, employeeId, isActive: isActive === 'yes' });
  };
}
