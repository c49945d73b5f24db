import { BOOKS_FIGURES, JOB_FIGURES, PAYBACK_FIGURES, type FigureRef } from '@brakeven/contract';
import { D, sum } from '@brakeven/values';
import { getMonth } from '../close-months/month-end';
import { savePayrollHours } from '../close-months/payroll-hours';
import { type ShopContext } from '../context';
import { runRollup } from '../roll-up-costs/run-rollup';
import { getJob, listJobLines } from '../show-jobs/get-job';
import { listJobs } from '../show-jobs/list-jobs';
import { getPayback } from '../show-payback/get-payback';
import { WORKED_NOW } from '../testing/worked-shop';
import { getBooksWorkings } from './get-books-workings';
import { getHoursWorkings } from './get-hours-workings';
import { getOvertimeWorkings } from './get-overtime-workings';
import { getPaybackWorkings } from './get-payback-workings';
import { getStockWorkings } from './get-stock-workings';
import { createFullShop, type FullShop } from './testing/full-shop';
import { expectToAddUp, readAll } from './testing/read-workings';

jest.setTimeout(30_000);

describe('workings of a shop with every category and a closed month', () => {
  let shop: FullShop;
  let owner: ShopContext;
  let press: string;

  beforeAll(async () => {
    shop = await createFullShop();
    owner = shop.context('owner', { now: WORKED_NOW });
    press = shop.machines.press;
  }, 60_000);
  afterAll(() => shop.close());

  const shownIn = (figures: object, { figure }: FigureRef) =>
    (figures as Record<string, string | null>)[figure.split('.')[1] ?? ''];

  const jobFigures = JOB_FIGURES.filter((figure) => figure !== 'job.earned');

  it.each(jobFigures)('of %s add up to what the pages show, of a job and of all jobs', async (figure) => {
    for (const jobId of [shop.jobs.guards, shop.jobs.covers, shop.jobs.idle]) {
      const workings = await readAll(owner, { figure, jobId });
      expectToAddUp(workings);
      expect(D(workings.amount).toFixed(2)).toBe(
        D(shownIn(await getJob(owner, { jobId }), { figure }) ?? '0').toFixed(2),
      );
    }
    const ofAll = await readAll(owner, { figure });
    expectToAddUp(ofAll);
    expect(ofAll.lineCount).toBeGreaterThan(0);
    const { totals } = await listJobs(owner, { limit: 1, sort: 'number', direction: 'asc' });
    expect(ofAll.amount).toBe(shownIn(totals, { figure }));
  });

  it('of every category have something in them, so that the sums are worth something', async () => {
    for (const figure of jobFigures) {
      expect([figure, D((await readAll(owner, { figure })).amount).isZero()]).toEqual([figure, false]);
    }
  });

  it.each(PAYBACK_FIGURES.filter((figure) => figure !== 'payback.costItem'))(
    'of %s can be read, and add up',
    async (figure) => {
      const workings = await readAll(owner, { figure, machineId: press });
      if (figure !== 'payback.pacePerWeek') expectToAddUp(workings);
      expect(D(workings.amount).isZero()).toBe(false);
    },
  );

  it('lead from each line that is a figure to that figure', async () => {
    const parents: FigureRef[] = [
      { figure: 'job.overtime', jobId: shop.jobs.guards },
      { figure: 'job.material', jobId: shop.jobs.covers },
      { figure: 'job.workInProgress' },
      { figure: 'payback.outlay', machineId: press },
      { figure: 'payback.otherJobs', machineId: press },
      { figure: 'stock.value', materialId: shop.materialId },
    ];
    for (const parent of parents) {
      const { lines } = await readAll(owner, parent);
      const refs = lines.flatMap(({ figure }) => figure ?? []);
      expect([parent.figure, refs.length > 0]).toEqual([parent.figure, true]);
      for (const ref of refs) expectToAddUp(await readAll(owner, ref));
    }
  });

  describe('of a job in progress', () => {
    it('are cost less what was invoiced', async () => {
      const { amount, parts } = await readAll(owner, {
        figure: 'job.workInProgress',
        jobId: shop.jobs.guards,
      });
      const job = await getJob(owner, { jobId: shop.jobs.guards });
      expect(amount).toBe(job.workInProgress);
      expect(parts.map((part) => part.label)).toEqual(['Cost', 'Invoiced']);
    });

    it('say why nothing is in progress', async () => {
      await shop.inShop((trx) =>
        trx.updateTable('job').set({ status: 'invoiced' }).where('jobId', '=', shop.jobs.internal).execute(),
      );
      const workings = await readAll(owner, { figure: 'job.workInProgress', jobId: shop.jobs.internal });
      expectToAddUp(workings);
      expect(workings.amount).toBe('0.00');
      expect(workings.parts.at(-1)?.label).toBe('Not in progress: neither open nor finished');
    });
  });

  describe('of a premium', () => {
    const week = { figure: 'overtime.week' as const, from: '2026-05-13' };

    it('show threshold, hours, regular rate, premium and spread', async () => {
      const employeeId = shop.employees.wen;
      const workings = await readAll(owner, { ...week, employeeId });
      const inputs = Object.fromEntries(workings.inputs.map(({ label, value }) => [label, value]));
      expect(inputs).toMatchObject({
        'Overtime counts from': '40.00\u00a0h',
        'Regular rate, straight-time pay ÷ hours': '$24.00 per hour',
      });
      // The worked shop has more entries in that week.
      const hours = D(await sumHours(employeeId));
      expect(inputs['Hours of the week']).toBe(`${hours.toFixed()}\u00a0h`);
      expect(workings.amount).toBe(hours.minus(40).times(12).toDecimalPlaces(2, 4).toFixed(2));
      expect(workings.figure.from).toBe('2026-05-11');
      expect(new Set(workings.lines.map((line) => line.job)).size).toBeGreaterThan(1);
      expect(workings.lines.every((line) => line.figure === null)).toBe(true);
    });

    const sumHours = async (employeeId: string) => {
      const { hours } = await shop.inShop((trx) =>
        trx
          .selectFrom('timeEntry')
          .select((eb) => eb.fn.sum<string>('hours').as('hours'))
          .where('employeeId', '=', employeeId)
          .where('workedOn', '>=', '2026-05-11')
          .where('workedOn', '<=', '2026-05-17')
          .where('voidedAt', 'is', null)
          .executeTakeFirstOrThrow(),
      );
      return hours;
    };

    it('are of no job while the premium goes to overhead, and the week still opens', async () => {
      const before = await readAll(owner, { figure: 'job.overtime' });
      shop.shop.overtimeTo = 'overhead';
      await shop.inShop((trx) => trx.updateTable('shop').set({ overtimeTo: 'overhead' }).execute());
      await runRollup(owner, {});
      expect((await readAll(owner, { figure: 'job.overtime' })).amount).toBe('0.00');
      const ofWeek = await readAll(owner, { ...week, employeeId: shop.employees.wen });
      expectToAddUp(ofWeek);
      expect(ofWeek.lines.map((line) => line.job)).toEqual(ofWeek.lines.map(() => null));
      shop.shop.overtimeTo = 'jobs';
      await shop.inShop((trx) => trx.updateTable('shop').set({ overtimeTo: 'jobs' }).execute());
      await runRollup(owner, {});
      expect((await readAll(owner, { figure: 'job.overtime' })).amount).toBe(before.amount);
    });
  });

  describe('of material', () => {
    it('lead to the stock of that moment, and from there to its lots', async () => {
      const issue = await readAll(owner, { figure: 'stock.issue', issueId: shop.issues.covers });
      // 120.5 kg of 500 kg worth 651.00.
      expect(issue.amount).toBe('156.89');
      expect(issue.inputs.map(({ label, value }) => `${label}: ${value}`)).toEqual([
        'Weight: 265.66\u00a0lb',
        'Date: Mar 10, 2026',
        'In stock before it, 1,102.31\u00a0lb: $651.00',
        'Average then: $0.590577 per lb',
        'In stock after it, 836.65\u00a0lb: $494.11',
      ]);
      const before = issue.inputs.find(({ figure }) => figure !== null)?.figure;
      if (!before) throw new Error('The stock does not open.');
      const stock = await readAll(owner, before);
      expectToAddUp(stock);
      expect(stock.amount).toBe('651.00');
      expect(stock.lines).toMatchObject([
        { label: 'Lot L-1 from Delta Sheet Supply', quantity: '500.0000', unit: 'kg', amount: '651.00' },
      ]);
    });

    it('count a return against the job, and the stock as all of its moves', async () => {
      const back = await readAll(owner, { figure: 'stock.issue', issueId: shop.issues.back });
      expect(back.lines).toMatchObject([{ quantity: '-20.0000', detail: 'returned to stock' }]);
      expect(D(back.amount).lt(0)).toBe(true);
      const stock = await readAll(owner, { figure: 'stock.value', materialId: shop.materialId });
      expect(stock.lines.map((line) => line.category).sort()).toEqual(['issue', 'lot', 'lot', 'return']);
    });
  });

  describe('after a month was closed', () => {
    it('mark what came late with its own day', async () => {
      const { lines } = await readAll(owner, { figure: 'job.labour', jobId: shop.jobs.covers });
      const late = lines.filter((line) => line.isLate && line.takesBackOn === null);
      expect(late).toMatchObject([{ on: '2026-03-20', postedOn: '2026-04-01', quantity: '2.5000' }]);
    });

    it('say what a line takes back', async () => {
      const { items } = await listJobLines(owner, { jobId: shop.jobs.guards, limit: 500 });
      const material = items.filter((line) => line.category === 'material');
      expect(material).toMatchObject([
        { postedOn: '2026-04-01', isLate: true, takesBackOn: '2026-03-12', quantity: '-33.3333', unit: 'kg' },
        { postedOn: '2026-03-12', isLate: false, takesBackOn: null, detail: '24 pieces, wrong gauge' },
      ]);
      const issue = await readAll(owner, { figure: 'stock.issue', issueId: shop.issues.voided });
      expectToAddUp(issue);
      expect(issue.amount).toBe('0.00');
      expect(issue.inputs.at(-1)?.value).toContain('voided');
    });

    it('take back the hours of an entry that was voided', async () => {
      const entryId = shop.entryIds[12] ?? '';
      const { lines } = await readAll(owner, { figure: 'job.hours' });
      const ofEntry = lines.filter(({ lineId }) => lineId.includes(entryId));
      expect(ofEntry).toHaveLength(2);
      expect(
        D(ofEntry[0]?.amount ?? '')
          .plus(ofEntry[1]?.amount ?? '')
          .isZero(),
      ).toBe(true);
    });
  });

  describe('of the books', () => {
    const april = { from: '2026-04-01', to: '2026-04-30' };

    it('add up, parts and rows, to the lines posted in the days', async () => {
      for (const figure of BOOKS_FIGURES) expectToAddUp(await readAll(owner, { figure, ...april }));
      const cost = await readAll(owner, { figure: 'books.cost', ...april });
      expect(cost.parts.map((part) => part.figure?.figure)).toEqual([
        'books.labour',
        'books.overtime',
        'books.machine',
        'books.overhead',
        'books.material',
        'books.outside',
      ]);
      const ofJobs = await readAll(owner, { figure: 'job.total', ...april });
      const toOverhead = await readAll(owner, { figure: 'books.cost', part: 'overhead', ...april });
      expect(D(ofJobs.amount).plus(toOverhead.amount).toFixed(2)).toBe(cost.amount);
    });

    it('tell what came late, by itself', async () => {
      const late = await readAll(owner, { figure: 'books.cost', part: 'late', ...april });
      expectToAddUp(late);
      expect(late.lineCount).toBeGreaterThan(3);
      expect(late.lines.every((line) => line.isLate)).toBe(true);
      expect((await readAll(owner, { figure: 'books.cost', part: 'late' })).amount).toBe(late.amount);
    });
  });

  describe('of hours held against payroll', () => {
    const march = { month: '2026-03', days: { from: '2026-03-01', to: '2026-03-31' } };
    const may = { month: '2026-05', days: { from: '2026-05-01', to: '2026-05-31' } };

    it.each([march, may])(
      'add up to what $month shows, of each employee and of all',
      async ({ month, days }) => {
        const { tieOut } = await getMonth(owner, { month });
        const figures = { timesheets: 'hours', overtime: 'overtimeHours', costed: 'costedHours' } as const;
        for (const [kind, shown] of Object.entries(figures)) {
          const figure = `hours.${kind}` as FigureRef['figure'];
          for (const row of tieOut) {
            const { employeeId } = row;
            const workings = await readAll(owner, { figure, employeeId, ...days }, 3);
            expectToAddUp(workings);
            expect([figure, workings.amount]).toEqual([figure, row[shown as 'hours']]);
            expect(workings.title).toContain(row.employee);
          }
          const ofAll = await readAll(owner, { figure, ...days });
          expectToAddUp(ofAll);
          expect(ofAll.amount).toBe(sum(tieOut.map((row) => D(row[shown as 'hours']))).toFixed(4));
        }
      },
    );

    it('lead from an entry to its cell, and from a week to its premium', async () => {
      const entries = await readAll(owner, { figure: 'hours.timesheets', ...march.days });
      expect(entries.lines.filter(({ source }) => source?.fileName === 'march week 1.xlsx')).not.toEqual([]);
      const { employees } = shop;
      const overtime = await readAll(owner, {
        figure: 'hours.overtime',
        employeeId: employees.wen,
        ...may.days,
      });
      expect(overtime.lines).toMatchObject([{ on: '2026-05-11', label: 'wen Abara', category: 'overtime' }]);
      const premium = await readAll(owner, overtime.lines[0]?.figure ?? { figure: 'overtime.week' });
      const above = premium.inputs.find(({ label }) => label === 'Hours above')?.value;
      expect(above).toBe(`${D(overtime.amount).toFixed()}\u00a0h`);
    });

    it('say nothing of wages', async () => {
      const { lines, inputs } = await readAll(owner, { figure: 'hours.costed', ...may.days });
      expect(lines.length).toBeGreaterThan(0);
      expect(lines.filter(({ rate, rateFactor }) => rate !== null || rateFactor !== null)).toEqual([]);
      expect(inputs).toEqual([]);
    });

    it('take the timesheets from what payroll has, once it is entered', async () => {
      const [first, ...others] = (await getMonth(owner, { month: '2026-05' })).tieOut;
      const { employeeId } = first ?? { employeeId: '' };
      const ref: FigureRef = { figure: 'hours.difference', employeeId, ...may.days };
      await expect(readAll(owner, ref)).rejects.toMatchObject({ code: 'not_found' });
      const saved = await savePayrollHours(owner, { month: '2026-05', employeeId }, { hours: '100' });
      const difference = await readAll(owner, ref);
      expectToAddUp(difference);
      expect(difference.amount).toBe(saved.difference);
      const ofAll: FigureRef = { figure: 'hours.difference', ...may.days };
      await expect(readAll(owner, ofAll)).rejects.toMatchObject({ code: 'not_found' });
      for (const other of others) {
        await savePayrollHours(owner, { month: '2026-05', employeeId: other.employeeId }, { hours: '60.5' });
      }
      const whole = await readAll(owner, ofAll);
      expectToAddUp(whole);
      expect(whole.parts.map(({ figure }) => figure?.employeeId)).toContain(employeeId);
    });
  });

  it('name vendor, invoice and credit note', async () => {
    const labels = async (figure: 'job.outside' | 'job.invoiced') =>
      (await readAll(owner, { figure, jobId: shop.jobs.covers })).lines.map(
        ({ label, detail, unit, quantity, amount }) => [label, detail, unit, quantity, amount],
      );
    expect(await labels('job.outside')).toEqual([
      ['Prairie Powder Coat', 'Galvanizing', 'each', '1.0000', '145.75'],
    ]);
    expect(await labels('job.invoiced')).toEqual([
      ['Credit note 77', 'Two covers short', 'each', '-1.0000', '-160.00'],
      ['Invoice 5002', null, 'each', '1.0000', '1999.99'],
    ]);
  });

  it('of a cost item are its own row, its day and who entered it', async () => {
    const outlay = await readAll(owner, { figure: 'payback.outlay', machineId: press });
    const item = outlay.lines.find((line) => line.label === 'Press, used');
    const workings = await readAll(owner, item?.figure ?? { figure: 'payback.costItem' });
    expect(workings).toMatchObject({ title: 'Price of Press 2', amount: '14500.00', lineCount: 1 });
    expect(workings.inputs.map(({ label, value }) => `${label}: ${value}`)).toEqual([
      'Kind: price',
      'Description: Press, used',
      'Paid on: Feb 10, 2026',
      expect.stringMatching(/^Entered by: Test, /),
    ]);
  });

  it('of the jobs that are not listed by name are what the payback shows, job by job', async () => {
    const { otherJobs, pacePerWeek, curve } = await getPayback(owner, { machineId: press });
    const others = await readAll(owner, { figure: 'payback.otherJobs', machineId: press });
    expect(otherJobs.jobs).toBeGreaterThan(0);
    expect([others.lineCount, others.amount]).toEqual([otherJobs.jobs, otherJobs.net]);
    for (const line of others.lines) {
      if (!line.figure) throw new Error(`${line.label} does not open.`);
      expect((await readAll(owner, line.figure)).amount).toBe(line.amount);
    }
    const pace = await readAll(owner, { figure: 'payback.pacePerWeek', machineId: press });
    expect(pace.amount).toBe(pacePerWeek);
    const opened = pace.inputs.find(({ figure }) => figure !== null)?.figure;
    expectToAddUp(await readAll(owner, opened ?? { figure: 'payback.earnedBack' }));
    for (const point of [curve[5], curve.at(-1)]) {
      const ref = { figure: 'payback.netCash' as const, machineId: press, to: point?.on };
      expect((await readAll(owner, ref)).amount).toBe(point?.netCash);
    }
  });

  it('refuse what names nothing', async () => {
    const refusals = [
      [getOvertimeWorkings, { figure: 'overtime.week', from: '2026-05-11' }, 'employeeId'],
      [getOvertimeWorkings, { figure: 'overtime.week', employeeId: shop.employees.wen }, 'from'],
      [getOvertimeWorkings, { figure: 'job.total' }, 'figure'],
      [getStockWorkings, { figure: 'stock.issue' }, 'issueId'],
      [getStockWorkings, { figure: 'stock.value' }, 'materialId'],
      [getStockWorkings, { figure: 'job.total' }, 'figure'],
      [getBooksWorkings, { figure: 'job.total' }, 'figure'],
      [getHoursWorkings, { figure: 'job.hours' }, 'figure'],
      [getHoursWorkings, { figure: 'hours.costed', to: '2026-03-31' }, 'from'],
      [getHoursWorkings, { figure: 'hours.costed', from: '2026-03-01' }, 'to'],
      [getPaybackWorkings, { figure: 'payback.costItem', machineId: press }, 'costItemId'],
    ] as const;
    for (const [read, ref, field] of refusals) {
      await expect(read(owner, { ...ref, limit: 10 })).rejects.toMatchObject({
        code: 'invalid_input',
        issues: [{ field }],
      });
    }
  });

  it('do not find what other shops have', async () => {
    const elsewhere = '0198aaaa-0000-7000-8000-000000000abc';
    const missing: FigureRef[] = [
      { figure: 'overtime.week', employeeId: elsewhere, from: '2026-05-11' },
      { figure: 'hours.timesheets', employeeId: elsewhere, from: '2026-05-01', to: '2026-05-31' },
      { figure: 'job.total', customerId: elsewhere },
      { figure: 'stock.issue', issueId: elsewhere },
      { figure: 'stock.value', materialId: elsewhere },
      { figure: 'stock.value', materialId: shop.materialId, issueId: elsewhere },
      { figure: 'payback.costItem', machineId: press, costItemId: elsewhere },
    ];
    for (const ref of missing) await expect(readAll(owner, ref)).rejects.toMatchObject({ code: 'not_found' });
  });
});
