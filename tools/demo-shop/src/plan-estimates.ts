import { D, massIn, sum } from '@brakeven/values';
import { KIND_COSTS, MATERIALS } from './cost-story';
import { weighPieces } from './piece-weight';
import { MACHINES, OPERATIONS, PRESS_WEEK } from './story';

export const SCRAP_ALLOWANCE_PERCENT = 3;
export const WANTED_MARGIN_PERCENT = 18;
/** An hour with burden and its overhead, as the shop reckons when it quotes. */
const LABOUR_AND_OVERHEAD = 33.6 + 21.4;

/** What the shop knows of a job when it estimates it. */
export interface JobToEstimate {
  title: string;
  quantity: number | null;
  openedWeek: number;
  /** Hours by operation. */
  plannedHours: ReadonlyMap<string, number>;
  isSentOut: boolean;
}

export interface EstimatedOperation {
  operation: string;
  machine: string | null;
  setupHours: number;
  minutesPerPiece: number;
}

/** What the shop reckoned for a job before it began. */
export interface PlannedEstimate {
  operations: readonly EstimatedOperation[];
  pounds: number;
  dollarsPerLb: number;
  outside: { description: string; dollars: number } | null;
}

/** The estimate of a job with a route: a twelfth of each operation's hours to set up, the rest by the piece. */
export function planEstimate(job: JobToEstimate): PlannedEstimate | null {
  const costs = KIND_COSTS[job.title];
  const { quantity } = job;
  if (!costs || quantity === null) return null;
  const operations = [...job.plannedHours].map(([operation, hours]) => {
    const setupHours = Math.max(0.25, Math.round((hours / 12) * 4) / 4);
    const minutesPerPiece = Math.max(0.1, Math.round(((hours - setupHours) * 600) / quantity) / 10);
    const machine = findMachine(operation, job.openedWeek);
    return { operation, machine, setupHours, minutesPerPiece };
  });
  const outside = job.isSentOut && costs.outside;
  return {
    operations,
    pounds: Math.round(massIn(weighPieces(costs, quantity), 'lb').toNumber()),
    dollarsPerLb: MATERIALS[costs.material].dollarsPerLb,
    outside: outside
      ? { description: outside.description, dollars: Math.round(quantity * outside.dollarsPerPiece) }
      : null,
  };
}

/** The operation's own machine; before the new press was there, the old one. */
function findMachine(operation: string, week: number): string | null {
  if (operation === 'FORM' && week < PRESS_WEEK) return 'P1';
  return OPERATIONS.find(({ code }) => code === operation)?.machine ?? null;
}

/** What the shop asks for a job: the price that leaves the wanted margin, more or less, to the ten dollars. */
export function quote(
  { operations, pounds, dollarsPerLb, outside }: PlannedEstimate,
  quantity: number,
  eagerness: number,
): number {
  const hours = operations.map(
    ({ setupHours, minutesPerPiece }) => setupHours + (minutesPerPiece * quantity * 1.03) / 60,
  );
  const work = operations.map(({ machine }, index) => {
    const rate = MACHINES.find(({ code }) => code === machine)?.machineHourRate ?? '0';
    return D(hours[index] ?? 0).times(D(rate).plus(LABOUR_AND_OVERHEAD));
  });
  const cost = sum(work)
    .plus(pounds * 1.03 * dollarsPerLb)
    .plus(outside?.dollars ?? 0);
  return Math.round((cost.toNumber() / (1 - WANTED_MARGIN_PERCENT / 100) / 10) * eagerness) * 10;
}
