import { createTestShop, type TestShop } from '@brakeven/test-shop';
import { runRollup } from '../roll-up-costs/run-rollup';
import { examineBooks, examineDatabase } from './examine-database';

let shop: TestShop;
beforeAll(async () => {
  shop = await createTestShop();
  const employeeId = await shop.addEmployee();
  await shop.addPayRate({ employeeId, validFrom: '2024-01-01', wagePerHour: '30' });
  const work = { employeeId, jobId: await shop.addJob(), operationId: await shop.addOperation() };
  // The rest of the week has overtime, which goes to overhead and to no job.
  const days = ['2024-03-04', '2024-03-05', '2024-03-06', '2024-03-07', '2024-03-08', '2024-03-09'];
  await shop.addEntries(days.map((workedOn) => ({ ...work, workedOn, hours: '8' })));
  await runRollup(shop.context(), {});
});
afterAll(() => shop.close());

describe('examining', () => {
  it('finds the application bound by row-level security', async () => {
    const findings = await examineDatabase(shop.db);
    expect(findings.map(({ subject, isGood }) => [subject, isGood])).toEqual([
      ['PostgreSQL', true],
      ['Tenancy', true],
    ]);
  });

  it('finds books that agree, and names the total of those that do not', async () => {
    const subject = `Totals of ${shop.shop.name}`;
    expect(await examineBooks(shop.context())).toEqual([
      { subject, isGood: true, message: 'days and cost lines agree' },
    ]);
    await shop.inShop((trx) =>
      trx
        .updateTable('jobDay')
        .set({ amount: '241.00' })
        .where('category', '=', 'labour')
        .where('postedOn', '=', '2024-03-04')
        .execute(),
    );
    expect(await examineBooks(shop.context())).toEqual([
      {
        subject,
        isGood: false,
        message: 'jobs: labour: lines make 1440.00, days 1441.00; run rollup --full',
      },
    ]);
    await runRollup(shop.context(), { full: true });
    expect(await examineBooks(shop.context())).toMatchObject([{ isGood: true }]);
  });
});
