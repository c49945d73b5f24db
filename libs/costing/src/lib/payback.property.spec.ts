import { addDays, type LocalDate, sum, toLocalDate, toMoney } from '@brakeven/values';
import fc from 'fast-check';
import { computePayback, type PaybackDay } from './payback';

const start = toLocalDate('2026-01-01');
const asOf = addDays(start, 300);
const cents = fc.integer({ min: 0, max: 100_000 }).map((n) => toMoney(n / 100));

const days = fc
  .uniqueArray(
    fc.record({
      offset: fc.integer({ min: 0, max: 300 }),
      earned: cents,
      operatorLabour: cents,
      running: cents,
    }),
    {
      selector: (day) => day.offset,
      minLength: 1,
      maxLength: 60,
    },
  )
  .map((list): PaybackDay[] =>
    list.map(({ offset, ...day }) => ({ ...day, workedOn: addDays(start, offset) })),
  );
const outlays = fc.integer({ min: 1, max: 5_000_000 }).map((n) => toMoney(n / 100));

const NEVER = '9999-12-31' as LocalDate;

function breakEvenOn(outlay: ReturnType<typeof toMoney>, list: PaybackDay[]): LocalDate {
  return computePayback({ outlay, days: list, asOf, inServiceOn: start }).breakEven.date ?? NEVER;
}

it('earning more on any day never delays break-even', () => {
  fc.assert(
    fc.property(outlays, days, cents, fc.nat(), (outlay, list, more, pick) => {
      const raised = list.map((day, index) =>
        index === pick % list.length ? { ...day, earned: toMoney(day.earned.plus(more)) } : day,
      );
      expect(breakEvenOn(outlay, raised) <= breakEvenOn(outlay, list)).toBe(true);
    }),
    { numRuns: 400 },
  );
});

it('a higher outlay never brings break-even forward', () => {
  fc.assert(
    fc.property(outlays, days, cents, (outlay, list, more) => {
      expect(breakEvenOn(toMoney(outlay.plus(more)), list) >= breakEvenOn(outlay, list)).toBe(true);
    }),
    { numRuns: 400 },
  );
});

it('the curve ends at what was earned back, and its steps are the days', () => {
  fc.assert(
    fc.property(outlays, days, (outlay, list) => {
      const payback = computePayback({ outlay, days: list, asOf, inServiceOn: start });
      const nets = list.map((day) => day.earned.minus(day.operatorLabour).minus(day.running));
      expect(payback.curve.at(-1)?.net.eq(payback.earnedBack)).toBe(true);
      expect(sum(nets).eq(payback.earnedBack)).toBe(true);
      expect(payback.earned.minus(payback.runningCost).eq(payback.earnedBack)).toBe(true);
      expect(payback.curve.map((point) => point.date)).toEqual(list.map((day) => day.workedOn).sort());
    }),
  );
});

it('a straight-line date is the first day on which the pace covers what remains', () => {
  fc.assert(
    fc.property(outlays, days, (outlay, list) => {
      const { breakEven, paceWindow, remaining } = computePayback({
        outlay,
        days: list,
        asOf,
        inServiceOn: start,
      });
      fc.pre(breakEven.method === 'straight-line' && breakEven.date !== null && paceWindow !== null);
      if (breakEven.date === null || paceWindow === null) return;
      const daysAhead = countDays(asOf, breakEven.date);
      const owed = remaining.times(paceWindow.days);
      expect(paceWindow.net.times(daysAhead).gte(owed)).toBe(true);
      expect(paceWindow.net.times(daysAhead - 1).lt(owed)).toBe(true);
    }),
  );
});

/** Days between two dates, by ECMAScript's calendar rather than by the code under test. */
function countDays(from: LocalDate, to: LocalDate): number {
  return (Date.parse(to) - Date.parse(from)) / 86_400_000;
}
