import { type CostCategory, type JobLine } from '@brakeven/contract';
import {
  type GridColumn,
  type GridNote,
  type ShopFormat,
  toLineRateText,
  toPostingNote,
  toQuantityText,
} from '@brakeven/ui';
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
export function toLineColumns(withMoney: boolean, format: ShopFormat): GridColumn<JobLine>[] {
  const quantity: GridColumn<JobLine> = {
    id: 'quantity',
    header: 'Quantity',
    kind: 'number',
    value: (line) => toQuantityText(line, format),
    width: 100,
  };
  const rate: GridColumn<JobLine> = {
    id: 'rate',
    header: 'Rate',
    kind: 'number',
    value: (line) => toLineRateText(line, format),
    width: 118,
  };
  return [...WORDS, quantity, ...(withMoney ? [rate, ...MONEY] : []), SOURCE];
}

const WORDS: readonly GridColumn<JobLine>[] = [
  { id: 'workedOn', header: 'Date', kind: 'date', value: (line) => line.workedOn, width: 122 },
  { id: 'category', header: 'Category', value: (line) => toCategoryWord(line.category), width: 100 },
  {
    id: 'label',
    header: 'Who or what',
    value: ({ label, detail }) => (detail === null ? label : `${label}, ${detail}`),
    note: toLateNote,
    minWidth: 130,
    flex: 2,
  },
  { id: 'operation', header: 'Operation', value: (line) => line.operation, minWidth: 96, flex: 1 },
  { id: 'machine', header: 'Machine', value: (line) => line.machine, minWidth: 86, flex: 1 },
];

const MONEY: readonly GridColumn<JobLine>[] = [
  { id: 'rateFactor', header: '× burden', kind: 'number', value: (line) => line.rateFactor, width: 86 },
  {
    id: 'amount',
    header: 'Amount',
    kind: 'money',
    value: (line) => line.amount,
    figure: (line) => line.figure ?? null,
    width: 108,
  },
];

/** A line of a closed month stands where it was posted; what it takes back is told by its workings too. */
function toLateNote(line: JobLine): GridNote | null {
  const text = toPostingNote(line);
  return text === '' ? null : { severity: 'warning', text };
}

const SOURCE: GridColumn<JobLine> = {
  id: 'source',
  header: 'From',
  value: ({ source }) => (source ? `${source.cell} · ${source.sheet} · ${source.fileName}` : 'no timesheet'),
  href: ({ source }) => source && toSourceUrl(source),
  minWidth: 200,
  flex: 2,
};
