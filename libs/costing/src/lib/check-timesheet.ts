import {
  D,
  type DecimalInput,
  formatHours,
  formatLocalDate,
  type Hours,
  type LocalDate,
  sum,
  toHours,
} from '@brakeven/values';

/** Columns of a timesheet row that a problem can point at. */
export type TimesheetField =
  'date' | 'employee' | 'job' | 'operation' | 'machine' | 'hours' | 'good' | 'scrap';

/** A row whose cells were read and whose names were found, before the rules are asked. */
export interface TimesheetCandidate {
  row: number;
  source: { sheet: string; cells: Partial<Record<TimesheetField, string>> };
  workedOn: LocalDate;
  employeeId: string;
  /** The employee's first pay rate; null if there is none at all. */
  firstRateOn: LocalDate | null;
  jobNumber: string;
  jobStatus: string;
  hours: Hours;
  good: DecimalInput | null;
  scrap: DecimalInput | null;
  /** True if the entry is stored already (see `matchByNaturalKey`): it is left alone, and not counted twice. */
  isAlreadyThere?: boolean;
}

/** What the checks need to know. */
export interface TimesheetCheckInput {
  candidates: readonly TimesheetCandidate[];
  /** Today where the shop is. */
  today: LocalDate;
  /** Hours stored for an employee and day, by `employeeDayKey`; a key that is absent has none. */
  hoursOnFile: ReadonlyMap<string, Hours>;
}

/** Codes of the rules that a readable row can break. */
export type TimesheetProblemCode =
  | 'hours_not_positive'
  | 'hours_over_24'
  | 'day_over_24'
  | 'future_date'
  | 'before_first_rate'
  | 'job_not_open'
  | 'pieces_negative'
  | 'pieces_not_whole';

/** A rule that a row breaks; a refused row does not go in, a warned one does. */
export interface TimesheetProblem {
  code: TimesheetProblemCode;
  severity: 'refused' | 'warning';
  message: string;
  row: number;
  field: TimesheetField;
  sheet: string;
  /** The cell, such as 'F12'; null if the row has no such cell. */
  cell: string | null;
}

/** The key of an employee's day in `hoursOnFile`. */
export function employeeDayKey(employeeId: string, workedOn: LocalDate): string {
  return `${employeeId}|${workedOn}`;
}

/**
 * Asks every rule of every row that is not stored already. Problems come in the order of the rows. A row whose own
 * hours are refused does not count towards its employee's day.
 */
export function checkTimesheet(input: TimesheetCheckInput): TimesheetProblem[] {
  const fresh = input.candidates.filter((candidate) => !candidate.isAlreadyThere);
  const dayTotals = sumDays(fresh, input.hoursOnFile);
  return fresh.flatMap((candidate) => [
    ...checkHours(candidate),
    ...checkDay(candidate, dayTotals),
    ...checkDate(candidate, input.today),
    ...checkFirstRate(candidate),
    ...checkJob(candidate),
    ...checkPieces(candidate, 'good'),
    ...checkPieces(candidate, 'scrap'),
  ]);
}

const HOURS_PER_DAY = D(24);

/** An employee's day: what is stored, and what this file adds. */
interface DayTotal {
  onFile: Hours | undefined;
  inFile: Hours;
}

function checkHours(candidate: TimesheetCandidate): TimesheetProblem[] {
  const { hours } = candidate;
  const accepted = 'Write hours above 0 and up to 24, such as 7.5 or 7:30.';
  if (hours.lte(0)) {
    return [
      refuse(
        candidate,
        'hours',
        'hours_not_positive',
        `${formatHours(hours)} hours is not work. ${accepted}`,
      ),
    ];
  }
  if (hours.lte(HOURS_PER_DAY)) return [];
  const message = `${formatHours(hours)} hours do not fit into a day. ${accepted}`;
  return [refuse(candidate, 'hours', 'hours_over_24', message)];
}

function sumDays(
  fresh: readonly TimesheetCandidate[],
  hoursOnFile: ReadonlyMap<string, Hours>,
): Map<string, DayTotal> {
  const totals = new Map<string, DayTotal>();
  for (const candidate of fresh) {
    if (checkHours(candidate).length > 0) continue;
    const key = employeeDayKey(candidate.employeeId, candidate.workedOn);
    const total = totals.get(key) ?? { onFile: hoursOnFile.get(key), inFile: toHours(0) };
    totals.set(key, { ...total, inFile: sum([total.inFile, candidate.hours]) });
  }
  return totals;
}

function checkDay(candidate: TimesheetCandidate, totals: ReadonlyMap<string, DayTotal>): TimesheetProblem[] {
  const total = totals.get(employeeDayKey(candidate.employeeId, candidate.workedOn));
  if (!total || checkHours(candidate).length > 0) return [];
  const { inFile, onFile } = total;
  const whole = onFile ? sum([inFile, onFile]) : inFile;
  if (whole.lte(HOURS_PER_DAY)) return [];
  const parts = onFile ? ` (${formatHours(inFile)} new in this file, ${formatHours(onFile)} on file)` : '';
  const day = formatLocalDate(candidate.workedOn, 'weekday');
  const message = `This employee's ${day} adds up to ${formatHours(whole)} hours${parts}; a day has 24. Correct the hours or the date of one of its rows.`;
  return [refuse(candidate, 'hours', 'day_over_24', message)];
}

function checkDate(candidate: TimesheetCandidate, today: LocalDate): TimesheetProblem[] {
  if (candidate.workedOn <= today) return [];
  const message = `${formatLocalDate(candidate.workedOn)} has not come yet (today is ${formatLocalDate(today)}). Correct the date, or import the row when the work is done.`;
  return [refuse(candidate, 'date', 'future_date', message)];
}

function checkFirstRate(candidate: TimesheetCandidate): TimesheetProblem[] {
  const { firstRateOn, workedOn } = candidate;
  if (firstRateOn !== null && workedOn >= firstRateOn) return [];
  const since =
    firstRateOn === null
      ? 'This employee has no wage yet'
      : `This employee's first wage is valid from ${formatLocalDate(firstRateOn)}`;
  const message = `${since}, so work on ${formatLocalDate(workedOn)} cannot be costed. Correct the date, or add the wage under People & rates.`;
  return [refuse(candidate, 'date', 'before_first_rate', message)];
}

function checkJob(candidate: TimesheetCandidate): TimesheetProblem[] {
  if (candidate.jobStatus === 'open') return [];
  const message = `Job ${candidate.jobNumber} is ${candidate.jobStatus}, not open. The row goes in; check that the job number is right.`;
  return [{ ...refuse(candidate, 'job', 'job_not_open', message), severity: 'warning' }];
}

function checkPieces(candidate: TimesheetCandidate, field: 'good' | 'scrap'): TimesheetProblem[] {
  const given = candidate[field];
  if (given === null) return [];
  const pieces = D(given);
  const accepted = 'Write whole pieces such as 12, or leave the cell empty.';
  if (pieces.lt(0)) {
    return [
      refuse(candidate, field, 'pieces_negative', `${pieces.toFixed()} pieces is below 0. ${accepted}`),
    ];
  }
  if (pieces.isInteger()) return [];
  return [
    refuse(candidate, field, 'pieces_not_whole', `${pieces.toFixed()} is not a whole number. ${accepted}`),
  ];
}

function refuse(
  { row, source }: TimesheetCandidate,
  field: TimesheetField,
  code: TimesheetProblemCode,
  message: string,
): TimesheetProblem {
  return {
    code,
    severity: 'refused',
    message,
    row,
    field,
    sheet: source.sheet,
    cell: source.cells[field] ?? null,
  };
}
