import {
  addDays,
  D,
  hoursText,
  sum,
  toHours,
  toLocalDate,
  toMoney,
  toPercent,
  toRate,
} from '@brakeven/values';
import fc from 'fast-check';
import { bookOf } from '../../testing/example-shop';
import {
  computeEntryLines,
  computeLines,
  type CostedEntry,
  type CostLine,
  type RateBook,
} from './entry-lines';
import { computeJobCost } from './job-cost';
import { computeMachineDays } from './machine-day';

const firstDay = toLocalDate('2026-01-01');
const dates = fc.integer({ min: -5, max: 120 }).map((days) => addDays(firstDay, days));
const hours = fc
  .integer({ min: 1, max: 240_000 })
  .map((tenThousandths) => toHours(D(tenThousandths).div(10_000)));
const rates = fc
  .integer({ min: 0, max: 200_000_000 })
  .map((millionths) => toRate(D(millionths).div(1_000_000)));
const percents = fc.integer({ min: 0, max: 800_000 }).map((parts) => toPercent(D(parts).div(10_000)));

const entry = fc.record({
  workedOn: dates,
  employeeId: fc.constantFrom('ana', 'ben', 'newcomer'),
  jobId: fc.constantFrom('job-1', 'job-2', 'job-3'),
  isBillable: fc.boolean(),
  machineId: fc.constantFrom('press', 'saw', null),
  hours,
});
const entries = fc
  .array(entry, { maxLength: 30 })
  .map((list): CostedEntry[] => list.map((item, index) => ({ ...item, entryId: `entry-${index}` })));

/** The example shop with random rates. */
const books = fc
  .record({
    wage: rates,
    burden: percents,
    machine: rates,
    chargeOut: rates,
    running: rates,
    overhead: rates,
  })
  .map((random): RateBook =>
    bookOf({
      payRates: new Map(
        ['ana', 'ben'].map((id) => [
          id,
          [{ id: `pay-${id}`, validFrom: firstDay, wagePerHour: random.wage, burdenPercent: random.burden }],
        ]),
      ),
      machineRates: new Map([
        [
          'press',
          [
            {
              id: 'press-rate',
              validFrom: firstDay,
              machineHourRate: random.machine,
              chargeOutRate: random.chargeOut,
              runningCostPerHour: random.running,
            },
          ],
        ],
      ]),
      overheadRates: [{ id: 'overhead', validFrom: firstDay, ratePerLabourHour: random.overhead }],
    }),
  );

function labourOf(of: CostedEntry, book: RateBook): CostLine | undefined {
  return computeEntryLines(of, book).lines.find((line) => line.category === 'labour');
}

it('the parts add up to the whole: jobs to the shop, categories to the total, entries to hours', () => {
  fc.assert(
    fc.property(entries, books, (list, book) => {
      const all = computeLines(list, book);
      const whole = computeJobCost(all.lines, all.gaps);
      const jobs = ['job-1', 'job-2', 'job-3'].map((jobId) =>
        computeJobCost(
          all.lines.filter((line) => line.jobId === jobId),
          all.gaps.filter((gap) => gap.jobId === jobId),
        ),
      );
      expect(sum(jobs.map((job) => job.total)).eq(whole.total)).toBe(true);
      expect(sum([whole.labour, whole.machine, whole.overhead]).eq(whole.total)).toBe(true);
      expect(sum(jobs.map((job) => job.hours)).eq(whole.hours)).toBe(true);
      expect(hoursText(whole.hours)).toBe(hoursText(sum(list.map((item) => item.hours))));
    }),
  );
});

it('the order of entries changes nothing', () => {
  const shuffled = entries.chain((list) =>
    fc.tuple(fc.constant(list), fc.shuffledSubarray(list, { minLength: list.length })),
  );
  fc.assert(
    fc.property(shuffled, books, ([list, mixed], book) => {
      const [a, b] = [computeLines(list, book), computeLines(mixed, book)];
      expect(computeJobCost(b.lines, b.gaps)).toEqual(computeJobCost(a.lines, a.gaps));
      const [daysA, daysB] = [a, b].map((of) => computeMachineDays(of.lines, book.inServiceOn, of.gaps));
      expect(daysB).toEqual(daysA);
    }),
  );
});

it('twice the hours are twice the labour: exactly before rounding, within one cent after', () => {
  fc.assert(
    fc.property(entry, books, (item, book) => {
      const once = { ...item, entryId: 'once', employeeId: 'ana', workedOn: firstDay };
      const single = labourOf(once, book);
      const double = labourOf({ ...once, hours: toHours(once.hours.times(2)) }, book);
      if (!single || !double) throw new Error('Ana has a wage on that day.');
      const exact = (line: CostLine) => line.quantity.times(line.rate).times(line.rateFactor);
      expect(exact(double).eq(exact(single).times(2))).toBe(true);
      // Rounding moves the single line by at most half a cent, doubled one cent, and the double line by half a cent;
      // both are whole cents, so they differ by one cent at most.
      expect(double.amount.minus(single.amount.times(2)).abs().lte('0.01')).toBe(true);
    }),
  );
});

it('every line is its quantity × rate × factor to half a cent, in whole cents', () => {
  fc.assert(
    fc.property(entries, books, (list, book) => {
      for (const line of computeLines(list, book).lines) {
        const exact = line.quantity.times(line.rate).times(line.rateFactor);
        expect(line.amount.minus(exact).abs().lte('0.005')).toBe(true);
        expect(line.amount.eq(toMoney(line.amount))).toBe(true);
      }
    }),
  );
});

it('every category that an entry ought to have is a line or a gap, once', () => {
  fc.assert(
    fc.property(entries, books, (list, book) => {
      const { lines, gaps } = computeLines(list, book);
      const keys = [...lines, ...gaps].map((trace) => `${trace.entryId} ${trace.category}`);
      expect(new Set(keys).size).toBe(keys.length);
      for (const item of list) {
        const inService = item.machineId === 'press' && item.workedOn >= '2026-02-16';
        const wanted = [
          'labour',
          'overhead',
          ...(item.machineId === null ? [] : ['machine']),
          ...(inService ? ['running'] : []),
          ...(inService && item.isBillable ? ['earned'] : []),
        ];
        const found = keys.filter((key) => key.startsWith(`${item.entryId} `));
        expect(found.sort()).toEqual(wanted.map((category) => `${item.entryId} ${category}`).sort());
      }
    }),
  );
});

it('machine days hold all that the lines of machines in service hold', () => {
  fc.assert(
    fc.property(entries, books, (list, book) => {
      const { lines, gaps } = computeLines(list, book);
      const days = computeMachineDays(lines, book.inServiceOn, gaps);
      const cost = computeJobCost(lines, gaps);
      const inService = list.filter((item) => item.machineId === 'press' && item.workedOn >= '2026-02-16');
      expect(sum(days.map((day) => day.earned)).eq(cost.earned)).toBe(true);
      expect(sum(days.map((day) => day.hours)).eq(sum(inService.map((item) => item.hours)))).toBe(true);
      expect(
        sum(days.map((day) => day.billableHours)).eq(
          sum(inService.filter((item) => item.isBillable).map((item) => item.hours)),
        ),
      ).toBe(true);
    }),
  );
});
