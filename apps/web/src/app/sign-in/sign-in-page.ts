import {
  ChangeDetectionStrategy,
  Component,
  computed,
  type ElementRef,
  inject,
  input,
  signal,
  viewChild,
} from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { Router } from '@angular/router';
import { type ShownProblem, toShownProblem } from '../api/problem-text';
import { SessionStore } from '../session/session-store';
import { Mark } from '../shell/mark';

/** Sign-in with e-mail and password; a refusal never tells whether the account exists. */
@Component({
  selector: 'app-sign-in-page',
  imports: [Mark, ReactiveFormsModule],
  templateUrl: './sign-in-page.html',
  styleUrl: './sign-in-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SignInPage {
  private readonly session = inject(SessionStore);
  private readonly router = inject(Router);
  private readonly passwordField = viewChild.required<ElementRef<HTMLInputElement>>('passwordField');
  private readonly emailField = viewChild.required<ElementRef<HTMLInputElement>>('emailField');

  /** Where to go afterwards; from the address. */
  readonly returnTo = input<string>();
  readonly expired = input<string>();
  readonly unreachable = input<string>();

  protected readonly form = new FormGroup({
    email: new FormControl('', { nonNullable: true, validators: Validators.required }),
    password: new FormControl('', { nonNullable: true, validators: Validators.required }),
  });
  protected readonly isPasswordShown = signal(false);
  protected readonly isBusy = signal(false);
  protected readonly wasTried = signal(false);
  protected readonly problem = signal<ShownProblem | null>(null);
  protected readonly hint = computed(() => {
    if (this.expired()) return 'Your session has ended. Sign in to go on where you were.';
    return this.unreachable() ? 'The server could not be reached a moment ago. Nothing was changed.' : null;
  });

  protected async signIn(): Promise<void> {
    this.wasTried.set(true);
    if (this.form.invalid) {
      this.focusFirstEmpty();
      return;
    }
    this.isBusy.set(true);
    this.problem.set(null);
    const { email, password } = this.form.getRawValue();
    try {
      await this.session.signIn(email.trim(), password);
      await this.router.navigateByUrl(toOwnPath(this.returnTo()));
    } catch (error) {
      this.problem.set(toShownProblem(error));
      this.form.controls.password.reset();
      this.wasTried.set(false);
      this.passwordField().nativeElement.focus();
    } finally {
      this.isBusy.set(false);
    }
  }

  private focusFirstEmpty(): void {
    const field = this.form.controls.email.invalid ? this.emailField() : this.passwordField();
    field.nativeElement.focus();
  }
}

/** Only paths of this application are followed, never another site's address. */
export function toOwnPath(returnTo: string | undefined): string {
  return returnTo?.startsWith('/') && !/^\/[/\\]/.test(returnTo) ? returnTo : '/';
}
