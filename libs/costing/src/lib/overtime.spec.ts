import { hoursText, moneyText, rateText, toHours, toLocalDate, toMoney, toRate } from '@brakeven/values';
import { bookOf, entryOf } from '../../testing/example-shop';
import { type CostedEntry } from './entry-lines';
import { computeOvertimeLines, computeWeekPremium, type OvertimeRule, spreadPremium } from './overtime';

const rule: OvertimeRule = { thresholdHours: toHours(40), overtimeTo: 'overhead', weekStart: 1 };

function premiumOf(hoursAndWages: [string, string | null][], threshold: string | null = '40') {
  const { hours, overtimeHours, regularRate, premium } = computeWeekPremium(
    hoursAndWages.map(([worked, wage]) => ({
      hours: toHours(worked),
      wagePerHour: wage ? toRate(wage) : null,
    })),
    threshold === null ? null : toHours(threshold),
  );
  return {
    hours: hoursText(hours),
    overtimeHours: hoursText(overtimeHours),
    regularRate: regularRate && rateText(regularRate),
    premium: premium && moneyText(premium),
  };
}

describe("a week's premium", () => {
  it('is half the regular rate on the hours above the threshold', () => {
    expect(premiumOf([['46', '12']])).toEqual({
      hours: '46.0000',
      overtimeHours: '6.0000',
      regularRate: '12.00',
      premium: '36.00',
    });
  });

  it('takes the weighted average of two wages, and rounds once', () => {
    // (30 × 18 + 16 × 22) ÷ 46 = 19.391304…; × ½ × 6 = 58.173913…
    const week = premiumOf([
      ['30', '18'],
      ['16', '22'],
    ]);
    expect(week).toMatchObject({ regularRate: '19.391304', premium: '58.17' });
  });

  it('is nothing at the threshold, and nothing where the shop computes none', () => {
    expect(premiumOf([['40', '25']])).toMatchObject({ overtimeHours: '0.0000', premium: '0.00' });
    expect(premiumOf([['60', '25']], null)).toMatchObject({ overtimeHours: '0.0000', premium: '0.00' });
    expect(premiumOf([])).toEqual({
      hours: '0.0000',
      overtimeHours: '0.0000',
      regularRate: null,
      premium: '0.00',
    });
  });

  it('is not known while a wage is missing and there is overtime', () => {
    expect(
      premiumOf([
        ['38', '20'],
        ['4', null],
      ]),
    ).toMatchObject({ premium: null, regularRate: null });
    expect(
      premiumOf([
        ['30', '20'],
        ['4', null],
      ]),
    ).toMatchObject({ premium: '0.00', regularRate: null });
  });
});

it('shares a premium out by hours, equal remainders to the earlier date, then to the smaller id', () => {
  const entry = (entryId: string, workedOn: string) => ({
    entryId,
    workedOn: toLocalDate(workedOn),
    hours: toHours(8),
  });
  const shares = spreadPremium(toMoney('10.01'), [
    entry('c', '2026-03-03'),
    entry('b', '2026-03-03'),
    entry('d', '2026-03-02'),
  ]);
  expect([...shares].map(([id, share]) => [id, moneyText(share)])).toEqual([
    ['d', '3.34'],
    ['b', '3.34'],
    ['c', '3.33'],
  ]);
});

/** Ana's week from Monday 2 March 2026: five days of `hours`; her wage is 24.00 until the 9th. */
function weekOf(hours: string, changes: Parameters<typeof entryOf>[0] = {}): CostedEntry[] {
  return [2, 3, 4, 5, 6].map((day) =>
    entryOf({ entryId: `d${day}`, workedOn: `2026-03-0${day}`, hours, ...changes }),
  );
}

function linesOf(
  entries: CostedEntry[],
  changes: Partial<OvertimeRule> = {},
  posted: Record<string, string> = {},
) {
  const amounts = new Map(Object.entries(posted).map(([id, amount]) => [id, toMoney(amount)]));
  const { lines, gaps } = computeOvertimeLines(entries, bookOf(), { ...rule, ...changes }, amounts);
  return {
    lines: lines.map((line) => [line.sourceId, line.jobId, moneyText(line.amount)]),
    gaps: gaps.map((gap) => [gap.entryId, gap.category]),
  };
}

