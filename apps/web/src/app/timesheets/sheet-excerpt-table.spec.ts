import { TestBed } from '@angular/core/testing';
import { type SheetExcerpt } from '@brakeven/contract';
import { SheetExcerptTable, toGrid } from './sheet-excerpt-table';

const excerpt: SheetExcerpt = {
  fileName: 'week 48.xlsx',
  sheet: 'Hours',
  columns: ['A', 'B', 'C'],
  rows: [
    { row: 4, cells: [{ address: 'A4', text: 'Date' }] },
    {
      row: 5,
      cells: [
        { address: 'A5', text: '2026-11-23' },
        { address: 'C5', text: '7.5' },
      ],
    },
  ],
};

describe('toGrid', () => {
  it('puts every cell under its letter and leaves the gaps empty', () => {
    expect(toGrid(excerpt)[1]?.cells.map(({ address, text }) => [address, text])).toEqual([
      ['A5', '2026-11-23'],
      ['B5', ''],
      ['C5', '7.5'],
    ]);
  });

  it('marks where rows are left out', () => {
    const rows = [1, 2, 7].map((row) => ({ row, cells: [] }));
    expect(toGrid({ columns: ['A'], rows }).map(({ isAfterGap }) => isAfterGap)).toEqual([
      false,
      false,
      true,
    ]);
  });

  it('sets numbers and durations at the right, dates and words at the left', () => {
    const row = {
      row: 1,
      cells: [
        { address: 'A1', text: '1,204.50' },
        { address: 'B1', text: '7:30' },
        { address: 'C1', text: 'Bo' },
      ],
    };
    expect(
      toGrid({ columns: ['A', 'B', 'C'], rows: [row] })[0]?.cells.map(({ isNumber }) => isNumber),
    ).toEqual([true, true, false]);
  });
});

describe('SheetExcerptTable', () => {
  it('marks the cell, also for those who do not see it', async () => {
    const fixture = TestBed.createComponent(SheetExcerptTable);
    fixture.componentRef.setInput('excerpt', excerpt);
    fixture.componentRef.setInput('cellMarked', 'C5');
    await fixture.whenStable();
    const marked = (fixture.nativeElement as HTMLElement).querySelectorAll('[aria-current]');
    expect(marked).toHaveLength(1);
    expect(marked[0]?.textContent?.replace(/\s+/g, ' ').trim()).toBe('Cell C5: 7.5');
  });
});
