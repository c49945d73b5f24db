/** Loads exceljs when a workbook is read or written: nothing else takes a program as long to start. */
export async function loadExceljs() {
  const { default: exceljs } = await import('exceljs');
  return exceljs;
}
