import { type Provider, signal } from '@angular/core';
import { hasPermission, type Permission, type Role, type Session } from '@brakeven/contract';
import { SessionStore } from '../session/session-store';

const SHOP: Session['shop'] = {
  shopId: 'shop-1',
  name: 'Tern Hollow Fabrication',
  timeZone: 'America/Chicago',
  currency: 'USD',
  units: 'us',
  weekStart: 1,
  overtimeThresholdHours: '40.00',
  overtimeTo: 'overhead',
};

/** Somebody signed in with a role, and no server behind it. */
export function provideSession(role: Role, change: Partial<Session['user']> = {}): Provider {
  const user = {
    userId: 'user-1',
    name: 'Mara Oduya',
    email: 'mara@ternhollow.example',
    role,
    mustChangePassword: false,
  };
  const store: Partial<Record<keyof SessionStore, unknown>> = {
    user: signal({ ...user, ...change }),
    role: signal(role),
    shop: signal(SHOP),
    shopFormat: signal(SHOP),
    can: (permission: Permission) => hasPermission(role, permission),
    reload: jest.fn().mockResolvedValue(null),
  };
  return { provide: SessionStore, useValue: store };
}
