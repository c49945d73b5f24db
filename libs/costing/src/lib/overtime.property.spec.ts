import {
  addDays,
  D,
  moneyText,
  sum,
  toHours,
  toLocalDate,
  toMoney,
  toPercent,
  toRate,
} from '@brakeven/values';
import fc from 'fast-check';
import { bookOf } from '../../testing/example-shop';
import { type CostedEntry, type PayRate, type RateBook } from './entry-lines';
import { computeOvertimeLines, computeWeekPremium, type OvertimeRule, spreadPremium } from './overtime';

const firstDay = toLocalDate('2026-03-02');
const hours = fc.integer({ min: 1, max: 160_000 }).map((parts) => toHours(D(parts).div(10_000)));
const rates = fc.integer({ min: 0, max: 90_000_000 }).map((parts) => toRate(D(parts).div(1_000_000)));
const thresholds = fc.integer({ min: 100, max: 6000 }).map((parts) => toHours(D(parts).div(100)));
const days = fc.integer({ min: 0, max: 27 });

const someEntries = fc
  .array(fc.record({ day: days, employeeId: fc.constantFrom('ana', 'ben', 'newcomer'), hours }), {
    minLength: 1,
    maxLength: 40,
  })
  .map((list): CostedEntry[] =>
    list.map(({ day, ...rest }, index) => ({
      ...rest,
      entryId: `entry-${String(index).padStart(2, '0')}`,
      workedOn: addDays(firstDay, day),
      jobId: `job-${index % 3}`,
      isBillable: true,
      machineId: null,
    })),
  );
const rules = fc.record<OvertimeRule>({
  thresholdHours: thresholds,
  overtimeTo: fc.constantFrom('overhead', 'jobs'),
  weekStart: fc.constantFrom(0, 1, 2, 3, 4, 5, 6),
});
/** A raise in the middle of it all. */
const books = fc.tuple(rates, rates, days).map(([before, after, day]): RateBook => {
  const rate = (id: string, validFrom: PayRate['validFrom'], wagePerHour: PayRate['wagePerHour']) => ({
    id,
    validFrom,
    wagePerHour,
    burdenPercent: toPercent(30),
  });
  const ofEmployee = [rate('a', addDays(firstDay, -400), before), rate('b', addDays(firstDay, day), after)];
  return bookOf({
    payRates: new Map([
      ['ana', ofEmployee],
      ['ben', ofEmployee],
    ]),
  });
});

/** ½ · R · (H − T) ÷ H in whole numbers: 10⁻¹⁰ of money, 10⁻⁴ of hours. */
function premiumInCents(list: readonly { hours: bigint; wage: bigint }[], threshold: bigint): bigint {
  const whole = list.reduce((total, item) => total + item.hours, 0n);
  if (whole <= threshold) return 0n;
  const pay = list.reduce((total, item) => total + item.hours * item.wage, 0n);
  const [numerator, denominator] = [pay * (whole - threshold), 2n * whole * 10n ** 8n];
  return (2n * numerator + denominator) / (2n * denominator);
}

it('is what whole numbers make of ½ × pay × (hours − threshold) ÷ hours', () => {
  const units = fc.record({
    hours: fc.bigInt({ min: 1n, max: 240_000n }),
    wage: fc.bigInt({ min: 0n, max: 200_000_000n }),
  });
  fc.assert(
    fc.property(
      fc.array(units, { maxLength: 20 }),
      fc.bigInt({ min: 1n, max: 600_000n }),
      (list, threshold) => {
        const entries = list.map((item) => ({
          hours: toHours(D(String(item.hours)).div(10_000)),
          wagePerHour: toRate(D(String(item.wage)).div(1_000_000)),
        }));
        const { premium } = computeWeekPremium(entries, toHours(D(String(threshold)).div(10_000)));
        expect(premium?.times(100).toFixed()).toBe(String(premiumInCents(list, threshold)));
      },
    ),
  );
});

