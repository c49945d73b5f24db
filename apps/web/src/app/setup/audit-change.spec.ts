import { type AuditEvent } from '@brakeven/contract';
import { toAuditLine } from './audit-change';

const event = (change: Partial<AuditEvent>): AuditEvent => ({
  eventId: 'e',
  at: '2026-12-01T15:00:00Z',
  actor: 'Mara Oduya',
  action: 'changed',
  subjectKind: 'pay_rate',
  subjectId: 'r',
  before: null,
  after: null,
  ...change,
});

describe('toAuditLine', () => {
  it('lists only what changed, in words', () => {
    const line = toAuditLine(
      event({
        before: { pay_rate_id: 'r', wage_per_hour: 28, burden_percent: 28, valid_from: '2026-01-05' },
        after: { pay_rate_id: 'r', wage_per_hour: 28.5, burden_percent: 28, valid_from: '2026-01-12' },
      }),
    );
    expect(line.subject).toBe('pay rate');
    expect(line.changes).toEqual([
      { label: 'wage per hour', before: '28', after: '28.5' },
      { label: 'valid from', before: 'Jan 5, 2026', after: 'Jan 12, 2026' },
    ]);
  });

  it('lists all of what was added, names it, and leaves out the keys of the database', () => {
    const after = { shop_id: 's', machine_id: 'm', code: 'P2', name: 'Press 2', in_service_on: null };
    const line = toAuditLine(event({ action: 'added', subjectKind: 'machine', after }));
    expect(line.name).toBe('P2 Press 2');
    expect(line.changes).toEqual([
      { label: 'code', before: null, after: 'P2' },
      { label: 'name', before: null, after: 'Press 2' },
    ]);
  });

  it('says that a password or a reference has changed without its value, and leaves out mere moments', () => {
    const before = { password_changed_at: '2026-01-05T10:00:00Z', employee_id: 'e1', undone_at: null };
    const after = {
      password_changed_at: '2026-01-06T10:00:00Z',
      employee_id: 'e2',
      undone_at: '2026-01-06T10:00:00Z',
    };
    expect(toAuditLine(event({ before, after })).changes).toEqual([
      { label: 'password', before: null, after: 'changed' },
      { label: 'employee', before: null, after: 'another' },
    ]);
  });

  it('reads yes, no and lists instead of code', () => {
    const before = { is_active: true, problems: [1, 2] };
    expect(toAuditLine(event({ before, after: { is_active: false } })).changes).toEqual([
      { label: 'is active', before: 'yes', after: 'no' },
      { label: 'problems', before: '2 listed', after: null },
    ]);
  });
});
