import { type ColumnType, type Generated } from 'kysely';
import { type Instant, type InstantOrNull, type Json, type Numeric } from './table-columns';

export interface ShopTable {
  shopId: Generated<string>;
  name: string;
  timeZone: string;
  currency: string;
  units: 'us' | 'metric';
  /** 0 Sunday … 6 Saturday. */
  weekStart: Generated<number>;
  /** Null: overtime is not computed. */
  overtimeThresholdHours: ColumnType<Numeric | null, Numeric | null | undefined, Numeric | null>;
  overtimeTo: Generated<'overhead' | 'jobs'>;
  /** The share of a rating, in percent, that the shop keeps below. */
  forceLinePercent: Generated<Numeric>;
  createdAt: Instant;
}

export interface UserAccountTable {
  shopId: string;
  userId: Generated<string>;
  name: string;
  email: string;
  role: 'owner' | 'bookkeeper' | 'lead' | 'operator';
  employeeId: string | null;
  isActive: Generated<boolean>;
  passwordHash: string;
  passwordChangedAt: Instant;
  mustChangePassword: Generated<boolean>;
  lastSignInAt: InstantOrNull;
  createdAt: Instant;
}

export interface AuditEventTable {
  shopId: string;
  eventId: Generated<string>;
  at: Instant;
  actorId: string | null;
  actor: string;
  action: string;
  subjectKind: string;
  subjectId: string;
  before: Json<Record<string, unknown>> | null;
  after: Json<Record<string, unknown>> | null;
}

export interface SavedViewTable {
  shopId: string;
  savedViewId: Generated<string>;
  userId: string;
  page: string;
  name: string;
  state: Json<unknown>;
  savedAt: Instant;
}
