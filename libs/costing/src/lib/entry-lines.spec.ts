import { hoursText, moneyText, rateText } from '@brakeven/values';
import { bookOf, entryOf, payRateOf } from '../../testing/example-shop';
import { computeEntryLines, computeLines, type CostedEntry, isInService, type RateBook } from './entry-lines';

function amountsOf(entry: CostedEntry, book: RateBook): Record<string, string> {
  const { lines } = computeEntryLines(entry, book);
  return Object.fromEntries(lines.map((line) => [line.category, moneyText(line.amount)]));
}

function gapsOf(entry: CostedEntry, book: RateBook): string[] {
  return computeEntryLines(entry, book).gaps.map((gap) => gap.category);
}

describe('the lines of an entry', () => {
  it('are all five for billable work on a machine in service', () => {
    // 7.5 × 24 × 1.30 = 234; 7.5 × 18.40 = 138; 7.5 × 12.80 = 96; 7.5 × 95 = 712.50; 7.5 × 6.25 = 46.875
    expect(amountsOf(entryOf(), bookOf())).toEqual({
      labour: '234.00',
      machine: '138.00',
      overhead: '96.00',
      earned: '712.50',
      running: '46.88',
    });
  });

  it('carry everything that their workings show', () => {
    const [labour] = computeEntryLines(entryOf(), bookOf()).lines;
    expect(labour).toMatchObject({
      entryId: 'entry-1',
      workedOn: '2026-03-02',
      category: 'labour',
      jobId: 'job-1',
      employeeId: 'ana',
      machineId: 'press',
      rateId: 'pay-ana-1',
    });
    expect(
      labour && [hoursText(labour.quantity), rateText(labour.rate), labour.rateFactor.toFixed()],
    ).toEqual(['7.5000', '24.00', '1.3']);
  });

  it('earn nothing on a job that is not billable, but still cost', () => {
    const amounts = amountsOf(entryOf({ isBillable: false }), bookOf());
    expect(amounts).not.toHaveProperty('earned');
    expect(amounts).toMatchObject({ machine: '138.00', running: '46.88' });
  });

  it('are labour and overhead alone for work without a machine', () => {
    expect(amountsOf(entryOf({ machineId: null }), bookOf())).toEqual({
      labour: '234.00',
      overhead: '96.00',
    });
  });

  it.each([
    ['2026-02-15', ['labour', 'machine', 'overhead']],
    ['2026-02-16', ['labour', 'machine', 'overhead', 'earned', 'running']],
  ])('count towards payback from the first day in service: on %s %j', (workedOn, categories) => {
    expect(Object.keys(amountsOf(entryOf({ workedOn }), bookOf()))).toEqual(categories);
  });

  it('never count towards payback on a machine that is not in service', () => {
    expect(Object.keys(amountsOf(entryOf({ machineId: 'saw' }), bookOf()))).toEqual([
      'labour',
      'machine',
      'overhead',
    ]);
  });

  it('use the rate valid on the work date', () => {
    // 7.5 × 25.35 × 1.315 = 250.014375
    expect(amountsOf(entryOf({ workedOn: '2026-03-08' }), bookOf())).toMatchObject({ labour: '234.00' });
    expect(amountsOf(entryOf({ workedOn: '2026-03-09' }), bookOf())).toMatchObject({ labour: '250.01' });
  });

  it('are rounded once, after the burden, and ties go up', () => {
    const tie = bookOf({ payRates: new Map([['ana', [payRateOf('p', '2026-01-01', '10.005', '0')]]]) });
    expect(amountsOf(entryOf({ hours: '1' }), tie)).toMatchObject({ labour: '10.01' });
    // 0.35 × 10.10 × 1.50 = 5.3025; rounding 3.535 to 3.54 before the burden would make it 5.31
    const loaded = bookOf({ payRates: new Map([['ana', [payRateOf('p', '2026-01-01', '10.10', '50')]]]) });
    expect(amountsOf(entryOf({ hours: '0.35' }), loaded)).toMatchObject({ labour: '5.30' });
  });
});

describe('rates that are missing', () => {
  it('leave a gap with its hours, never a line of nought', () => {
    const { lines, gaps } = computeEntryLines(entryOf({ employeeId: 'newcomer' }), bookOf());
    expect(lines.map((line) => line.category)).toEqual(['machine', 'overhead', 'earned', 'running']);
    expect(gaps.map((gap) => [gap.category, gap.entryId, hoursText(gap.hours)])).toEqual([
      ['labour', 'entry-1', '7.5000'],
    ]);
  });

  it('leave a gap before the first rate', () => {
    expect(gapsOf(entryOf({ workedOn: '2025-12-31' }), bookOf())).toEqual(['labour', 'machine', 'overhead']);
  });

  it('leave three gaps for a machine in service without rates, two if the job is not billable', () => {
    const book = bookOf({ machineRates: new Map() });
    expect(gapsOf(entryOf(), book)).toEqual(['machine', 'earned', 'running']);
    expect(gapsOf(entryOf({ isBillable: false }), book)).toEqual(['machine', 'running']);
    expect(gapsOf(entryOf({ machineId: null }), book)).toEqual([]);
  });

  it('are not the same as a rate of nought, which is a line', () => {
    const book = bookOf({ payRates: new Map([['ana', [payRateOf('p', '2026-01-01', '0', '30')]]]) });
    expect(amountsOf(entryOf(), book)).toMatchObject({ labour: '0.00' });
    expect(gapsOf(entryOf(), book)).toEqual([]);
  });
});

describe('many entries', () => {
  it('give their lines and gaps in order', () => {
    const entries = [
      entryOf({ entryId: 'a', machineId: null }),
      entryOf({ entryId: 'b', employeeId: 'newcomer' }),
    ];
    const { lines, gaps } = computeLines(entries, bookOf());
    expect(lines.map((line) => line.entryId)).toEqual(['a', 'a', 'b', 'b', 'b', 'b']);
    expect(gaps.map((gap) => gap.entryId)).toEqual(['b']);
  });
});

describe('isInService', () => {
  it('is so from the first day on, and not without one', () => {
    const { workedOn } = entryOf();
    expect(isInService(workedOn, workedOn)).toBe(true);
    expect(isInService(entryOf({ workedOn: '2026-03-03' }).workedOn, workedOn)).toBe(false);
    expect(isInService(null, workedOn)).toBe(false);
    expect(isInService(undefined, workedOn)).toBe(false);
  });
});
