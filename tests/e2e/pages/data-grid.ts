import { type Locator, type Page } from 'playwright-core';

/** A grid of the application: its rows, and the totals below them. */
export class DataGrid {
  readonly rows: Locator;
  readonly totals: Locator;

  constructor(page: Page, label: string) {
    const frame = page.getByRole('group', { name: label, exact: true });
    this.rows = frame.locator('.ag-grid-scrolling-container .ag-row:not(.ag-row-loading)');
    this.totals = frame.locator('.ag-grid-pinned-bottom-rows .ag-row');
  }

  cell(row: number, column: string): Locator {
    return this.rows.nth(row).locator(`[col-id="${column}"]`);
  }

  /** The texts of a column, as far as the grid has drawn its rows. */
  async listColumn(column: string): Promise<string[]> {
    await this.rows.first().waitFor();
    return (await this.rows.locator(`[col-id="${column}"]`).allTextContents()).map((text) => text.trim());
  }

  /** The total of a column, once it has come. */
  async readTotal(column: string): Promise<string> {
    const cell = this.totals.locator(`[col-id="${column}"]`).filter({ hasText: /\d/ });
    return ((await cell.textContent()) ?? '').trim();
  }
}
