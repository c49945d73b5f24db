import { hoursText, moneyText } from '@brakeven/values';
import { bookOf, entryOf } from '../../testing/example-shop';
import { computeLines, type CostedEntry } from './entry-lines';
import { computeJobCost } from './job-cost';

function costOf(entries: CostedEntry[], book = bookOf()) {
  const { lines, gaps } = computeLines(entries, book);
  const cost = computeJobCost(lines, gaps);
  return {
    hours: hoursText(cost.hours),
    machineHours: hoursText(cost.machineHours),
    labour: moneyText(cost.labour),
    machine: moneyText(cost.machine),
    overhead: moneyText(cost.overhead),
    total: moneyText(cost.total),
    earned: moneyText(cost.earned),
    gapCount: cost.gapCount,
  };
}

describe('the cost of a job', () => {
  it('is the sum of its lines, hours counted once for each entry', () => {
    // labour 234.00 + 2.25 × 19.75 × 1.2825 = 56.99; machine 138.00; overhead 96.00 + 28.80; earned 712.50
    const entries = [
      entryOf({ entryId: 'a' }),
      entryOf({ entryId: 'b', employeeId: 'ben', machineId: null, hours: '2.25' }),
    ];
    expect(costOf(entries)).toEqual({
      hours: '9.7500',
      machineHours: '7.5000',
      labour: '290.99',
      machine: '138.00',
      overhead: '124.80',
      total: '553.79',
      earned: '712.50',
      gapCount: 0,
    });
  });

  it('adds rounded lines: three thirds of an hour are three lines of a third', () => {
    // 0.3333 × 24 × 1.30 = 10.39896 → 10.40, three times 31.20; the hours together would be 31.19688
    const entries = ['a', 'b', 'c'].map((entryId) => entryOf({ entryId, hours: '0.3333', machineId: null }));
    expect(costOf(entries)).toMatchObject({ hours: '0.9999', labour: '31.20' });
  });

  it('says how many lines are missing, and still counts the hours', () => {
    const book = bookOf({ overheadRates: [], machineRates: new Map() });
    expect(costOf([entryOf({ employeeId: 'newcomer' })], book)).toMatchObject({
      hours: '7.5000',
      machineHours: '7.5000',
      total: '0.00',
      gapCount: 5,
    });
  });

  it('of no entries is nought', () => {
    expect(costOf([])).toMatchObject({ hours: '0.0000', total: '0.00', gapCount: 0 });
  });
});
