import { HttpErrorResponse } from '@angular/common/http';
import { computed, inject, Injectable, signal } from '@angular/core';
import { hasPermission, type Permission, type Session } from '@brakeven/contract';
import { type ShopFormat } from '@brakeven/ui';
import { firstValueFrom } from 'rxjs';
import { SessionApi } from '../api/session-api';

const DEFAULT_FORMAT: ShopFormat = { currency: 'USD', units: 'us', timeZone: 'UTC' };

/** Who is signed in, and in which shop. */
@Injectable({ providedIn: 'root' })
export class SessionStore {
  private readonly api = inject(SessionApi);
  private readonly current = signal<Session | null>(null);
  private loading: Promise<Session | null> | null = null;

  readonly session = this.current.asReadonly();
  readonly user = computed(() => this.current()?.user ?? null);
  readonly shop = computed(() => this.current()?.shop ?? null);
  readonly role = computed(() => this.user()?.role ?? null);
  readonly shopFormat = computed<ShopFormat>(() => this.shop() ?? DEFAULT_FORMAT);

  /** Whether the role of whoever is signed in has a permission; the server decides, this only hides. */
  can(permission: Permission): boolean {
    const role = this.role();
    return role !== null && hasPermission(role, permission);
  }

  /** The session, asked of the server once; null if nobody is signed in. Rejects if the server is out of reach. */
  load(): Promise<Session | null> {
    const known = this.current();
    if (known) return Promise.resolve(known);
    this.loading ??= this.reload().finally(() => (this.loading = null));
    return this.loading;
  }

  /** Asks the server again, after the shop's settings or the own password have changed. */
  async reload(): Promise<Session | null> {
    try {
      this.current.set(await firstValueFrom(this.api.getSession()));
    } catch (error) {
      if (!(error instanceof HttpErrorResponse) || error.status !== 401) throw error;
      this.current.set(null);
    }
    return this.current();
  }

  /** Asks for the session first: that answer brings a fresh token against forged requests, which sign-in needs too. */
  async signIn(email: string, password: string): Promise<Session> {
    await this.reload();
    const session = await firstValueFrom(this.api.signIn({ email, password }));
    this.current.set(session);
    return session;
  }

  async signOut(): Promise<void> {
    await firstValueFrom(this.api.signOut());
    this.forget();
  }

  /** The server no longer knows the session. */
  forget(): void {
    this.current.set(null);
  }
}