describe('overtime lines', () => {
  it('share the premium of 44 h at 24.00, 48.00, out over the week, to overhead', () => {
    expect(linesOf(weekOf('8.8'))).toEqual({
      lines: [2, 3, 4, 5, 6].map((day) => [`d${day}`, null, '9.60']),
      gaps: [],
    });
  });

  it('say hours, rate, machine and employee of their entry', () => {
    const [line] = computeOvertimeLines(weekOf('8.8'), bookOf(), rule).lines;
    expect(line).toMatchObject({
      sourceKind: 'time_entry',
      workedOn: '2026-03-02',
      category: 'overtime',
      employeeId: 'ana',
      machineId: 'press',
      rateId: null,
    });
    expect([line?.quantity.toFixed(), line?.rate.toFixed(), line?.rateFactor.toFixed()]).toEqual([
      '8.8',
      '1.090909',
      '1',
    ]);
  });

  it('go to the jobs of the week if the shop says so', () => {
    const [first, ...others] = weekOf('8.8');
    if (!first) throw new Error('The week has a first day.');
    const { lines } = linesOf([{ ...first, jobId: 'job-2' }, ...others], { overtimeTo: 'jobs' });
    expect(lines.map(([, jobId]) => jobId)).toEqual(['job-2', 'job-1', 'job-1', 'job-1', 'job-1']);
  });

  it("keep to the shop's weeks: what begins on Wednesday parts the same days", () => {
    expect(linesOf(weekOf('8.8'), { weekStart: 3 }).lines).toEqual([]);
  });

  it('weigh a raise within the week by its hours', () => {
    // Week of 5 March: 20 h at 24.00, 24 h at 25.35 = 1088.40; ÷ 44 × ½ × 4 = 49.4727… → 49.47
    const entries = ['05', '06', '09', '10', '11'].map((day, index) =>
      entryOf({ entryId: day, workedOn: `2026-03-${day}`, hours: index < 2 ? '10' : '8' }),
    );
    const { lines } = linesOf(entries, { weekStart: 4 });
    // 49.47 × 10 ÷ 44 = 11.2431…, × 8 ÷ 44 = 8.9945…: two cents are left for the larger remainders, .45.
    expect(lines.map(([, , amount]) => amount)).toEqual(['11.24', '11.24', '9.00', '9.00', '8.99']);
  });

  it('leave out shares of nothing', () => {
    // 0.01 h above 40 at 24.00: 0.12; five shares of 2 cents and two of one; with an entry of 0.0001 h getting none.
    const entries = [
      ...weekOf('8.0019'),
      entryOf({ entryId: 'short', workedOn: '2026-03-07', hours: '0.0005' }),
    ];
    const { lines } = linesOf(entries);
    expect(lines.map(([id]) => id)).not.toContain('short');
    expect(lines).toHaveLength(5);
  });

  it('are gaps of every entry of a week with overtime where a wage is missing, and nothing else', () => {
    const entries = weekOf('9', { employeeId: 'newcomer' });
    expect(linesOf(entries)).toEqual({
      lines: [],
      gaps: entries.map(({ entryId }) => [entryId, 'overtime']),
    });
    expect(linesOf(weekOf('8', { employeeId: 'newcomer' }))).toEqual({ lines: [], gaps: [] });
  });

  it('are none at all if the shop computes no overtime', () => {
    expect(linesOf(weekOf('12'), { thresholdHours: null }, { d2: '3.00' })).toEqual({ lines: [], gaps: [] });
  });
});

describe('overtime of a week that is partly in a closed month', () => {
  it('keeps what is posted there and shares the rest out over the other entries', () => {
    // 48.00 − 9.60 − 9.61 = 28.79 over three: 9.60, 9.60, 9.59
    expect(linesOf(weekOf('8.8'), {}, { d2: '9.60', d3: '9.61' }).lines).toEqual([
      ['d4', null, '9.60'],
      ['d5', null, '9.60'],
      ['d6', null, '9.59'],
    ]);
  });

  it('takes back by the other entries what was too much', () => {
    // The week is 44 h now: 48.00 − 50.00 = −2.00 over three.
    expect(linesOf(weekOf('8.8'), {}, { d2: '25.00', d3: '25.00' }).lines).toEqual([
      ['d4', null, '-0.67'],
      ['d5', null, '-0.67'],
      ['d6', null, '-0.66'],
    ]);
    expect(linesOf(weekOf('8'), {}, { d2: '1.00' }).lines).toHaveLength(4);
  });

  it('posts nothing if every entry is there', () => {
    const posted = { d2: '0.00', d3: '0.00', d4: '0.00', d5: '0.00', d6: '0.00' };
    expect(linesOf(weekOf('8.8'), {}, posted)).toEqual({ lines: [], gaps: [] });
  });
});