it('its lines add up to the premium of each week, whoever bears it, and its gaps are the weeks without', () => {
  fc.assert(
    fc.property(someEntries, books, rules, (entries, book, rule) => {
      const { lines, gaps } = computeOvertimeLines(entries, book, rule);
      const ana = entries.filter((entry) => entry.employeeId === 'ana');
      // One week at a time by the definition: the days of a week that begin on the shop's day.
      const weeks = new Map<string, CostedEntry[]>();
      for (const entry of ana) {
        const weekday = new Date(`${entry.workedOn}T00:00:00Z`).getUTCDay();
        const start = addDays(entry.workedOn, -((weekday - rule.weekStart + 7) % 7));
        weeks.set(start, [...(weeks.get(start) ?? []), entry]);
      }
      for (const week of weeks.values()) {
        const wageOn = (date: string) =>
          [...(book.payRates.get('ana') ?? [])].reverse().find((rate) => rate.validFrom <= date)
            ?.wagePerHour ?? null;
        const { premium } = computeWeekPremium(
          week.map((entry) => ({ hours: entry.hours, wagePerHour: wageOn(entry.workedOn) })),
          rule.thresholdHours,
        );
        const ofWeek = lines.filter((line) => week.some((entry) => entry.entryId === line.sourceId));
        expect(moneyText(sum(ofWeek.map((line) => line.amount)))).toBe(premium && moneyText(premium));
      }
      expect(lines.every((line) => (line.jobId === null) === (rule.overtimeTo === 'overhead'))).toBe(true);
      expect(lines.every((line) => line.employeeId !== 'newcomer')).toBe(true);
      expect(gaps.every((gap) => gap.employeeId === 'newcomer')).toBe(true);
    }),
  );
});

it('does not ask in which order the entries came', () => {
  const shuffled = someEntries.chain((list) =>
    fc.tuple(fc.constant(list), fc.shuffledSubarray(list, { minLength: list.length })),
  );
  const sorted = (result: ReturnType<typeof computeOvertimeLines>) =>
    [...result.lines.map((line) => `${line.sourceId} ${line.jobId} ${moneyText(line.amount)}`)].sort();
  fc.assert(
    fc.property(shuffled, books, rules, ([list, mixed], book, rule) => {
      expect(sorted(computeOvertimeLines(mixed, book, rule))).toEqual(
        sorted(computeOvertimeLines(list, book, rule)),
      );
    }),
  );
});

it('with any part of a week in a closed month still comes to the premium, if an entry is left to bear the rest', () => {
  const amounts = fc.integer({ min: -5000, max: 50_000 }).map((cents) => toMoney(D(cents).div(100)));
  fc.assert(
    fc.property(
      fc.array(hours, { minLength: 2, maxLength: 7 }),
      amounts,
      thresholds,
      (list, kept, threshold) => {
        const week = list.map((of, index): CostedEntry => ({
          entryId: `entry-${index}`,
          workedOn: addDays(firstDay, index),
          employeeId: 'ben',
          jobId: 'job-1',
          isBillable: true,
          machineId: null,
          hours: of,
        }));
        const rule: OvertimeRule = { thresholdHours: threshold, overtimeTo: 'jobs', weekStart: 1 };
        const book = bookOf();
        const { premium } = computeWeekPremium(
          list.map((of) => ({ hours: of, wagePerHour: toRate('19.75') })),
          threshold,
        );
        const { lines } = computeOvertimeLines(week, book, rule, new Map([['entry-0', kept]]));
        expect(lines.map((line) => line.sourceId)).not.toContain('entry-0');
        expect(moneyText(sum([kept, ...lines.map((line) => line.amount)]))).toBe(
          premium && moneyText(premium),
        );
      },
    ),
  );
});

it('shares are within a cent of their part by hours', () => {
  fc.assert(
    fc.property(
      fc.array(hours, { minLength: 1, maxLength: 14 }),
      fc.integer({ min: 1, max: 90_000 }),
      (list, cents) => {
        const amount = toMoney(D(cents).div(100));
        const entries = list.map((of, index) => ({ entryId: String(index), workedOn: firstDay, hours: of }));
        const shares = spreadPremium(amount, entries);
        for (const { entryId, hours: of } of entries) {
          const exact = amount.times(of).div(sum(list));
          expect(
            exact
              .minus(shares.get(entryId) ?? NaN)
              .abs()
              .lt('0.01'),
          ).toBe(true);
        }
      },
    ),
  );
});
