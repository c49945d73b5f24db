import {
  D,
  type DayOfWeek,
  type Decimal,
  type Hours,
  type LocalDate,
  type Money,
  type Rate,
  startOfWeek,
  sum,
  toHours,
  toMoney,
  toRate,
} from '@brakeven/values';
import { findValidOn } from './effective-dated';
import { type CostedEntry, type RateBook, type RateGap } from './entry-lines';
import { allocateLargestRemainder } from './largest-remainder';
import { roundFraction } from './round-fraction';
import { type SourceLine } from './source-line';

/** How a shop treats overtime. */
export interface OvertimeRule {
  /** Hours a week above which a premium is owed; null if the shop computes none. */
  thresholdHours: Hours | null;
  /** Whether the premium goes to overhead, or to the jobs of the week. */
  overtimeTo: 'overhead' | 'jobs';
  weekStart: DayOfWeek;
}

/** Hours with the wage that was valid on their date; null if none was. */
export interface PaidHours {
  hours: Hours;
  wagePerHour: Rate | null;
}

/** What one employee's week comes to. */
export interface WeekPremium {
  hours: Hours;
  /** Hours above the threshold, 0 if there are none. */
  overtimeHours: Hours;
  /** Straight-time pay ÷ hours, for showing: six decimals. Null without hours or where a wage is missing. */
  regularRate: Rate | null;
  /** ½ × regular rate × overtime hours; null if there is overtime but an entry lacks a wage. */
  premium: Money | null;
}

/** An entry that takes a share of a premium. */
export interface PremiumEntry {
  entryId: string;
  workedOn: LocalDate;
  hours: Hours;
}

/** Overtime lines, and a gap for each entry of a week with overtime in which a wage is missing. */
export interface OvertimeLines {
  lines: SourceLine[];
  gaps: RateGap[];
}

const NOTHING = toMoney(0);
const ONE = D(1);

/**
 * The overtime premium of one employee's week: ½ × the regular rate (the week's straight-time pay without burden ÷
 * its hours) × the hours above the threshold, as one exact fraction rounded half-up to the cent once.
 * Rule in words: `RULES.overtime`. Source: 29 CFR 778.110 and 778.115.
 */
export function computeWeekPremium(entries: readonly PaidHours[], thresholdHours: Hours | null): WeekPremium {
  const hours = sum(entries.map((entry) => entry.hours));
  const overtimeHours = toHours(
    thresholdHours !== null && hours.gt(thresholdHours) ? hours.minus(thresholdHours) : 0,
  );
  const pay = sumPay(entries);
  return {
    hours,
    overtimeHours,
    regularRate: pay && hours.gt(0) ? toRate(roundFraction(pay, hours, 6)) : null,
    premium: toPremium(pay, hours, overtimeHours),
  };
}

/**
 * Shares an amount out over entries by hours, in whole cents that add up to it exactly (see
 * `allocateLargestRemainder`); of equal remainders the earlier work date comes first, then the smaller entry id.
 */
export function spreadPremium(amount: Money, entries: readonly PremiumEntry[]): Map<string, Money> {
  const ordered = [...entries].sort(byDateAndId);
  const shares = allocateLargestRemainder(
    amount,
    ordered.map((entry) => entry.hours),
  );
  return new Map(ordered.map((entry, index) => [entry.entryId, shares[index] ?? NOTHING]));
}

/**
 * The overtime lines of live entries, week by week. `posted` holds what entries posted in a closed month have there,
 * net (0 for one without overtime): those keep it, and the rest of the week's premium, which may be below 0, is
 * spread over the other entries; where there are none, nothing is posted.
 * Each line: quantity = the entry's hours, rate = the week's premium ÷ its hours, six decimals, amount = its share.
 */
export function computeOvertimeLines(
  entries: Iterable<CostedEntry>,
  book: RateBook,
  rule: OvertimeRule,
  posted: ReadonlyMap<string, Money> = new Map(),
): OvertimeLines {
  const result: OvertimeLines = { lines: [], gaps: [] };
  if (rule.thresholdHours === null) return result;
  for (const week of groupWeeks(entries, rule.weekStart)) {
    const { lines, gaps } = computeWeekLines(week, book, rule, posted);
    result.lines.push(...lines);
    result.gaps.push(...gaps);
  }
  return result;
}

/** Straight-time pay; null if a wage is missing. */
function sumPay(entries: readonly PaidHours[]): Decimal | null {
  const pays = entries.map(({ hours, wagePerHour }) => wagePerHour && hours.times(wagePerHour));
  const known = pays.filter((pay) => pay !== null);
  return known.length === pays.length ? sum(known) : null;
}

function toPremium(pay: Decimal | null, hours: Hours, overtimeHours: Hours): Money | null {
  if (overtimeHours.isZero()) return NOTHING;
  return pay && toMoney(roundFraction(pay.times(overtimeHours), hours.times(2), 2));
}

function groupWeeks(entries: Iterable<CostedEntry>, weekStart: DayOfWeek): CostedEntry[][] {
  const weeks = new Map<string, CostedEntry[]>();
  for (const entry of entries) {
    const key = `${entry.employeeId} ${startOfWeek(entry.workedOn, weekStart)}`;
    const week = weeks.get(key);
    if (week) week.push(entry);
    else weeks.set(key, [entry]);
  }
  return [...weeks.values()];
}

function computeWeekLines(
  week: readonly CostedEntry[],
  book: RateBook,
  rule: OvertimeRule,
  posted: ReadonlyMap<string, Money>,
): OvertimeLines {
  const { hours, premium } = computeWeekPremium(
    week.map((entry) => ({ hours: entry.hours, wagePerHour: findWage(entry, book) })),
    rule.thresholdHours,
  );
  const open = week.filter((entry) => !posted.has(entry.entryId));
  if (premium === null) return { lines: [], gaps: open.map(toGap) };
  const kept = sum(week.map((entry) => posted.get(entry.entryId) ?? NOTHING));
  const rest = toMoney(premium.minus(kept));
  if (open.length === 0 || rest.isZero()) return { lines: [], gaps: [] };
  const shares = spreadPremium(rest, open);
  const rate = toRate(roundFraction(premium, hours, 6));
  const lines = open.map((entry) => toLine(entry, rule, rate, shares.get(entry.entryId) ?? NOTHING));
  return { lines: lines.filter((line) => !line.amount.isZero()), gaps: [] };
}

function findWage(entry: CostedEntry, book: RateBook): Rate | null {
  return findValidOn(book.payRates.get(entry.employeeId) ?? [], entry.workedOn)?.wagePerHour ?? null;
}

function toLine(entry: CostedEntry, rule: OvertimeRule, rate: Rate, amount: Money): SourceLine {
  return {
    sourceKind: 'time_entry',
    sourceId: entry.entryId,
    workedOn: entry.workedOn,
    category: 'overtime',
    jobId: rule.overtimeTo === 'jobs' ? entry.jobId : null,
    employeeId: entry.employeeId,
    machineId: entry.machineId,
    quantity: entry.hours,
    rate,
    rateFactor: ONE,
    rateId: null,
    amount,
  };
}

function toGap({ entryId, workedOn, jobId, employeeId, machineId, hours }: CostedEntry): RateGap {
  return { entryId, workedOn, category: 'overtime', jobId, employeeId, machineId, hours };
}

function byDateAndId(a: PremiumEntry, b: PremiumEntry): number {
  if (a.workedOn !== b.workedOn) return a.workedOn < b.workedOn ? -1 : 1;
  return a.entryId < b.entryId ? -1 : 1;
}
