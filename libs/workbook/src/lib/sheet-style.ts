import { type Borders, type Fill, type Font } from 'exceljs';

/** How the workbooks that we write look: the product's layout blue on a quiet grey. */
export const TITLE_FONT: Partial<Font> = {
  name: 'Calibri',
  size: 16,
  bold: true,
  color: { argb: 'FF14171C' },
};
export const QUIET_FONT: Partial<Font> = { name: 'Calibri', size: 11, color: { argb: 'FF5A6270' } };
export const HEADER_FONT: Partial<Font> = {
  name: 'Calibri',
  size: 11,
  bold: true,
  color: { argb: 'FFFFFFFF' },
};
export const TOTAL_FONT: Partial<Font> = { name: 'Calibri', size: 11, bold: true };
export const HEADER_FILL: Fill = { type: 'pattern', pattern: 'solid', fgColor: { argb: 'FF27348B' } };
export const TOTAL_BORDER: Partial<Borders> = { top: { style: 'thin' }, bottom: { style: 'double' } };

export const DATE_FORMAT = 'yyyy-mm-dd';
export const MONEY_FORMAT = '#,##0.00';
export const RATE_FORMAT = '#,##0.00####';
export const HOURS_FORMAT = '0.00##';
export const DURATION_FORMAT = '[h]:mm:ss';
export const WHOLE_FORMAT = '0';
export const TEXT_FORMAT = '@';
