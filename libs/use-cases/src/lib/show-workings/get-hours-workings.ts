import {
  AppError,
  type FigureRef,
  type MonthTieOut,
  type Workings,
  type WorkingsLine,
  type WorkingsQuery,
} from '@brakeven/contract';
import {
  type EntryRow,
  listEntryRows,
  listOvertimeWeekRows,
  type OvertimeWeekRow,
  type ShopTransaction,
  sumEntries,
  sumOvertimeWeeks,
} from '@brakeven/database';
import { addDays, D, formatLocalDate, hoursText, sum, toHours, toLocalDate } from '@brakeven/values';
import { readTieOut, weekRuleOf } from '../close-months/month-end';
import { inShopOf, type ShopContext } from '../context';
import { cutPage, positionSchema, readCursor, writeCursor } from '../page-cursor';
import { toSourceCell } from '../source-cell';
import { COSTED_HOURS } from './figures';
import { PLAIN_LINE } from './item-workings';
import { readLineWorkings } from './line-workings';
import {
  describeNarrowing,
  getEmployeeName,
  hoursIn,
  type LinePaging,
  refused,
  splitRequest,
  toInput,
  type WorkingsHead,
} from './workings-request';

type HoursFigure = Extract<FigureRef['figure'], `hours.${string}`>;
interface HoursRef {
  figure: HoursFigure;
  employeeId?: string;
  from: string;
  to: string;
}
type HoursHead = WorkingsHead & { figure: HoursRef };

const TITLES: Readonly<Record<HoursFigure, string>> = {
  'hours.timesheets': 'Hours of the timesheets',
  'hours.overtime': 'Overtime hours',
  'hours.costed': 'Hours in the costs',
  'hours.difference': 'Payroll − timesheets',
};

/**
 * How hours of a month were made, of one employee or of all: the entries, the weeks with overtime, the labour lines,
 * or what payroll has beside them. No wages and no money.
 * @throws AppError `not_found` (employee; payroll hours that nobody entered), `invalid_input` (another figure, no
 *   days, cursor)
 */
export async function getHoursWorkings(context: ShopContext, query: WorkingsQuery): Promise<Workings> {
  const { ref, paging } = splitRequest(query);
  const { figure, employeeId, from, to } = ref;
  if (!isHoursFigure(figure)) throw refused('figure', 'Only hours held against payroll can be opened here.');
  if (from === undefined) throw refused('from', 'Say from which day on the hours are meant.');
  if (to === undefined) throw refused('to', 'Say through which day the hours are meant.');
  const wanted: HoursRef = { figure, ...(employeeId && { employeeId }), from, to };
  return inShopOf(context, async (trx) => {
    const whose = employeeId === undefined ? 'everybody' : await getEmployeeName(trx, employeeId);
    const days = await describeNarrowing(trx, { figure, from, to });
    const head = { figure: wanted, title: `${TITLES[figure]} of ${whose}${days}` };
    return READERS[figure](context, trx, head, paging);
  });
}

function isHoursFigure(figure: FigureRef['figure']): figure is HoursFigure {
  return figure.startsWith('hours.');
}

type Reader = (
  context: ShopContext,
  trx: ShopTransaction,
  head: HoursHead,
  paging: LinePaging,
) => Promise<Workings>;

const READERS: Readonly<Record<HoursFigure, Reader>> = {
  'hours.timesheets': readEntries,
  'hours.overtime': readOvertimeWeeks,
  'hours.costed': readCosted,
  'hours.difference': readDifference,
};

async function readEntries(
  _context: ShopContext,
  trx: ShopTransaction,
  head: HoursHead,
  { list, cursor, limit }: LinePaging,
): Promise<Workings> {
  const { employeeId, from, to } = head.figure;
  const selection = { employeeId, from, to };
  const after = readCursor(cursor, list, positionSchema('date'));
  const sums = await sumEntries(trx, selection);
  const paging = { sort: 'workedOn', direction: 'desc', after, limit: limit + 1 } as const;
  const found = await listEntryRows(trx, selection, paging);
  const { rows, nextCursor } = cutPage(found, limit, ({ workedOn, entryId }) =>
    writeCursor(list, { value: workedOn, id: entryId }),
  );
  return {
    ...toWorkings(
      head,
      'The hours of the time entries of the days, as they stand now; voided ones are left out.',
    ),
    amount: sums.hours,
    lineCount: sums.entries,
    lines: rows.map(toEntryLine),
    nextCursor,
  };
}

