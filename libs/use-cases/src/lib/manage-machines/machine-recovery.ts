import { type MachineRecovery } from '@brakeven/contract';
import { computeMachineHourRate, computeRecovery, prorateFixedCost } from '@brakeven/costing';
import { findThrough, listMachineHours } from '@brakeven/database';
import {
  addDays,
  D,
  daysBetween,
  type Hours,
  hoursText,
  type LocalDate,
  moneyText,
  sum,
  toHours,
  toLocalDate,
  toMoney,
} from '@brakeven/values';
import { inShopOf, type ShopContext } from '../context';
import { readMachine } from './machines';
import { toCostedBasis } from './rate-basis';

/** Days on which one rate holds, both ends included; without a basis none was built. */
interface RateDays {
  from: LocalDate;
  to: LocalDate;
  basis: ReturnType<typeof toCostedBasis> | null;
}

/**
 * Holds the fixed cost of a period against what the hours really run have carried of it, rate by rate over the days
 * on which each held. The period is cut to the days in service and to those that are rolled up.
 * @throws AppError `not_found`
 */
export function getMachineRecovery(
  context: ShopContext,
  { machineId, from, to }: { machineId: string; from: string; to: string },
): Promise<MachineRecovery> {
  return inShopOf(context, async (trx) => {
    const machine = await readMachine(context, trx, machineId);
    const through = await findThrough(trx);
    const period = cutPeriod(from, to, { inServiceOn: machine.inServiceOn, through });
    if (!period) return toRecovery(null, [], new Map());
    const rows = await listMachineHours(trx, machineId, period.from, period.to);
    const hours = new Map(rows.map((row) => [row.workedOn, toHours(row.hours)]));
    return toRecovery(period, listRateDays(period, machine.rates ?? []), hours);
  });
}

interface Period {
  from: LocalDate;
  to: LocalDate;
}

function cutPeriod(
  from: string,
  to: string,
  { inServiceOn, through }: { inServiceOn: string | null; through: string | null },
): Period | null {
  if (through === null) return null;
  const first = toLocalDate(inServiceOn !== null && inServiceOn > from ? inServiceOn : from);
  const last = toLocalDate(through < to ? through : to);
  return first <= last ? { from: first, to: last } : null;
}

interface DatedRate {
  validFrom: string;
  basis: Parameters<typeof toCostedBasis>[0] | null;
}

/** The period cut where rates change; a first piece before any rate has no basis. */
function listRateDays({ from, to }: Period, rates: readonly DatedRate[]): RateDays[] {
  const ordered = [...rates].sort((a, b) => a.validFrom.localeCompare(b.validFrom));
  const before = ordered.filter(({ validFrom }) => validFrom <= from).at(-1);
  const starts = [
    { validFrom: from, basis: before?.basis ?? null },
    ...ordered.filter(({ validFrom }) => validFrom > from && validFrom <= to),
  ];
  return starts.map(({ validFrom, basis }, index) => {
    const next = starts[index + 1];
    return {
      from: toLocalDate(validFrom),
      to: next ? addDays(toLocalDate(next.validFrom), -1) : to,
      basis: basis && toCostedBasis(basis),
    };
  });
}

function toRecovery(
  period: Period | null,
  pieces: readonly RateDays[],
  hours: ReadonlyMap<string, Hours>,
): MachineRecovery {
  const built = pieces.flatMap(({ basis, ...days }) => (basis ? [recoverPiece(days, basis, hours)] : []));
  const others = pieces.filter(({ basis }) => basis === null);
  const fixedCost = sum(built.map((piece) => piece.fixedCost));
  const absorbed = sum(built.map((piece) => piece.absorbed));
  const difference = toMoney(absorbed.minus(fixedCost));
  return {
    from: period?.from ?? null,
    to: period?.to ?? null,
    daysCovered: built.reduce((days, piece) => days + piece.days, 0),
    daysWithoutBasis: others.reduce((days, piece) => days + countDays(piece), 0),
    plannedHours: hoursText(sum(built.map((piece) => piece.plannedHours))),
    actualHours: hoursText(sum(built.map((piece) => piece.actualHours))),
    hoursWithoutBasis: hoursText(sum(others.map((piece) => sumHours(piece, hours)))),
    fixedCost: moneyText(fixedCost),
    absorbed: moneyText(absorbed),
    difference: moneyText(difference),
    outcome: toOutcome(difference.comparedTo(D(0))),
  };
}

function recoverPiece(
  days: Period,
  basis: ReturnType<typeof toCostedBasis>,
  hours: ReadonlyMap<string, Hours>,
) {
  const { fixedPerYear, fixedPerHour } = computeMachineHourRate(basis);
  const actualHours = sumHours(days, hours);
  const fixedCost = prorateFixedCost(fixedPerYear, days.from, days.to);
  const { absorbed } = computeRecovery(fixedCost, fixedPerHour, actualHours);
  return {
    days: countDays(days),
    // By the day, like the cost: planned hours of a year are shared out in the same way.
    plannedHours: toHours(prorateFixedCost(toMoney(basis.productiveHoursPerYear), days.from, days.to)),
    actualHours,
    fixedCost,
    absorbed,
  };
}

function sumHours({ from, to }: Period, hours: ReadonlyMap<string, Hours>): Hours {
  return sum([...hours].filter(([day]) => day >= from && day <= to).map(([, worked]) => worked));
}

function countDays({ from, to }: Period): number {
  return daysBetween(from, to) + 1;
}

function toOutcome(sign: number): MachineRecovery['outcome'] {
  if (sign === 0) return 'even';
  return sign > 0 ? 'over' : 'under';
}
