import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatDialog } from '@angular/material/dialog';
import { type User, type UserCreated } from '@brakeven/contract';
import { InstantPipe, LoadingSkeleton, StatusTag } from '@brakeven/ui';
import { PeopleApi } from '../api/people-api';
import { toProblemSentence } from '../api/problem-text';
import { ShopApi } from '../api/shop-api';
import { confirm } from '../forms/confirm-dialog';
import { SessionStore } from '../session/session-store';
import { LoadError } from '../shell/load-error';
import { Notifier } from '../shell/notifier';
import { ROLE_WORDS } from './role-words';
import { TemporaryPasswordDialog } from './temporary-password-dialog';
import { UserDialog, type UserDialogData } from './user-dialog';

/** Who may sign in, as what. */
@Component({
  selector: 'app-users-card',
  imports: [InstantPipe, LoadError, LoadingSkeleton, StatusTag],
  template: `
    <section class="card" aria-labelledby="users-heading">
      <div class="head">
        <h2 id="users-heading">Users</h2>
        <button type="button" class="button" (click)="edit(null)">Add a user</button>
      </div>
      @if (users.error(); as error) {
        <app-load-error [error]="error" (retried)="users.reload()" />
      } @else if (users.hasValue()) {
        <div class="scroll-x">
          <table class="figures">
            <thead>
              <tr>
                <th scope="col">Name</th>
                <th scope="col">Role</th>
                <th scope="col" class="less">Logs hours as</th>
                <th scope="col" class="less">Last sign-in</th>
                <th scope="col"><span class="visually-hidden">Actions</span></th>
              </tr>
            </thead>
            <tbody>
              @for (user of users.value(); track user.userId) {
                <tr [class.past]="!user.isActive">
                  <th scope="row">
                    {{ user.name }}
                    @if (user.userId === ownId()) {
                      <app-status-tag word="you" tone="blue" />
                    }
                    @if (!user.isActive) {
                      <app-status-tag word="may not sign in" tone="loss" />
                    } @else if (user.mustChangePassword) {
                      <app-status-tag word="temporary password" tone="plan" />
                    }
                    <span class="muted below">{{ user.email }}</span>
                  </th>
                  <td [attr.title]="roles[user.role].text">{{ roles[user.role].label }}</td>
                  <td class="less">{{ nameOf(user.employeeId) }}</td>
                  <td class="date less">{{ user.lastSignInAt ? (user.lastSignInAt | instant) : 'never' }}</td>
                  <td class="actions">
                    <button
                      type="button"
                      class="button quiet"
                      [attr.aria-label]="'Change ' + user.name"
                      (click)="edit(user)"
                    >
                      Change
                    </button>
                    @if (user.userId !== ownId()) {
                      <button
                        type="button"
                        class="button quiet"
                        [attr.aria-label]="'New password for ' + user.name"
                        (click)="resetPassword(user)"
                      >
                        New password
                      </button>
                    }
                  </td>
                </tr>
              }
            </tbody>
          </table>
        </div>
        <details>
          <summary>What each role may see</summary>
          <dl>
            @for (role of roleList; track role.label) {
              <div>
                <dt>{{ role.label }}</dt>
                <dd>{{ role.text }}</dd>
              </div>
            }
          </dl>
        </details>
      } @else {
        <app-loading-skeleton [lines]="4" [barHeight]="20" />
      }
    </section>
  `,
  styleUrl: './users-card.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class UsersCard {
  private readonly api = inject(ShopApi);
  private readonly people = inject(PeopleApi);
  private readonly session = inject(SessionStore);
  private readonly dialog = inject(MatDialog);
  private readonly notifier = inject(Notifier);

  protected readonly users = rxResource({ stream: () => this.api.listUsers() });
  private readonly employees = rxResource({ stream: () => this.people.listEmployees(), defaultValue: [] });
  protected readonly ownId = computed(() => this.session.user()?.userId);
  protected readonly roles = ROLE_WORDS;
  protected readonly roleList = Object.values(ROLE_WORDS);

  protected nameOf(employeeId: string | null): string {
    if (employeeId === null || !this.employees.hasValue()) return '–';
    return this.employees.value().find((one) => one.employeeId === employeeId)?.name ?? '–';
  }

  protected edit(user: User | null): void {
    const employees = this.employees.hasValue() ? this.employees.value() : [];
    this.dialog
      .open<UserDialog, UserDialogData, User | UserCreated>(UserDialog, {
        data: { user, employees },
        width: '520px',
      })
      .afterClosed()
      .subscribe((answer) => {
        if (!answer) return;
        this.users.reload();
        if ('temporaryPassword' in answer) this.showPassword(answer);
        else if (answer.userId === this.ownId()) void this.session.reload();
      });
  }

  protected resetPassword(user: User): void {
    confirm(this.dialog, {
      title: `New temporary password for ${user.name}?`,
      text: ['The present password stops working, and they are signed out everywhere.'],
      action: 'Give a new password',
    }).subscribe((isConfirmed) => {
      if (!isConfirmed) return;
      this.api.resetPassword(user.userId).subscribe({
        next: (answer) => {
          this.users.reload();
          this.showPassword(answer);
        },
        error: (error: unknown) => this.notifier.warn(toProblemSentence(error)),
      });
    });
  }

  private showPassword(data: UserCreated): void {
    this.dialog.open(TemporaryPasswordDialog, { data, width: '480px', disableClose: true });
  }
}
