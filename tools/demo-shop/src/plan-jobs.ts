import { type JobStatus } from '@brakeven/contract';
import { planEstimate, quote } from './plan-estimates';
import { type Random } from './random';
import { CUSTOMERS, JOB_KINDS, UPKEEP_JOB, WEEKS } from './story';

export interface PlannedJob {
  number: string;
  title: string;
  customer: string | null;
  quantity: number | null;
  openedWeek: number;
  /** Last week in which work is done on it. */
  lastWeek: number;
  dueWeek: number;
  quotedPrice: string | null;
  isBillable: boolean;
  /** How it stands today; while it was worked on it was open. */
  statusNow: JobStatus;
  /** Hours as they were estimated, by operation. */
  plannedHours: ReadonlyMap<string, number>;
  /** Hours still to be worked by operation. */
  hoursLeft: Map<string, number>;
  piecesPerHour: number;
  /** Takes half as long again as quoted. */
  isLosing: boolean;
  /** Runs on a sheet lot that scrapped badly. */
  isBadLot: boolean;
  /** Part of it is estimated to be done outside. */
  isSentOut: boolean;
}

const LOSING_JOB = 47;
const BAD_LOT_JOB = 61;
/** What the losing job was quoted for, of the price it should have had. */
const LOSING_SHARE = 0.93;

/** The shop's jobs over the whole history: slow to start, busy in autumn. */
export function planJobs(random: Random): PlannedJob[] {
  const jobs = [upkeepJob()];
  for (let week = 0; week < WEEKS; week += 1) {
    const opened = 2 + Number(week > 16 && week % 3 === 0);
    for (let n = 0; n < opened; n += 1) jobs.push(planJob(jobs.length, week, random));
  }
  jobs.push({ ...planJob(jobs.length, WEEKS - 1, random), statusNow: 'quoted', hoursLeft: new Map() });
  jobs.push({ ...planJob(jobs.length, WEEKS - 6, random), statusNow: 'lost', hoursLeft: new Map() });
  jobs.push({ ...planJob(jobs.length, WEEKS - 9, random), statusNow: 'cancelled', hoursLeft: new Map() });
  return jobs;
}

function planJob(index: number, week: number, random: Random): PlannedJob {
  const kind = random.pick(JOB_KINDS);
  const isLosing = index === LOSING_JOB;
  const hours = Math.round(random.between(70, 165));
  const weeks = Math.round(random.between(2, 5));
  const customer = CUSTOMERS[random.pick(kind.customers)] ?? null;
  const eagerness = random.between(0.92, 1.12);
  const plannedHours = new Map(Object.entries(kind.route).map(([code, share]) => [code, hours * share]));
  const job = {
    number: String(2200 + index),
    title: kind.title,
    customer,
    quantity: Math.max(4, Math.round((hours * (kind.route['FORM'] ?? 0.3) * kind.piecesPerHour) / 4) * 2),
    openedWeek: week,
    lastWeek: week + weeks,
    dueWeek: week + weeks + 1,
    isBillable: true,
    statusNow: statusNow(week + weeks),
    plannedHours,
    hoursLeft: new Map([...plannedHours].map(([code, planned]) => [code, planned * (isLosing ? 1.55 : 1)])),
    piecesPerHour: kind.piecesPerHour,
    isLosing,
    isBadLot: index === BAD_LOT_JOB,
    isSentOut: index % 5 < 2,
  };
  const estimate = planEstimate(job);
  if (!estimate) throw new Error(`There is no telling what ${job.title} cost.`);
  return {
    ...job,
    quotedPrice: quote(estimate, job.quantity, isLosing ? LOSING_SHARE : eagerness).toFixed(2),
  };
}

function statusNow(lastWeek: number): JobStatus {
  if (lastWeek < WEEKS - 3) return 'invoiced';
  return lastWeek < WEEKS - 1 ? 'finished' : 'open';
}

function upkeepJob(): PlannedJob {
  return {
    ...UPKEEP_JOB,
    customer: null,
    quantity: null,
    openedWeek: 0,
    lastWeek: WEEKS,
    dueWeek: WEEKS,
    quotedPrice: null,
    isBillable: false,
    statusNow: 'open',
    plannedHours: new Map(),
    hoursLeft: new Map(),
    piecesPerHour: 0,
    isLosing: false,
    isBadLot: false,
    isSentOut: false,
  };
}
