import { type TimeEntry } from '@brakeven/contract';
import { toEntryColumns, toEntryTotals } from './entry-columns';

const entry = {
  entryId: 'e1',
  jobId: 'j1',
  jobNumber: '2231',
  jobTitle: 'Conveyor guards',
  source: { importId: 'i1', fileName: 'week 48.xlsx', sheet: 'Hours', row: 12, cell: 'F12' },
} as TimeEntry;
const column = (rights: Parameters<typeof toEntryColumns>[0], id: string) =>
  toEntryColumns(rights).find((one) => one.id === id);

describe('toEntryColumns', () => {
  const all = {
    canSeeOthers: true,
    canOpenJobs: true,
    canOpenSources: true,
    isNarrow: false,
    voidEntry: jest.fn(),
  };
  const operator = { canSeeOthers: false, canOpenJobs: false, canOpenSources: false, isNarrow: true };

  it('leads to the job and to the cell of the workbook', () => {
    expect(column(all, 'job')?.href?.(entry)).toBe('/jobs/j1');
    expect(column(all, 'source')?.href?.(entry)).toBe('/timesheets/i1?sheet=Hours&row=12&cell=F12');
  });

  it('gives an operator the words without links, and no way to void', () => {
    expect(column(operator, 'job')?.href?.(entry)).toBeNull();
    expect(column(operator, 'source')?.href?.(entry)).toBeNull();
    expect(column(operator, 'source')?.value(entry)).toBe('F12 · week 48.xlsx');
    expect(column(operator, 'actions')).toBeUndefined();
  });

  it('puts the hours beside the date on a telephone, and leaves out who it is where there is only one', () => {
    const ids = (view: Parameters<typeof toEntryColumns>[0]) => toEntryColumns(view).map(({ id }) => id);
    expect(ids(operator).slice(0, 3)).toEqual(['workedOn', 'hours', 'job']);
    expect(ids(all).slice(0, 3)).toEqual(['workedOn', 'employee', 'job']);
  });

  it('voids the entry of the row', () => {
    column(all, 'actions')?.actions?.(entry)[0]?.run();
    expect(all.voidEntry).toHaveBeenCalledWith(entry);
  });
});

describe('toEntryTotals', () => {
  it('counts the entries in words and sums the rest by column', () => {
    const totals = toEntryTotals({ entries: 1204, hours: '8123.5000', goodPieces: 9000, scrapPieces: 31 });
    expect(totals['job']?.value).toBe('1,204 entries');
    expect(totals['hours']?.value).toBe('8123.5000');
  });
});
