import { type Workings, type WorkingsQuery } from '@brakeven/contract';
import { computeWeekPremium, type WeekPremium } from '@brakeven/costing';
import { listPaidEntries, type PaidEntry } from '@brakeven/database';
import {
  addDays,
  type DayOfWeek,
  formatLocalDate,
  formatMoney,
  formatRate,
  type LocalDate,
  startOfWeek,
  toHours,
  toLocalDate,
  toRate,
} from '@brakeven/values';
import { inShopOf, type ShopContext } from '../context';
import { OVERTIME_WEEK } from './figures';
import { readLineWorkings } from './line-workings';
import { getEmployeeName, hoursIn, refused, splitRequest, toInput } from './workings-request';

interface Week {
  employeeId: string;
  from: LocalDate;
  to: LocalDate;
}

/**
 * How the overtime premium of one employee's week was made: threshold, hours, regular rate, premium, and the entries
 * that it was spread over. The week is the shop's that has the day `from`.
 * @throws AppError `not_found` (employee), `invalid_input` (another figure, no employee, no day, cursor)
 */
export async function getOvertimeWorkings(context: ShopContext, query: WorkingsQuery): Promise<Workings> {
  const { ref, paging } = splitRequest(query);
  const { figure, employeeId, from } = ref;
  if (figure !== 'overtime.week') throw refused('figure', 'Only the premium of a week can be opened here.');
  if (employeeId === undefined) throw refused('employeeId', 'Say whose week is meant.');
  if (from === undefined) throw refused('from', 'Say which week is meant, by one of its days.');
  const week = toWeek(employeeId, toLocalDate(from), context.shop.weekStart);
  return inShopOf(context, async (trx) => {
    const name = await getEmployeeName(trx, employeeId);
    const head = {
      figure: { figure, employeeId, from: week.from },
      title: `Overtime premium of ${name}, week of ${formatLocalDate(week.from)}`,
    };
    const selection = { employeeId, worked: { from: week.from, to: week.to } };
    const { currency } = context.shop;
    const workings = await readLineWorkings(trx, head, OVERTIME_WEEK, selection, paging, currency);
    const entries = await listPaidEntries(trx, employeeId, week.from, week.to);
    return { ...workings, inputs: toInputs(context, entries) };
  });
}

function toWeek(employeeId: string, day: LocalDate, weekStart: number): Week {
  const from = startOfWeek(day, weekStart as DayOfWeek);
  return { employeeId, from, to: addDays(from, 6) };
}

function toInputs({ shop }: ShopContext, entries: readonly PaidEntry[]): Workings['inputs'] {
  const threshold = shop.overtimeThresholdHours === null ? null : toHours(shop.overtimeThresholdHours);
  const premium = computeWeekPremium(
    entries.map(({ hours, wagePerHour }) => ({
      hours: toHours(hours),
      wagePerHour: wagePerHour === null ? null : toRate(wagePerHour),
    })),
    threshold,
  );
  return [
    toInput(
      'Overtime counts from',
      threshold === null ? 'never: the shop computes none' : hoursIn(threshold),
    ),
    toInput('Hours of the week', hoursIn(premium.hours)),
    toInput('Hours above', hoursIn(premium.overtimeHours)),
    ...toPremiumInputs(premium, shop.currency),
    toInput(
      'Spread by hours over',
      `${entries.length} ${entries.length === 1 ? 'entry' : 'entries'} of the week, ${SPREAD[shop.overtimeTo]}`,
    ),
    toInput(
      'Who decides',
      'State and local rules differ. This is for costing; payroll decides what is paid.',
    ),
  ];
}

const SPREAD = { overhead: 'posted to overhead', jobs: 'posted to their jobs' } as const;

function toPremiumInputs(week: WeekPremium, currency: string): Workings['inputs'] {
  const { regularRate, premium, overtimeHours } = week;
  if (regularRate === null || premium === null) {
    return [toInput('Regular rate', 'not known: an entry of the week has no wage on its date')];
  }
  const rate = `${formatRate(regularRate, currency)} per hour`;
  return [
    toInput('Regular rate, straight-time pay ÷ hours', rate),
    toInput(`Premium, ½ × regular rate × ${hoursIn(overtimeHours)}`, formatMoney(premium, currency)),
  ];
}
