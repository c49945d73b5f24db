import { type EntryTotals, type TimeEntry } from '@brakeven/contract';
import { type GridColumn, type GridTotals } from '@brakeven/ui';
import { toSourceUrl } from '../workings/source-url';

/** What whoever looks may do with an entry. */
export interface EntryRights {
  canOpenJobs: boolean;
  canOpenSources: boolean;
  /** Absent for those who may not void entries. */
  voidEntry?: (entry: TimeEntry) => void;
}

/** The columns of the hours grid; links only to pages that the role may open. */
export function toEntryColumns({
  canOpenJobs,
  canOpenSources,
  voidEntry,
}: EntryRights): GridColumn<TimeEntry>[] {
  const columns: GridColumn<TimeEntry>[] = [
    {
      id: 'workedOn',
      header: 'Date',
      kind: 'date',
      value: (row) => row.workedOn,
      isSortable: true,
      width: 126,
    },
    {
      id: 'employee',
      header: 'Employee',
      value: (row) => row.employee,
      isSortable: true,
      minWidth: 130,
      flex: 2,
    },
    {
      id: 'job',
      header: 'Job',
      value: (row) => `${row.jobNumber} ${row.jobTitle}`,
      href: (row) => (canOpenJobs ? `/jobs/${row.jobId}` : null),
      isSortable: true,
      minWidth: 150,
      flex: 3,
    },
    {
      id: 'operation',
      header: 'Operation',
      value: (row) => row.operation,
      isSortable: true,
      minWidth: 100,
      flex: 1,
    },
    {
      id: 'machine',
      header: 'Machine',
      value: (row) => row.machine,
      isSortable: true,
      minWidth: 100,
      flex: 1,
    },
    { id: 'hours', header: 'Hours', kind: 'hours', value: (row) => row.hours, isSortable: true, width: 92 },
    {
      id: 'goodPieces',
      header: 'Good',
      kind: 'count',
      value: (row) => row.goodPieces,
      isSortable: true,
      width: 84,
    },
    {
      id: 'scrapPieces',
      header: 'Scrap',
      kind: 'count',
      value: (row) => row.scrapPieces,
      isSortable: true,
      width: 84,
    },
    { id: 'note', header: 'Note', value: (row) => row.note, minWidth: 110, flex: 2 },
    {
      id: 'source',
      header: 'From cell',
      value: ({ source }) => source && `${source.cell} · ${source.fileName}`,
      href: ({ source }) => (source && canOpenSources ? toSourceUrl(source) : null),
      minWidth: 130,
      flex: 2,
    },
  ];
  if (!voidEntry) return columns;
  return [
    ...columns,
    {
      id: 'actions',
      header: '',
      value: () => null,
      actions: (row) => [{ label: 'Void', run: () => voidEntry(row) }],
      width: 84,
    },
  ];
}

/** The totals row over all entries of the filter. */
export function toEntryTotals(totals: EntryTotals): GridTotals {
  const noun = totals.entries === 1 ? 'entry' : 'entries';
  return {
    workedOn: { value: 'Total', isText: true },
    employee: { value: `${totals.entries.toLocaleString('en-US')} ${noun}`, isText: true },
    hours: { value: totals.hours },
    goodPieces: { value: totals.goodPieces },
    scrapPieces: { value: totals.scrapPieces },
  };
}
