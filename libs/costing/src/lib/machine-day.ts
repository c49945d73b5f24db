import { type Hours, type LocalDate, type Money } from '@brakeven/values';
import { isOfCategory, sumEntryHours } from './entry-hours';
import { type CostLine, isInService, type RateGap } from './entry-lines';
import { sumCategory } from './job-cost';

/** What one machine did on one day in service. */
export interface MachineDay {
  machineId: string;
  workedOn: LocalDate;
  /** All hours on the machine. */
  hours: Hours;
  /** Those on billable jobs. */
  billableHours: Hours;
  earned: Money;
  operatorLabour: Money;
  running: Money;
}

/** The lines and gaps of one machine on one day. */
interface DayTraces {
  machineId: string;
  workedOn: LocalDate;
  lines: CostLine[];
  gaps: RateGap[];
}

/**
 * Adds up lines by machine and day, from each machine's in-service date on; sorted by machine, then date. Give the
 * gaps too, so that hours without a rate still count as hours.
 * Rules in words: `RULES.earned`, `.operatorLabour`, `.running`.
 */
export function computeMachineDays(
  lines: readonly CostLine[],
  inServiceOn: ReadonlyMap<string, LocalDate | null>,
  gaps: readonly RateGap[] = [],
): MachineDay[] {
  const days = new Map<string, DayTraces>();
  for (const line of lines) findDay(days, line, inServiceOn)?.lines.push(line);
  for (const gap of gaps) findDay(days, gap, inServiceOn)?.gaps.push(gap);
  const keys = [...days.keys()].sort();
  return keys.flatMap((key) => days.get(key) ?? []).map(toMachineDay);
}

function findDay(
  days: Map<string, DayTraces>,
  { machineId, workedOn }: CostLine | RateGap,
  inServiceOn: ReadonlyMap<string, LocalDate | null>,
): DayTraces | undefined {
  if (machineId === null || !isInService(inServiceOn.get(machineId), workedOn)) return undefined;
  const key = `${machineId} ${workedOn}`;
  const day = days.get(key) ?? { machineId, workedOn, lines: [], gaps: [] };
  days.set(key, day);
  return day;
}

function toMachineDay({ machineId, workedOn, lines, gaps }: DayTraces): MachineDay {
  return {
    machineId,
    workedOn,
    hours: sumEntryHours(lines, gaps),
    billableHours: sumEntryHours(lines, gaps, isOfCategory('earned')),
    earned: sumCategory(lines, 'earned'),
    operatorLabour: sumCategory(lines, 'labour'),
    running: sumCategory(lines, 'running'),
  };
}
