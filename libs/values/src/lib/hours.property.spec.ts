import fc from 'fast-check';
import { D } from './decimal';
import { hoursFromDays, hoursText, parseHoursText, toHours } from './hours';

const seconds = fc.integer({ min: 0, max: 99 * 3600 + 3599 });

function clockText(total: number): string {
  const pad = (part: number) => String(part).padStart(2, '0');
  return `${Math.floor(total / 3600)}:${pad(Math.floor(total / 60) % 60)}:${pad(total % 60)}`;
}

describe('durations', () => {
  it('give the same hours as a fraction of a day in a double, and as h:mm:ss', () => {
    fc.assert(
      fc.property(seconds, (total) => {
        const fromCell = hoursFromDays(total / 86_400);
        const fromText = parseHoursText(clockText(total));
        expect(fromText.ok && hoursText(fromText.value)).toBe(hoursText(fromCell));
      }),
    );
  });

  it('come back to the same second, since four decimals of an hour are finer than a second', () => {
    fc.assert(
      fc.property(seconds, (total) => {
        const back = hoursFromDays(total / 86_400).times(3600);
        expect(back.minus(total).abs().lte(D('0.18'))).toBe(true);
        expect(back.round().toNumber()).toBe(total);
      }),
    );
  });

  it('come back from their own text', () => {
    fc.assert(
      fc.property(fc.integer({ min: -240_000, max: 999_999_999 }), (tenThousandths) => {
        const hours = toHours(D(tenThousandths).div(10_000));
        const read = parseHoursText(hoursText(hours));
        expect(read.ok && read.value.eq(hours)).toBe(true);
      }),
    );
  });
});
