import {
  D,
  type Decimal,
  factorOf,
  type Hours,
  type LocalDate,
  type Money,
  type Percent,
  type Rate,
  toMoney,
} from '@brakeven/values';
import { type CostCategory } from './cost-categories';
import { type EffectiveDated, findValidOn } from './effective-dated';

/** The categories that a time entry owes by itself; overtime is owed by its whole week. */
export type EntryCategory = Extract<CostCategory, 'labour' | 'machine' | 'overhead' | 'earned' | 'running'>;

/** A time entry as costing sees it; `machineId` is already resolved (the row's own, else the operation's). */
export interface CostedEntry {
  entryId: string;
  workedOn: LocalDate;
  employeeId: string;
  jobId: string;
  isBillable: boolean;
  machineId: string | null;
  hours: Hours;
}

/** An employee's wage per hour and burden, from a date on. */
export interface PayRate extends EffectiveDated {
  id: string;
  wagePerHour: Rate;
  burdenPercent: Percent;
}

/** A machine's three rates per hour, from a date on. */
export interface MachineRate extends EffectiveDated {
  id: string;
  machineHourRate: Rate;
  chargeOutRate: Rate;
  runningCostPerHour: Rate;
}

/** The shop's overhead per hour of labour, from a date on. */
export interface OverheadRate extends EffectiveDated {
  id: string;
  ratePerLabourHour: Rate;
}

/** Everything that turns hours into money, by employee and by machine. */
export interface RateBook {
  payRates: ReadonlyMap<string, readonly PayRate[]>;
  machineRates: ReadonlyMap<string, readonly MachineRate[]>;
  overheadRates: readonly OverheadRate[];
  /** The machine's first day in service; a machine that is absent or null is not in service yet. */
  inServiceOn: ReadonlyMap<string, LocalDate | null>;
}

/** What an entry is, without its rate: the part that lines and gaps share. */
interface EntryPart {
  entryId: string;
  workedOn: LocalDate;
  category: CostCategory;
  jobId: string;
  employeeId: string;
  machineId: string | null;
}

/** One entry's amount in one category; `amount` = `quantity` × `rate` × `rateFactor`, half-up to the cent. */
export interface CostLine extends EntryPart {
  quantity: Hours;
  rate: Rate;
  /** 1, or 1 + burden for labour. */
  rateFactor: Decimal;
  rateId: string;
  amount: Money;
}

/** A category that an entry ought to have, but no rate was valid on its date; never counted as 0. */
export interface RateGap extends EntryPart {
  hours: Hours;
}

/** What costing made of one entry or of many. */
export interface EntryLines {
  lines: CostLine[];
  gaps: RateGap[];
}

/** A rate as a line uses it. */
interface LineRate {
  rateId: string;
  rate: Rate;
  rateFactor: Decimal;
}

const ONE = D(1);

/**
 * The cost lines of one time entry. Rules in words: `RULES.labour`, `.machine`, `.overhead`, `.earned`, `.running`.
 * Each amount is rounded half-up to the cent once, here; every total elsewhere is a sum of these lines.
 */
export function computeEntryLines(entry: CostedEntry, book: RateBook): EntryLines {
  const result: EntryLines = { lines: [], gaps: [] };
  for (const category of categoriesOf(entry, book)) {
    const part = toPart(entry, category);
    const rate = findRate(entry, category, book);
    if (rate) result.lines.push({ ...part, ...toAmount(entry.hours, rate) });
    else result.gaps.push({ ...part, hours: entry.hours });
  }
  return result;
}

/** The cost lines of many entries, in their order. */
export function computeLines(entries: Iterable<CostedEntry>, book: RateBook): EntryLines {
  const result: EntryLines = { lines: [], gaps: [] };
  for (const entry of entries) {
    const { lines, gaps } = computeEntryLines(entry, book);
    result.lines.push(...lines);
    result.gaps.push(...gaps);
  }
  return result;
}

/** Whether a machine counts towards its payback on a date: from its first day in service on. */
export function isInService(inServiceOn: LocalDate | null | undefined, date: LocalDate): boolean {
  return inServiceOn !== null && inServiceOn !== undefined && inServiceOn <= date;
}

function categoriesOf(entry: CostedEntry, book: RateBook): EntryCategory[] {
  if (entry.machineId === null) return ['labour', 'overhead'];
  const categories: EntryCategory[] = ['labour', 'machine', 'overhead'];
  if (!isInService(book.inServiceOn.get(entry.machineId), entry.workedOn)) return categories;
  if (entry.isBillable) categories.push('earned');
  categories.push('running');
  return categories;
}

function findRate(entry: CostedEntry, category: EntryCategory, book: RateBook): LineRate | undefined {
  if (category === 'labour') return findLabourRate(entry, book);
  if (category === 'overhead') return findOverheadRate(entry, book);
  return findMachineRate(entry, category, book);
}

function findLabourRate(entry: CostedEntry, book: RateBook): LineRate | undefined {
  const found = findValidOn(book.payRates.get(entry.employeeId) ?? [], entry.workedOn);
  return found && { rateId: found.id, rate: found.wagePerHour, rateFactor: factorOf(found.burdenPercent) };
}

function findOverheadRate(entry: CostedEntry, book: RateBook): LineRate | undefined {
  const found = findValidOn(book.overheadRates, entry.workedOn);
  return found && { rateId: found.id, rate: found.ratePerLabourHour, rateFactor: ONE };
}

const MACHINE_RATE_OF = {
  machine: 'machineHourRate',
  earned: 'chargeOutRate',
  running: 'runningCostPerHour',
} as const;

function findMachineRate(
  entry: CostedEntry,
  category: keyof typeof MACHINE_RATE_OF,
  book: RateBook,
): LineRate | undefined {
  const found = findValidOn(book.machineRates.get(entry.machineId ?? '') ?? [], entry.workedOn);
  return found && { rateId: found.id, rate: found[MACHINE_RATE_OF[category]], rateFactor: ONE };
}

function toPart(entry: CostedEntry, category: CostCategory): EntryPart {
  const { entryId, workedOn, jobId, employeeId, machineId } = entry;
  return { entryId, workedOn, category, jobId, employeeId, machineId };
}

function toAmount(hours: Hours, rate: LineRate): LineRate & Pick<CostLine, 'quantity' | 'amount'> {
  return { ...rate, quantity: hours, amount: toMoney(hours.times(rate.rate).times(rate.rateFactor)) };
}
