import { type TimesheetField } from '@brakeven/contract';
import { toPlainHeader } from './header-text';

/**
 * How the columns of timesheets are headed, the surest wording first. Wordings that split the hours (regular,
 * overtime) are left out on purpose: taking one of them would lose the other.
 */
const HEADER_WORDS: Readonly<Record<TimesheetField, readonly string[]>> = {
  date: [
    ...[
      'date',
      'work date',
      'date worked',
      'worked on',
      'date of work',
      'shift date',
      'entry date',
      'log date',
    ],
    ...['timesheet date', 'production date', 'date performed', 'wk date', 'day worked', 'day'],
    ...['labor date', 'labour date', 'clock date', 'job date', 'work day', 'day of work', 'dates'],
  ],
  employee: [
    ...[
      'employee',
      'employee no',
      'employee id',
      'employee code',
      'emp no',
      'emp id',
      'emp',
      'empl no',
      'ee no',
    ],
    ...['clock no', 'badge no', 'badge', 'payroll no', 'staff no', 'worker no', 'operator no', 'operator id'],
    ...['worker id', 'personnel no', 'employee name', 'emp name', 'worker', 'worker name', 'operator'],
    ...[
      'operator name',
      'staff',
      'staff name',
      'team member',
      'associate',
      'technician',
      'person',
      'full name',
    ],
    ...['name', 'who'],
    ...['emp code', 'empl', 'empl id', 'empl name', 'ee', 'ee id', 'badge id', 'clock id', 'payroll id'],
    ...['staff id', 'operator code', 'worker code', 'crew member', 'tech', 'technician name', 'person name'],
    ...['worked by', 'done by', 'performed by'],
  ],
  job: [
    ...['job', 'job no', 'job id', 'job code', 'job ref', 'job reference', 'job order', 'job order no'],
    ...['work order', 'work order no', 'work order id', 'wo', 'wo no', 'w o', 'shop order', 'shop order no'],
    ...['order', 'order no', 'project', 'project no', 'project code', 'traveler', 'traveler no', 'traveller'],
    ...['traveller no', 'ticket', 'ticket no', 'job name'],
    ...['jobs', 'wo id', 'works order', 'works order no', 'mfg order', 'mfg order no', 'production order'],
    ...['production order no', 'prod order', 'prod order no', 'manufacturing order', 'order ref', 'order id'],
    ...[
      'job card',
      'job card no',
      'job ticket',
      'job ticket no',
      'work ticket',
      'project id',
      'project name',
    ],
  ],
  operation: [
    ...['operation', 'operation code', 'operation no', 'operation id', 'op', 'op code', 'op no', 'oper'],
    ...[
      'operation name',
      'task',
      'task code',
      'task no',
      'activity',
      'activity code',
      'process',
      'process code',
    ],
    ...['work code', 'labor code', 'labour code', 'type of work', 'work type', 'kind of work', 'work done'],
    ...['work performed', 'step', 'cost code'],
    ...['opn', 'opn no', 'opn code', 'op id', 'op name', 'oper no', 'oper code', 'oper name', 'task name'],
    ...[
      'process name',
      'process step',
      'activity name',
      'operation step',
      'work step',
      'step no',
      'job step',
    ],
    ...['labor type', 'labour type'],
  ],
  machine: [
    ...['machine', 'machine no', 'machine code', 'machine id', 'machine name', 'machine used', 'press'],
    ...['press no', 'press brake', 'brake', 'equipment', 'equipment no', 'equipment id', 'work center'],
    ...['work centre', 'workcenter no', 'asset', 'asset no', 'station', 'resource', 'tool'],
    ...['mach', 'mach no', 'mach id', 'mach code', 'mach name', 'm/c', 'm/c no', 'm/c id', 'm/c code'],
    ...['machine center', 'machine centre', 'machine tool', 'equip', 'equip no', 'equip id', 'equip code'],
    ...['equip name', 'equipment code', 'equipment name', 'equipment used', 'press id', 'press used'],
    ...['press brake no', 'brake no', 'brake id', 'work center id', 'work center code', 'work centre no'],
    ...['work centre id', 'work centre code', 'work ctr', 'work ctr no', 'workstation', 'workstation no'],
    ...['station no', 'station id', 'resource no', 'resource id', 'asset id', 'asset tag'],
  ],
  hours: [
    ...[
      'hours',
      'hours worked',
      'hrs',
      'hrs worked',
      'hour',
      'hr',
      'worked hours',
      'work hours',
      'labor hours',
    ],
    ...['labour hours', 'man hours', 'total hours', 'total hrs', 'hours total', 'no of hours', 'time worked'],
    ...['time spent', 'duration', 'elapsed time', 'elapsed', 'h', 'time'],
    ...['hours spent', 'hrs spent', 'working hours', 'work hrs', 'labor hrs', 'labour hrs', 'man hrs'],
    ...['tot hrs', 'tot hours', 'hrs total', 'actual hours', 'actual hrs', 'act hrs', 'hours on job'],
    ...['job hours', 'job hrs', 'no of hrs', 'total time', 'time in hours', 'time hrs', 'labor time'],
    ...['labour time', 'work time', 'working time'],
  ],
  good: [
    ...[
      'good',
      'good qty',
      'qty good',
      'good quantity',
      'quantity good',
      'good pcs',
      'pcs good',
      'good pieces',
    ],
    ...['good parts', 'parts good', 'good count', 'ok', 'ok qty', 'qty ok', 'pieces good', 'qty made'],
    ...['qty produced', 'qty completed', 'qty complete', 'qty done', 'produced', 'made', 'completed'],
    ...[
      'parts made',
      'pieces made',
      'pcs made',
      'parts produced',
      'pieces',
      'pcs',
      'parts',
      'qty',
      'quantity',
    ],
    ...['good pc', 'good units', 'units good', 'pcs ok', 'ok pcs', 'parts ok', 'ok parts', 'accepted'],
    ...['qty accepted', 'pcs completed', 'pcs complete', 'pieces completed', 'pieces complete'],
    ...['parts completed', 'parts complete', 'pcs produced', 'pieces produced', 'pcs done', 'pieces done'],
    ...['parts done', 'qty run', 'no of pieces', 'no of pcs', 'no of parts', 'piece count', 'part count'],
  ],
  scrap: [
    ...['scrap', 'scrap qty', 'qty scrap', 'scrap quantity', 'quantity scrap', 'scrapped', 'qty scrapped'],
    ...[
      'scrap pcs',
      'scrap pieces',
      'scrap parts',
      'scrap count',
      'rejects',
      'reject',
      'rejected',
      'reject qty',
    ],
    ...['qty rejected', 'rejected qty', 'qty reject', 'bad', 'bad pcs', 'bad parts', 'bad pieces', 'bad qty'],
    ...['qty bad', 'defects', 'defective', 'spoiled', 'spoilage', 'waste', 'ng'],
    ...['scrap pc', 'scrap units', 'pcs scrap', 'pcs scrapped', 'pieces scrapped', 'parts scrapped'],
    ...['pieces scrap', 'parts scrap', 'scr', 'rej', 'rej qty', 'qty rej', 'pcs rejected', 'parts rejected'],
    ...['pieces rejected', 'reject pcs', 'defect', 'defect qty', 'defective qty', 'nok', 'not ok', 'no good'],
  ],
  note: [
    ...['note', 'notes', 'remark', 'remarks', 'comment', 'comments', 'memo', 'details', 'work description'],
    ...['description'],
    ...['desc', 'work notes', 'job notes', 'shop notes', 'operator notes', 'operator comments', 'detail'],
  ],
};

const RANKS = new Map<string, { field: TimesheetField; rank: number }>(
  Object.entries(HEADER_WORDS).flatMap(([field, words]) =>
    words.map((word, rank) => [toPlainHeader(word), { field: field as TimesheetField, rank }] as const),
  ),
);

/** The field that a header names, and how sure that is (0 is surest); null when the wording is not known. */
export function findHeaderField(text: string): { field: TimesheetField; rank: number } | null {
  const whole = RANKS.get(toPlainHeader(text));
  if (whole) return whole;
  const parts = text.split(/[/&]|\b(?:or|and)\b/i).map((part) => RANKS.get(toPlainHeader(part)));
  const [first] = parts;
  return first && parts.every((part) => part?.field === first.field) ? first : null;
}

/** The surest wordings of a field, for telling what was looked for. */
export function listHeaderExamples(field: TimesheetField): string {
  return HEADER_WORDS[field].slice(0, 3).join(', ');
}
