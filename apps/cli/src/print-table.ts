export interface Column<T> {
  title: string;
  of: (row: T) => string;
  /** Figures stand to the right. */
  isFigure?: true;
}

/** Rows under their titles, columns two spaces apart. */
export function printTable<T>(rows: readonly T[], columns: readonly Column<T>[]): string {
  const cells = [columns.map(({ title }) => title), ...rows.map((row) => columns.map(({ of }) => of(row)))];
  const widths = columns.map((_, at) => Math.max(...cells.map((line) => (line[at] ?? '').length)));
  return cells
    .map((line) =>
      line
        .map((text, at) =>
          columns[at]?.isFigure ? text.padStart(widths[at] ?? 0) : text.padEnd(widths[at] ?? 0),
        )
        .join('  ')
        .trimEnd(),
    )
    .join('\n');
}

/** Names with what belongs to them, one a line, the second column aligned. */
export function printPairs(pairs: readonly (readonly [string, string])[]): string {
  const width = Math.max(...pairs.map(([name]) => name.length));
  return pairs.map(([name, text]) => `${name.padEnd(width)}  ${text}`).join('\n');
}
