import { themeQuartz } from 'ag-grid-community';

/** The grid's look, from the same tokens as everything else, so that it follows light and dark by itself. */
export const gridTheme = themeQuartz.withParams({
  accentColor: 'var(--layout-blue)',
  backgroundColor: 'var(--sheet)',
  foregroundColor: 'var(--ink)',
  textColor: 'var(--ink)',
  borderColor: 'var(--line)',
  browserColorScheme: 'inherit',
  cellHorizontalPadding: '10px',
  chromeBackgroundColor: 'var(--sheet)',
  columnBorder: false,
  dataFontSize: '13.5px',
  fontFamily: 'var(--font)',
  fontSize: '13.5px',
  headerBackgroundColor: 'var(--sheet)',
  headerFontSize: '12.5px',
  headerFontWeight: 500,
  headerHeight: '38px',
  headerTextColor: 'var(--ink-muted)',
  oddRowBackgroundColor: 'var(--sheet)',
  rowHeight: '38px',
  rowHoverColor: 'var(--sheet-sunken)',
  wrapperBorder: true,
  wrapperBorderRadius: 'var(--radius)',
});
