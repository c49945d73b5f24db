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

const read = (of: AuditEvent) => toAuditLine(of, 'us');

describe('toAuditLine', () => {
  it('lists only what changed, in words', () => {
    const line = read(
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
    const line = read(event({ action: 'added', subjectKind: 'machine', after }));
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
    expect(read(event({ before, after })).changes).toEqual([
      { label: 'password', before: null, after: 'changed' },
      { label: 'employee', before: null, after: 'another' },
    ]);
  });

  it('reads yes, no and lists instead of code', () => {
    const before = { is_active: true, problems: [1, 2] };
    expect(read(event({ before, after: { is_active: false } })).changes).toEqual([
      { label: 'is active', before: 'yes', after: 'no' },
      { label: 'problems', before: '2 listed', after: null },
    ]);
  });

  it('reads what has a unit in the shop’s, and leaves a price per unit alone', () => {
    const after = {
      bed_length_mm: 1828.8,
      rated_force_kn: '533.786560',
      weight_kg: 10,
      price_per_kg: '2.50',
    };
    const added = event({ action: 'added', after });
    const texts = (units: 'us' | 'metric') =>
      toAuditLine(added, units).changes.map((one) => [one.label, one.after]);
    expect(texts('us')).toEqual([
      ['bed length', '72\u00a0in'],
      ['rated force', '60\u00a0US tons'],
      ['weight', '22.05\u00a0lb'],
      ['price per kg', '2.50'],
    ]);
    expect(texts('metric')[0]).toEqual(['bed length', '1,828.8\u00a0mm']);
  });
});
