import { type EntryTotals, type TimeEntry } from '@brakeven/contract';
import { type GridColumn, type GridTotals } from '@brakeven/ui';
import { toSourceUrl } from '../workings/source-url';

/** Who looks, what they may do with an entry, and how much room there is. */
export interface EntryView {
  /** Whether more than one person's hours can be in the grid. */
  canSeeOthers: boolean;
  canOpenJobs: boolean;
  canOpenSources: boolean;
  /** On a telephone the hours stand next to the date. */
  isNarrow: boolean;
  /** Absent for those who may not void entries. */
  voidEntry?: (entry: TimeEntry) => void;
}

type EntryColumn = GridColumn<TimeEntry>;

const DATE: EntryColumn = {
  id: 'workedOn',
  header: 'Date',
  kind: 'date',
  value: (row) => row.workedOn,
  isSortable: true,
  width: 116,
};
const EMPLOYEE: EntryColumn = {
  id: 'employee',
  header: 'Employee',
  value: (row) => row.employee,
  isSortable: true,
  minWidth: 130,
  flex: 2,
};
const OPERATION: EntryColumn = {
  id: 'operation',
  header: 'Operation',
  value: (row) => row.operation,
  isSortable: true,
  minWidth: 100,
  flex: 1,
};
const MACHINE: EntryColumn = {
  id: 'machine',
  header: 'Machine',
  value: (row) => row.machine,
  isSortable: true,
  minWidth: 100,
  flex: 1,
};
const HOURS: EntryColumn = {
  id: 'hours',
  header: 'Hours',
  kind: 'hours',
  value: (row) => row.hours,
  isSortable: true,
  width: 84,
};
const GOOD: EntryColumn = {
  id: 'goodPieces',
  header: 'Good',
  kind: 'count',
  value: (row) => row.goodPieces,
  isSortable: true,
  width: 76,
};
const SCRAP: EntryColumn = {
  id: 'scrapPieces',
  header: 'Scrap',
  kind: 'count',
  value: (row) => row.scrapPieces,
  isSortable: true,
  width: 76,
};
const NOTE: EntryColumn = { id: 'note', header: 'Note', value: (row) => row.note, minWidth: 100, flex: 2 };

/** The columns of the hours grid; links only to pages that the role may open. */
export function toEntryColumns(view: EntryView): EntryColumn[] {
  const who = view.canSeeOthers ? [EMPLOYEE] : [];
  const work = [toJobColumn(view), OPERATION, MACHINE];
  const order = view.isNarrow ? [DATE, HOURS, ...who, ...work] : [DATE, ...who, ...work, HOURS];
  return [...order, GOOD, SCRAP, NOTE, toSourceColumn(view), ...listActionColumns(view)];
}

function toJobColumn({ canOpenJobs }: EntryView): EntryColumn {
  return {
    id: 'job',
    header: 'Job',
    value: (row) => `${row.jobNumber} ${row.jobTitle}`,
    href: (row) => (canOpenJobs ? `/jobs/${row.jobId}` : null),
    isSortable: true,
    minWidth: 150,
    flex: 3,
  };
}

function toSourceColumn({ canOpenSources }: EntryView): EntryColumn {
  return {
    id: 'source',
    header: 'From cell',
    value: ({ source }) => source && `${source.cell} · ${source.fileName}`,
    href: ({ source }) => (source && canOpenSources ? toSourceUrl(source) : null),
    minWidth: 130,
    flex: 2,
  };
}

function listActionColumns({ voidEntry }: EntryView): EntryColumn[] {
  if (!voidEntry) return [];
  const actions = (row: TimeEntry) => [{ label: 'Void', run: () => voidEntry(row) }];
  return [{ id: 'actions', header: 'Actions', value: () => null, actions, width: 84 }];
}

/** The totals row over all entries of the filter; the count stands where there is a column for words. */
export function toEntryTotals(totals: EntryTotals): GridTotals {
  const noun = totals.entries === 1 ? 'entry' : 'entries';
  return {
    workedOn: { value: 'Total', isText: true },
    job: { value: `${totals.entries.toLocaleString('en-US')} ${noun}`, isText: true },
    hours: { value: totals.hours },
    goodPieces: { value: totals.goodPieces },
    scrapPieces: { value: totals.scrapPieces },
  };
}
