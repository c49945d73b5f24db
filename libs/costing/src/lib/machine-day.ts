import { type Hours, type LocalDate, type Money } from '@brakeven/values';
import { type GapHours, sumHoursOf } from './entry-hours';
import { isInService } from './entry-lines';
import { type JobCostLine, sumCategory } from './job-cost';

/** What one machine did on one day in service. */
export interface MachineDay {
  machineId: string;
  /** The day in the books where the lines have one, else the day of the work. */
  workedOn: LocalDate;
  /** All hours on the machine. */
  hours: Hours;
  /** Those on billable jobs. */
  billableHours: Hours;
  earned: Money;
  operatorLabour: Money;
  running: Money;
}

/** Where and when a line or a gap belongs. */
interface MachineTrace {
  machineId: string | null;
  workedOn: LocalDate;
  /** The day in the books; later than `workedOn` for what came late. */
  postedOn?: LocalDate;
}

/** What a line needs for a machine's day. */
export interface MachineDayLine extends JobCostLine, MachineTrace {}

/** What a gap needs for a machine's day. */
export interface MachineDayGap extends GapHours, MachineTrace {}

/** The lines and gaps of one machine on one day. */
interface DayTraces {
  machineId: string;
  workedOn: LocalDate;
  lines: MachineDayLine[];
  gaps: MachineDayGap[];
}

/**
 * Adds up lines by machine and day, from each machine's in-service date on; sorted by machine, then date. What came
 * late counts on its day in the books, if the work itself was done in service. Give the gaps too, so that hours
 * without a rate still count as hours.
 * Rules in words: `RULES.earned`, `.operatorLabour`, `.running`.
 */
export function computeMachineDays(
  lines: readonly MachineDayLine[],
  inServiceOn: ReadonlyMap<string, LocalDate | null>,
  gaps: readonly MachineDayGap[] = [],
): MachineDay[] {
  const days = new Map<string, DayTraces>();
  for (const line of lines) findDay(days, line, inServiceOn)?.lines.push(line);
  for (const gap of gaps) findDay(days, gap, inServiceOn)?.gaps.push(gap);
  const keys = [...days.keys()].sort();
  return keys.flatMap((key) => days.get(key) ?? []).map(toMachineDay);
}

function findDay(
  days: Map<string, DayTraces>,
  { machineId, workedOn, postedOn = workedOn }: MachineTrace,
  inServiceOn: ReadonlyMap<string, LocalDate | null>,
): DayTraces | undefined {
  if (machineId === null || !isInService(inServiceOn.get(machineId), workedOn)) return undefined;
  const key = `${machineId} ${postedOn}`;
  const day = days.get(key) ?? { machineId, workedOn: postedOn, lines: [], gaps: [] };
  days.set(key, day);
  return day;
}

function toMachineDay({ machineId, workedOn, lines, gaps }: DayTraces): MachineDay {
  return {
    machineId,
    workedOn,
    hours: sumHoursOf('labour', lines, gaps),
    billableHours: sumHoursOf('earned', lines, gaps),
    earned: sumCategory(lines, 'earned'),
    operatorLabour: sumCategory(lines, 'labour'),
    running: sumCategory(lines, 'running'),
  };
}
