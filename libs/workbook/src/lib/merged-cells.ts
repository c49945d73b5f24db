import { columnNumber, rowOf } from './cell-address';

interface MergedRange {
  readonly top: number;
  readonly bottom: number;
  readonly left: number;
  readonly right: number;
}

/**
 * Tells which cells lie under a merged cell: all of its range but the top left one. Such a cell may still hold a
 * value that nobody sees.
 */
export function listCoveredCells(merges: readonly string[]): (address: string) => boolean {
  if (merges.length === 0) return () => false;
  const ranges = merges.map(toRange).sort((a, b) => a.top - b.top);
  const tallest = ranges.reduce((most, { top, bottom }) => Math.max(most, bottom - top), 0);
  return (address) => {
    const row = rowOf(address);
    const column = columnNumber(address);
    for (let index = firstFrom(ranges, row - tallest); index < ranges.length; index += 1) {
      const range = ranges[index];
      if (!range || range.top > row) return false;
      if (covers(range, row, column)) return true;
    }
    return false;
  };
}

function covers({ top, bottom, left, right }: MergedRange, row: number, column: number): boolean {
  const isInside = row >= top && row <= bottom && column >= left && column <= right;
  return isInside && !(row === top && column === left);
}

/** Index of the first range whose top is `row` or below. */
function firstFrom(ranges: readonly MergedRange[], row: number): number {
  let low = 0;
  let high = ranges.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((ranges[middle]?.top ?? 0) < row) low = middle + 1;
    else high = middle;
  }
  return low;
}

function toRange(text: string): MergedRange {
  const [from = '', to = from] = text.split(':');
  return { top: rowOf(from), bottom: rowOf(to), left: columnNumber(from), right: columnNumber(to) };
}
