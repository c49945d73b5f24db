import { D, type Mass, massIn, sum } from '@brakeven/values';
import { KIND_COSTS, type KindCosts, type MaterialCode, MATERIALS } from './cost-story';
import { weighFlat, weighPieces } from './piece-weight';
import { type PlannedJob } from './plan-jobs';
import { type PlannedEntry } from './plan-weeks';
import { createRandom, type Random } from './random';
import { WEEKS } from './story';

/** Days counted from the first Monday of the history. */
export interface PlannedIssue {
  day: number;
  job: PlannedJob;
  kind: 'issue' | 'return';
  material: MaterialCode;
  /** Blanks cut; null where the weight was taken. */
  pieces: number | null;
  weight: Mass;
  note: string | null;
}

export interface PlannedLot {
  number: string;
  day: number;
  material: MaterialCode;
  /** Null for what is only weighed. */
  sheets: number | null;
  weight: Mass;
  dollars: number;
  freight: number;
  /** Its papers came weeks later: not in the shop's first workbook. */
  isBackdated: boolean;
}

export interface PlannedService {
  day: number;
  job: PlannedJob;
  vendor: string;
  description: string;
  dollars: number;
}

export interface PlannedInvoice {
  day: number;
  job: PlannedJob;
  kind: 'invoice' | 'credit-note';
  dollars: number;
  description: string;
}

export interface PlannedCosts {
  lots: readonly PlannedLot[];
  issues: readonly PlannedIssue[];
  services: readonly PlannedService[];
  invoices: readonly PlannedInvoice[];
}

const SEED = 20260302;
const SCRAP_ALLOWANCE = 1.03;
const LAST_DAY = WEEKS * 7 - 3;

/** Material, services and invoices of all jobs, fitting the days on which they were worked on. */
export function planCosts(
  jobs: readonly PlannedJob[],
  weeks: readonly (readonly PlannedEntry[])[],
): PlannedCosts {
  const random = createRandom(SEED);
  const worked = listWorkedJobs(jobs, weeks);
  const issues = worked.flatMap((one) => planIssues(one, random)).sort((a, b) => a.day - b.day);
  return {
    issues,
    lots: planLots(issues, random),
    services: worked.flatMap((one) => planServices(one, random)),
    invoices: worked.flatMap((one) => planInvoices(one)).sort((a, b) => a.day - b.day),
  };
}

interface WorkedJob {
  job: PlannedJob;
  costs: KindCosts;
  quantity: number;
  firstDay: number;
  lastDay: number;
}

function listWorkedJobs(
  jobs: readonly PlannedJob[],
  weeks: readonly (readonly PlannedEntry[])[],
): WorkedJob[] {
  const days = new Map<PlannedJob, number[]>();
  // The last week is not imported, so nothing rests on it.
  for (const [week, entries] of weeks.slice(0, -1).entries())
    for (const { job, day } of entries) days.set(job, [...(days.get(job) ?? []), week * 7 + day]);
  return jobs.flatMap((job) => {
    const costs = KIND_COSTS[job.title];
    const [firstDay, lastDay] = [days.get(job)?.at(0), days.get(job)?.at(-1)];
    if (!costs || job.quantity === null || firstDay === undefined || lastDay === undefined) return [];
    return [{ job, costs, quantity: job.quantity, firstDay, lastDay }];
  });
}

/** All blanks at once, or in two lots of work; what is left of them comes back now and then. */
function planIssues({ job, costs, quantity, firstDay, lastDay }: WorkedJob, random: Random): PlannedIssue[] {
  const issue = (day: number, pieces: number, note: string | null): PlannedIssue => ({
    ...{ day, job, kind: 'issue', material: costs.material, note },
    pieces: costs.blankIn ? pieces : null,
    weight: weighPieces(costs, pieces),
  });
  const pieces = Math.ceil(quantity * SCRAP_ALLOWANCE);
  const first = random.chance(0.4) && lastDay - firstDay > 7 ? Math.ceil(pieces * 0.6) : pieces;
  const issues = [issue(firstDay, first, null)];
  if (first < pieces) issues.push(issue(firstDay + 7, pieces - first, 'Second half'));
  if (job.isBadLot) issues.push(issue(lastDay, Math.ceil(quantity * 0.14), 'Cut again for cracked pieces'));
  if (job.isLosing) issues.push(issue(lastDay, Math.ceil(quantity * 0.22), 'Cut again, drawing changed'));
  if (!random.chance(0.15)) return issues;
  const back = massIn(weighPieces(costs, quantity), 'lb').times(0.04).toDecimalPlaces(1);
  const weight = D(back).times('0.45359237') as Mass;
  return [
    ...issues,
    {
      ...{ day: lastDay, job, kind: 'return', material: costs.material, pieces: null },
      ...{ weight, note: 'Remnants back on the rack' },
    },
  ];
}

const DAYS_AHEAD = 21;
const SHEETS_AT_A_TIME = 5;
const POUNDS_AT_A_TIME = 500;
/** The lot whose papers came late. */
const BACKDATED = { material: 'hotRolled', day: (WEEKS - 9) * 7 + 2, sheets: 15 } as const;

