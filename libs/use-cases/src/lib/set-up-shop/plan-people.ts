import { type SetupFile } from '@brakeven/workbook';
import { normaliseName } from '../import-timesheet/near-matches';
import { type SetupDraft } from './setup-draft';
import { toStoredNumber } from './stored-number';
import { type Verdict } from './table-plan';

type PersonRow = SetupFile['people'][number];

/** People and their pay rates: the first row of a number names the person, every row may state a rate. */
export function planPeople(draft: SetupDraft, rows: SetupFile['people']): void {
  const firstRows = new Map<string, PersonRow>();
  for (const row of rows) {
    const first = firstRows.get(normaliseName(row.number));
    if (!first) firstRows.set(normaliseName(row.number), row);
    else if (normaliseName(first.name) !== normaliseName(row.name)) {
      refuseOtherName(draft, row, first);
      continue;
    }
    const person = first
      ? null
      : draft.tables.employee.state(row.number, { name: row.name }, { number: row.number, isActive: true });
    const employeeId = person?.id ?? draft.tables.employee.findId(row.number);
    if (employeeId === undefined) continue;
    const rate = row.rateFrom === null ? null : planRate(draft, row, employeeId);
    draft.count('people', joinVerdicts(person?.verdict, rate));
  }
  warnOfMissingWages(draft, [...firstRows.values()]);
}

function refuseOtherName(draft: SetupDraft, row: PersonRow, first: PersonRow): void {
  const message = `Number ${row.number} is '${first.name}' in row ${first.row} and '${row.name}' here. Give each person a number of their own, or write the name the same way.`;
  draft.refuse('people', row, 'name', { code: 'name_differs', message });
}

function planRate(draft: SetupDraft, row: PersonRow, employeeId: string): Verdict | null {
  const key = `${employeeId}|${row.rateFrom}`;
  const { payRate } = draft.tables;
  if (payRate.hasStated(key)) {
    draft.refuseTwice('people', row, 'rateFrom', `A rate of number ${row.number} from ${row.rateFrom}`);
    return null;
  }
  const wage = { list: 'people', column: 'wagePerHour', form: 'rate' } as const;
  const burden = { list: 'people', column: 'burdenPercent', form: 'percent' } as const;
  const wagePerHour = toStoredNumber(draft, row, wage, row.wagePerHour);
  const burdenPercent = toStoredNumber(draft, row, burden, row.burdenPercent);
  const values = { employeeId, validFrom: row.rateFrom, wagePerHour, burdenPercent };
  return payRate.state(key, values).verdict;
}

/** A row that adds a rate adds; one that only renames or corrects changes. */
function joinVerdicts(person: Verdict | undefined, rate: Verdict | null): Verdict {
  const verdicts = [person, rate];
  return (['added', 'changed'] as const).find((verdict) => verdicts.includes(verdict)) ?? 'alreadyThere';
}

function warnOfMissingWages(draft: SetupDraft, people: readonly PersonRow[]): void {
  const paid = new Set(draft.tables.payRate.listRows().map(({ values }) => values['employeeId']));
  for (const row of people) {
    if (paid.has(draft.tables.employee.findId(row.number) ?? null)) continue;
    const message = `${row.name} has no wage yet; timesheet rows of number ${row.number} are refused until there is one.`;
    draft.warn('people', row, 'rateFrom', { code: 'wage_missing', message });
  }
}
