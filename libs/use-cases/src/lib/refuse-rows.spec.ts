import { AppError } from '@brakeven/contract';
import { refusingRows, toRefusalWords } from './refuse-rows';

const refusalOf = (code: string, detail: string) => Object.assign(new Error(), { code, detail });

describe('refusals of the books', () => {
  it('say in pounds which lot is missing, rounded up so that it is enough', async () => {
    // 35.2 lb = 15.966451424 kg exactly; a hair more needs 35.21 lb.
    const detail = { material: '11 ga mild steel', on: '2026-03-12', job: '1042', missingKg: 15.966451424 };
    const words =
      'On Mar 12, 2026 job 1042 takes 35.2\u00a0lb more 11 ga mild steel than is in stock. Receive the missing lot of at least 35.2\u00a0lb of 11 ga mild steel, dated on or before Mar 12, 2026, first.';
    const work = () => Promise.reject(refusalOf('BK001', JSON.stringify(detail)));
    await expect(refusingRows('us', { stock: 'weightKg' }, work)).rejects.toMatchObject({
      code: 'conflict',
      message: words,
      issues: [{ field: 'weightKg', code: 'stock_short', message: words }],
    });
    const hair = { kind: 'stock', ...detail, missingKg: '15.966451425' } as const;
    expect(toRefusalWords(hair, 'us')).toContain('at least 35.21\u00a0lb of');
    expect(toRefusalWords(hair, 'metric')).toContain('at least 15.97\u00a0kg of');
  });

  it('say how much too much comes back, and by when', () => {
    const words = toRefusalWords(
      { kind: 'return', material: 'Galvanized 16 ga', on: '2026-03-14', job: '1042', excessKg: '2.5' },
      'metric',
    );
    expect(words).toMatch(
      /^By Mar 14, 2026 job 1042 would have given back 2\.5\u00a0kg more Galvanized 16 ga/,
    );
  });

  it('tell of a closed month what stays, and how the change can be made', async () => {
    const stock = { material: '11 ga mild steel', on: '2026-03-10', job: '1042' };
    const stranded = refusingRows('us', {}, () => Promise.reject(refusalOf('BK004', JSON.stringify(stock))));
    await expect(stranded).rejects.toMatchObject({
      code: 'conflict',
      message: expect.stringMatching(/job 1042 was charged for 11 ga mild steel.*Reopen the month/),
    });
    const machine = { machine: 'Press 2', on: '2026-03-10', closedThrough: '2026-03-31' };
    const moved = refusingRows('us', { 'in-service': 'inServiceOn' }, () =>
      Promise.reject(refusalOf('BK005', JSON.stringify(machine))),
    );
    await expect(moved).rejects.toMatchObject({
      issues: [{ field: 'inServiceOn', message: expect.stringContaining('up to Mar 31, 2026') }],
    });
  });

  it('name the field of a date before the job, and the rows in the way of a later opening', async () => {
    const detail = { job: '1042', openedOn: '2026-03-10', on: '2026-03-05', table: 'invoice' };
    const work = () => Promise.reject(refusalOf('BK003', JSON.stringify(detail)));
    const refused = refusingRows('us', { 'before-job': 'invoicedOn' }, work);
    await expect(refused).rejects.toBeInstanceOf(AppError);
    await expect(refused).rejects.toMatchObject({
      code: 'invalid_input',
      issues: [{ field: 'invoicedOn', message: expect.stringContaining('opened on Mar 10, 2026') }],
    });
    expect(toRefusalWords({ kind: 'before-job', ...detail, table: 'job' }, 'us')).toBe(
      'Job 1042 has rows dated Mar 5, 2026, so it cannot be opened on Mar 10, 2026. Open it on Mar 5, 2026 or before.',
    );
  });

  it('leave any other error as it came', async () => {
    const failure = refusalOf('23505', 'Key (number)=(1) already exists.');
    await expect(refusingRows('us', {}, () => Promise.reject(failure))).rejects.toBe(failure);
    await expect(refusingRows('us', {}, () => Promise.resolve(7))).resolves.toBe(7);
  });
});
