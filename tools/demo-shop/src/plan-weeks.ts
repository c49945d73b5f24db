import { type PlannedJob } from './plan-jobs';
import { type Random } from './random';
import { type Person, PEOPLE, PRESS_WEEK, UPKEEP_JOB, WEEKS } from './story';

/** One row of a week's timesheet, days counted from Monday. */
export interface PlannedEntry {
  day: number;
  employee: Person;
  job: PlannedJob;
  operation: string;
  /** Named only where it is not the operation's usual machine. */
  machine: string | null;
  quarterHours: number;
  good: number | null;
  scrap: number | null;
  note: string | null;
}

/** Hours on Press 2 that a week can fill: a slow start, a summer dip, a good autumn. */
function pressHours(week: number): number {
  const weeksIn = week - PRESS_WEEK;
  if (weeksIn < 0) return 0;
  const ramp = Math.min(1, 0.45 + weeksIn / 26);
  const season = weeksIn > 15 && weeksIn < 20 ? 0.68 : 1;
  return 16 * ramp * season;
}

/** Every week's entries, in the order in which the bookkeeper has them: by day, then by person. */
export function planWeeks(jobs: readonly PlannedJob[], random: Random): PlannedEntry[][] {
  return Array.from({ length: WEEKS }, (_, week) => planWeek(week, jobs, random));
}

function planWeek(week: number, jobs: readonly PlannedJob[], random: Random): PlannedEntry[] {
  const open = jobs.filter((job) => job.openedWeek <= week && week <= job.lastWeek && job.hoursLeft.size > 0);
  const upkeep = jobs.find((job) => job.number === UPKEEP_JOB.number);
  if (!upkeep) throw new Error('The upkeep job is missing.');
  const pressQuarterHoursPerDay = (pressHours(week) * 4 * random.between(0.82, 1.12)) / 5;
  const press = { left: 0 };
  const entries: PlannedEntry[] = [];
  for (let day = 0; day < 5; day += 1) {
    press.left += pressQuarterHoursPerDay;
    const ofDay = takeTurns(week + day).flatMap((employee) =>
      planDay({ week, day, employee, open, upkeep, press }, random),
    );
    entries.push(...ofDay.sort((a, b) => PEOPLE.indexOf(a.employee) - PEOPLE.indexOf(b.employee)));
  }
  return entries;
}

/** Whoever works, those who form taking turns at the press: the first of them finds it free. */
function takeTurns(turn: number): Person[] {
  const workers = PEOPLE.filter((person) => person.skills.length > 0);
  const formers = workers.filter((person) => person.skills[0] === 'FORM');
  const first = turn % formers.length;
  return [
    ...formers.slice(first),
    ...formers.slice(0, first),
    ...workers.filter((person) => !formers.includes(person)),
  ];
}

interface Day {
  week: number;
  day: number;
  employee: Person;
  open: readonly PlannedJob[];
  upkeep: PlannedJob;
  press: { left: number };
}

function planDay(at: Day, random: Random): PlannedEntry[] {
  if (random.chance(0.03)) return [];
  const isBusy = at.week > 28 && random.chance(0.3);
  let left = isBusy ? 38 : 32;
  const entries: PlannedEntry[] = [];
  while (left > 0) {
    const entry = planEntry(at, left, random);
    entries.push(entry);
    left -= entry.quarterHours;
  }
  return entries;
}

function planEntry(at: Day, quarterHoursLeft: number, random: Random): PlannedEntry {
  const quarterHours =
    quarterHoursLeft <= 10 ? quarterHoursLeft : Math.round(random.between(6, Math.min(20, quarterHoursLeft)));
  const base = { day: at.day, employee: at.employee, quarterHours };
  const work = findWork(at, quarterHours / 4, random);
  if (!work)
    return {
      ...base,
      job: at.upkeep,
      operation: 'ASSY',
      machine: null,
      good: null,
      scrap: null,
      note: random.pick(['Racks', 'Fixtures', 'Housekeeping', 'Oil and grease round']),
    };
  return { ...base, ...work, ...countPieces(work, quarterHours / 4, at.week, random) };
}

interface Work {
  job: PlannedJob;
  operation: string;
  machine: string | null;
}

/** What this person does next: the usual operation if an open job still needs it, else another one. */
function findWork(at: Day, hours: number, random: Random): Work | null {
  for (const operation of at.employee.skills) {
    const needing = at.open.filter((job) => (job.hoursLeft.get(operation) ?? 0) > 0.5);
    if (needing.length === 0) continue;
    const machine = operation === 'FORM' ? findPress(at, hours, random) : null;
    if (machine === 'none') continue;
    const job = random.pick(needing);
    job.hoursLeft.set(operation, (job.hoursLeft.get(operation) ?? 0) - hours);
    return { job, operation, machine };
  }
  return null;
}

function findPress(at: Day, hours: number, random: Random): 'P1' | 'none' | null {
  if (at.week < PRESS_WEEK) return 'P1';
  if (at.press.left > 0) {
    at.press.left -= hours * 4;
    return null;
  }
  return random.chance(0.35) ? 'P1' : 'none';
}

function countPieces(
  work: Work,
  hours: number,
  week: number,
  random: Random,
): Pick<PlannedEntry, 'good' | 'scrap' | 'note'> {
  if (work.operation !== 'FORM') return { good: null, scrap: null, note: null };
  const made = Math.max(1, Math.round(hours * work.job.piecesPerHour * random.between(0.8, 1.15)));
  const share = work.job.isBadLot ? 0.14 : Math.max(0.008, 0.045 - week * 0.0008);
  const scrap = Math.round(made * share * random.between(0, 2));
  const note = work.job.isBadLot && scrap > 2 ? 'Cracks on the bend, new sheet lot' : null;
  return {
    good: made - scrap,
    scrap,
    note: note ?? (work.job.isLosing && random.chance(0.3) ? 'Refit, drawing changed' : null),
  };
}
