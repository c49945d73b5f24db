import { type CostCategory, type JobLine } from '@brakeven/contract';
import { type GridColumn } from '@brakeven/ui';
import { toSourceUrl } from '../workings/source-url';

const CATEGORY_WORDS: Readonly<Record<CostCategory, string>> = {
  labour: 'Labour',
  machine: 'Machine',
  overhead: 'Overhead',
  overtime: 'Overtime',
  material: 'Material',
  outside: 'Outside service',
  invoiced: 'Invoiced',
  earned: 'Earned',
  running: 'Running',
};

/** The word of a cost category. */
export function toCategoryWord(category: CostCategory): string {
  return CATEGORY_WORDS[category];
}

/** The columns of a job's cost lines, each with the cell it came from. */
export function toLineColumns(withMoney: boolean): GridColumn<JobLine>[] {
  return [...WORDS, ...(withMoney ? MONEY : []), SOURCE];
}

const WORDS: readonly GridColumn<JobLine>[] = [
  { id: 'workedOn', header: 'Date', kind: 'date', value: (line) => line.workedOn, width: 122 },
  { id: 'category', header: 'Category', value: (line) => toCategoryWord(line.category), width: 100 },
  { id: 'employee', header: 'Employee', value: (line) => line.employee, minWidth: 120, flex: 1 },
  { id: 'operation', header: 'Operation', value: (line) => line.operation, minWidth: 100, flex: 1 },
  { id: 'machine', header: 'Machine', value: (line) => line.machine, minWidth: 90, flex: 1 },
  { id: 'hours', header: 'Hours', kind: 'hours', value: (line) => line.hours, width: 86 },
];

const MONEY: readonly GridColumn<JobLine>[] = [
  { id: 'rate', header: 'Rate', kind: 'rate', value: (line) => line.rate, width: 96 },
  { id: 'rateFactor', header: '× burden', kind: 'number', value: (line) => line.rateFactor, width: 92 },
  { id: 'amount', header: 'Amount', kind: 'money', value: (line) => line.amount, width: 108 },
];

const SOURCE: GridColumn<JobLine> = {
  id: 'source',
  header: 'From',
  value: ({ source }) =>
    source ? `${source.cell} · ${source.sheet} · ${source.fileName}` : 'entered by hand',
  href: ({ source }) => source && toSourceUrl(source),
  minWidth: 200,
  flex: 2,
};