function toEntryLine(row: EntryRow): WorkingsLine {
  const { entryId, workedOn, employee, jobNumber, operation, machine, hours, note } = row;
  return {
    ...PLAIN_LINE,
    lineId: entryId,
    on: workedOn,
    category: 'hours',
    label: employee,
    detail: note,
    job: jobNumber,
    operation,
    machine,
    amount: hours,
    source: toSourceCell(row),
  };
}

async function readOvertimeWeeks(
  context: ShopContext,
  trx: ShopTransaction,
  head: HoursHead,
  { list, cursor, limit }: LinePaging,
): Promise<Workings> {
  const rule = weekRuleOf(context);
  const { employeeId } = head.figure;
  const after = readCursor(cursor, list, positionSchema('date'));
  const sums = await sumOvertimeWeeks(trx, head.figure, rule, employeeId);
  const found = await listOvertimeWeekRows(trx, head.figure, rule, employeeId, after, limit + 1);
  const { rows, nextCursor } = cutPage(found, limit, (last) =>
    writeCursor(list, { value: last.weekFrom, id: last.employeeId }),
  );
  const threshold = rule.thresholdHours;
  return {
    ...toWorkings(head, OVERTIME_RULE),
    inputs: [
      toInput(
        'Overtime counts from',
        threshold === null ? 'never: the shop computes none' : hoursIn(toHours(threshold)),
      ),
    ],
    amount: sums.amount,
    lineCount: sums.lines,
    lines: rows.map(toWeekLine),
    nextCursor,
  };
}

const OVERTIME_RULE =
  'Hours of each week above the threshold × the week’s hours in the days ÷ all hours of the week, rounded half-up to four decimals on each week, so that a week across two months counts in both. State and local rules differ, and payroll decides.';

/** Opens into the premium of the week. */
function toWeekLine({
  employeeId,
  employee,
  weekFrom,
  weekHours,
  hours,
  overtimeHours,
}: OvertimeWeekRow): WorkingsLine {
  const lastDay = formatLocalDate(addDays(toLocalDate(weekFrom), 6));
  return {
    ...PLAIN_LINE,
    lineId: `${weekFrom}.${employeeId}`,
    on: weekFrom,
    category: 'overtime',
    label: employee,
    detail: `week through ${lastDay}: ${hoursIn(toHours(weekHours))}, of which ${hoursIn(toHours(hours))} in these days`,
    amount: hoursText(toHours(overtimeHours)),
    figure: { figure: 'overtime.week', employeeId, from: weekFrom },
  };
}

function readCosted(
  { shop }: ShopContext,
  trx: ShopTransaction,
  head: HoursHead,
  paging: LinePaging,
): Promise<Workings> {
  const { employeeId, from, to } = head.figure;
  const selection = { employeeId, worked: { from, to } };
  return readLineWorkings(trx, head, COSTED_HOURS, selection, paging, shop.currency);
}

/** Made of what payroll has and of hours that open themselves; of everybody, of each one's difference. */
async function readDifference(
  context: ShopContext,
  trx: ShopTransaction,
  head: HoursHead,
): Promise<Workings> {
  const { employeeId, from, to } = head.figure;
  const days = { month: from.slice(0, 7), from: toLocalDate(from), to: toLocalDate(to) };
  const rows = await readTieOut(trx, context, days, employeeId);
  const parts = rows.flatMap((row) => toDifferenceParts(row, head.figure));
  const rule = 'The hours that payroll has for the month − the hours of the timesheets of its days.';
  return {
    ...toWorkings(head, rule),
    amount: hoursText(toHours(sum(parts.map(({ amount }) => D(amount))))),
    parts,
  };
}

function toDifferenceParts(row: MonthTieOut, { employeeId, from, to }: HoursRef): Workings['parts'] {
  const { employee, payrollHours, difference, hours } = row;
  if (payrollHours === null || difference === null) {
    const message = `Nobody has entered payroll’s hours of ${employee} for these days. Enter them on the month’s page.`;
    throw new AppError('not_found', message);
  }
  const ref = { employeeId: row.employeeId, from, to };
  if (employeeId === undefined) {
    return [{ label: employee, amount: difference, figure: { figure: 'hours.difference', ...ref } }];
  }
  const counted = hoursText(toHours(D(hours).negated()));
  return [
    { label: 'Payroll, as entered', amount: payrollHours, figure: null },
    { label: 'Timesheets', amount: counted, figure: { figure: 'hours.timesheets', ...ref } },
  ];
}

function toWorkings(head: HoursHead, rule: string): Workings {
  const nothing = { inputs: [], parts: [], lineCount: 0, lines: [], nextCursor: null };
  return { ...head, rule, unit: 'hours', amount: '0.0000', ...nothing };
}
