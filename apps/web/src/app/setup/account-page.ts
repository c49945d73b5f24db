import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { Router } from '@angular/router';
import { LIMITS } from '@brakeven/contract';
import { PageHeader } from '@brakeven/ui';
import { type ShownProblem, toShownProblem } from '../api/problem-text';
import { SessionApi } from '../api/session-api';
import { FormField } from '../forms/form-field';
import { showIssues } from '../forms/parsed-by';
import { textControl } from '../forms/text-control';
import { SessionStore } from '../session/session-store';
import { Notifier } from '../shell/notifier';
import { differsFrom, matches } from './password-rules';
import { ROLE_WORDS } from './role-words';

/** Who is signed in, and the own password. */
@Component({
  selector: 'app-account-page',
  imports: [FormField, PageHeader, ReactiveFormsModule],
  templateUrl: './account-page.html',
  styleUrl: './account-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AccountPage {
  private readonly api = inject(SessionApi);
  private readonly session = inject(SessionStore);
  private readonly notifier = inject(Notifier);
  private readonly router = inject(Router);

  protected readonly user = this.session.user;
  protected readonly mustChange = computed(() => this.user()?.mustChangePassword ?? false);
  protected readonly role = computed(() => {
    const role = this.user()?.role;
    return role && ROLE_WORDS[role];
  });
  protected readonly isSaving = signal(false);
  protected readonly problem = signal<ShownProblem | null>(null);
  protected readonly lengthMin = LIMITS.passwordLengthMin;

  private readonly current = textControl('', Validators.required);
  private readonly next = textControl(
    '',
    Validators.required,
    Validators.minLength(LIMITS.passwordLengthMin),
    Validators.maxLength(LIMITS.passwordLengthMax),
    differsFrom(this.current),
  );
  protected readonly form = new FormGroup({
    currentPassword: this.current,
    newPassword: this.next,
    again: textControl('', Validators.required, matches(this.next)),
  });

  protected save(): void {
    this.form.controls.again.updateValueAndValidity();
    this.next.updateValueAndValidity();
    this.form.markAllAsTouched();
    if (this.form.invalid || this.isSaving()) return;
    const { currentPassword, newPassword } = this.form.getRawValue();
    this.isSaving.set(true);
    this.problem.set(null);
    this.api.changePassword({ currentPassword, newPassword }).subscribe({
      next: () => void this.finish(),
      error: (error: unknown) => this.refuse(toShownProblem(error)),
    });
  }

  private async finish(): Promise<void> {
    const hadTo = this.mustChange();
    await this.session.reload();
    this.isSaving.set(false);
    this.form.reset();
    this.notifier.say('The password is changed. Other places where you were signed in are signed out.');
    if (hadTo) await this.router.navigateByUrl('/');
  }

  private refuse(problem: ShownProblem): void {
    this.isSaving.set(false);
    const rest = showIssues(this.form, problem.issues);
    if (rest.length > 0 || problem.issues.length === 0) this.problem.set(problem);
  }
}
