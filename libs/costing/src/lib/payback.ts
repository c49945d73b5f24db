import {
  addDays,
  addYears,
  type Decimal,
  daysBetween,
  laterOf,
  type LocalDate,
  type Money,
  sum,
  toMoney,
} from '@brakeven/values';

/** What one machine earned and cost on one day; a `MachineDay` will do. */
export interface PaybackDay {
  workedOn: LocalDate;
  earned: Money;
  operatorLabour: Money;
  running: Money;
}

/** What a payback is computed from. */
export interface PaybackInput {
  /** Landed cost: the sum of the machine's cost items. */
  outlay: Money;
  /** Days of this machine, each date once; the order does not matter. */
  days: readonly PaybackDay[];
  /** The last day that has been costed; null if nothing has. Later days are left out. */
  asOf: LocalDate | null;
  /** The machine's first day in service; earlier days are left out. */
  inServiceOn: LocalDate | null;
}

/** How a break-even date was found, or why there is none. */
export type BreakEvenMethod = 'reached' | 'straight-line' | 'not-at-this-pace' | 'no-data';

/** The break-even date; null unless reached or on the straight line. */
export interface BreakEven {
  date: LocalDate | null;
  method: BreakEvenMethod;
}

/** The days that the pace was taken from, both ends included. */
export interface PaceWindow {
  from: LocalDate;
  to: LocalDate;
  days: number;
  /** earned − running cost of those days */
  net: Money;
}

/** One day of the curve: earned back up to and including that day. */
export interface PaybackPoint {
  date: LocalDate;
  net: Money;
}

/** How far a machine has paid itself back. */
export interface Payback {
  outlay: Money;
  earned: Money;
  operatorLabour: Money;
  running: Money;
  /** operatorLabour + running */
  runningCost: Money;
  /** earned − runningCost; below 0 if the machine has cost more than it earned. */
  earnedBack: Money;
  /** outlay − earnedBack, not below 0 */
  remaining: Money;
  breakEven: BreakEven;
  /** Net of the pace window × 7 ÷ its days, half-up to the cent; null without a window. */
  pacePerWeek: Money | null;
  paceWindow: PaceWindow | null;
  /** A point for each day that has figures, by date. */
  curve: PaybackPoint[];
}

/** Twenty-six weeks. */
export const PACE_DAYS_MAX = 182;

/** A straight line that ends later than this is no answer. */
export const STRAIGHT_LINE_YEARS_MAX = 20;

/**
 * Computes a machine's payback from its days. Sums are exact; only `pacePerWeek` is rounded, and the straight line
 * uses the unrounded pace, its days rounded up.
 * Rules in words: `RULES.outlay`, `.earned`, `.runningCost`, `.earnedBack`, `.remaining`, `.pace`, `.breakEven…`.
 */
export function computePayback({ outlay, days, asOf, inServiceOn }: PaybackInput): Payback {
  const counted = countedDays(days, asOf, inServiceOn);
  const operatorLabour = sum(counted.map((day) => day.operatorLabour));
  const running = sum(counted.map((day) => day.running));
  const earned = sum(counted.map((day) => day.earned));
  const runningCost = sum([operatorLabour, running]);
  const earnedBack = earned.minus(runningCost) as Money;
  const remaining = toMoney(outlay.gt(earnedBack) ? outlay.minus(earnedBack) : 0);
  const curve = toCurve(counted);
  const paceWindow = findPaceWindow(counted, asOf, inServiceOn);
  return {
    outlay,
    earned,
    operatorLabour,
    running,
    runningCost,
    earnedBack,
    remaining,
    breakEven: findBreakEven(outlay, remaining, curve, paceWindow),
    pacePerWeek: paceWindow && toMoney(paceWindow.net.times(7).div(paceWindow.days)),
    paceWindow,
    curve,
  };
}

function countedDays(
  days: readonly PaybackDay[],
  asOf: LocalDate | null,
  inServiceOn: LocalDate | null,
): PaybackDay[] {
  if (asOf === null || inServiceOn === null) return [];
  return days
    .filter((day) => day.workedOn >= inServiceOn && day.workedOn <= asOf)
    .sort((a, b) => (a.workedOn < b.workedOn ? -1 : 1));
}

function netOf(day: PaybackDay): Decimal {
  return day.earned.minus(day.operatorLabour).minus(day.running);
}

function toCurve(days: readonly PaybackDay[]): PaybackPoint[] {
  let net = toMoney(0);
  return days.map((day) => {
    net = net.plus(netOf(day)) as Money;
    return { date: day.workedOn, net };
  });
}

/** The last 182 days up to `asOf`, or the days in service if fewer; null while there are no figures. */
function findPaceWindow(
  counted: readonly PaybackDay[],
  asOf: LocalDate | null,
  inServiceOn: LocalDate | null,
): PaceWindow | null {
  if (asOf === null || inServiceOn === null || counted.length === 0) return null;
  const from = laterOf(inServiceOn, addDays(asOf, 1 - PACE_DAYS_MAX));
  const net = sum(counted.filter((day) => day.workedOn >= from).map(netOf)) as Money;
  return { from, to: asOf, days: daysBetween(from, asOf) + 1, net };
}

function findBreakEven(
  outlay: Money,
  remaining: Money,
  curve: readonly PaybackPoint[],
  pace: PaceWindow | null,
): BreakEven {
  if (pace === null || outlay.lte(0)) return { date: null, method: 'no-data' };
  const reached = curve.find((point) => point.net.gte(outlay));
  if (reached) return { date: reached.date, method: 'reached' };
  const daysLeft = pace.net.gt(0) ? remaining.times(pace.days).div(pace.net).ceil() : null;
  const daysMax = daysBetween(pace.to, addYears(pace.to, STRAIGHT_LINE_YEARS_MAX));
  if (daysLeft === null || daysLeft.gt(daysMax)) return { date: null, method: 'not-at-this-pace' };
  return { date: addDays(pace.to, daysLeft.toNumber()), method: 'straight-line' };
}