/** Lots as they were needed, three weeks ahead, at prices that drift; numbered by the day they came in. */
function planLots(issues: readonly PlannedIssue[], random: Random): PlannedLot[] {
  const codes = Object.keys(MATERIALS) as MaterialCode[];
  const lots = codes.flatMap((code) => planLotsOf(code, issues, random));
  const numbered = lots
    .sort((a, b) => a.day - b.day)
    .map((lot, index) => ({ ...lot, number: `L-${301 + index}` }));
  const { sheets, material, day } = BACKDATED;
  const weight = weighFlat(MATERIALS[material], sheets, MATERIALS[material].sheetIn);
  const late = { ...priceLot(material, day, weight, random), sheets, isBackdated: true };
  return [...numbered, { ...late, number: `L-${301 + numbered.length}` }];
}

function planLotsOf(
  code: MaterialCode,
  issues: readonly PlannedIssue[],
  random: Random,
): Omit<PlannedLot, 'number'>[] {
  const drawn = issues.filter(({ material, kind }) => material === code && kind === 'issue');
  const material = MATERIALS[code];
  const lots: Omit<PlannedLot, 'number'>[] = [];
  let stock = D(0);
  for (let day = -3; day <= LAST_DAY; day += 7) {
    const isDue = (from: number, to: number) => (issue: PlannedIssue) => issue.day >= from && issue.day < to;
    const next = sum(drawn.filter(isDue(day, day + DAYS_AHEAD)).map(({ weight }) => weight));
    const missing = D(next).minus(stock);
    if (missing.gt(0)) {
      const lot = toLot(material.sheetIn ? code : null, massIn(missing as Mass, 'lb').toNumber());
      const weight = lot.sheets === null ? lot.weight : weighFlat(material, lot.sheets, lot.size);
      lots.push({ ...priceLot(code, day, weight, random), sheets: lot.sheets, isBackdated: false });
      stock = stock.plus(weight);
    }
    stock = stock.minus(sum(drawn.filter(isDue(day, day + 7)).map(({ weight }) => weight)));
  }
  return lots;
}

type LotSize =
  | { sheets: number; size: readonly [string, string]; weight: null }
  | { sheets: null; size: null; weight: Mass };

/** Enough sheets, or pounds, in the quantities that are sold. */
function toLot(code: MaterialCode | null, pounds: number): LotSize {
  const size = code && MATERIALS[code].sheetIn;
  if (!code || !size) {
    const whole = Math.ceil(pounds / POUNDS_AT_A_TIME) * POUNDS_AT_A_TIME;
    return { sheets: null, size: null, weight: D(whole).times('0.45359237') as Mass };
  }
  const perSheet = massIn(weighFlat(MATERIALS[code], 1, size), 'lb').toNumber();
  const sheets = Math.ceil(pounds / perSheet / SHEETS_AT_A_TIME) * SHEETS_AT_A_TIME;
  return { sheets, size, weight: null };
}

function priceLot(material: MaterialCode, day: number, weight: Mass, random: Random) {
  const drift = 1 + 0.07 * Math.sin(day / 45) + random.between(-0.03, 0.03);
  const dollars = massIn(weight, 'lb').toNumber() * MATERIALS[material].dollarsPerLb * drift;
  return { day, material, weight, dollars, freight: Math.round(random.between(45, 140)) };
}

/** As estimated, and what the losing job had not reckoned with. */
function planServices({ job, costs, quantity, lastDay }: WorkedJob, random: Random): PlannedService[] {
  if (!costs.outside || !(job.isSentOut || job.isLosing)) return [];
  const { vendor, description, dollarsPerPiece } = costs.outside;
  const dollars = quantity * dollarsPerPiece * random.between(0.95, 1.1);
  return [{ day: lastDay, job, vendor, description: `${description}, ${quantity} pieces`, dollars }];
}

const PART_PAYMENT_EVERY = 7;

/** What was invoiced whole, larger jobs in two parts; a part of some that go on; a credit for the bad sheet lot. */
function planInvoices({ job, firstDay, quantity }: WorkedJob): PlannedInvoice[] {
  const price = Number(job.quotedPrice);
  const hasPart = Number(job.number) % PART_PAYMENT_EVERY === 0;
  const part = hasPart ? Math.round(price * 0.4) : 0;
  const toInvoice = (day: number, dollars: number, description: string): PlannedInvoice => ({
    ...{ day, job, kind: 'invoice', dollars, description },
  });
  const invoices = hasPart ? [toInvoice(firstDay, part, 'Part payment, material')] : [];
  if (job.statusNow !== 'invoiced') return invoices;
  const day = (job.lastWeek + 1) * 7 + 1;
  const pieces = `${quantity} pieces${hasPart ? ', rest' : ''}`;
  invoices.push(toInvoice(day, price - part, `${job.title}, ${pieces}`));
  if (!job.isBadLot) return invoices;
  const credit = { ...toInvoice(day + 12, 640, 'Cracked pieces taken back'), kind: 'credit-note' as const };
  return [...invoices, credit];
}
