import { type Locator, type Page } from 'playwright-core';

/** One import: what it brought, and the workbook as it came. */
export class ImportPage {
  readonly markedCell: Locator;

  constructor(private readonly page: Page) {
    this.markedCell = page.locator('app-sheet-excerpt-table td.marked');
  }

  /** The text of the cell that is marked in the workbook, without the address read out before it. */
  async readMarkedCell(): Promise<{ address: string; text: string }> {
    await this.markedCell.waitFor();
    const [, address = '', text = ''] =
      /Cell ([A-Z]+\d+):\s*(.*?)\s*$/s.exec((await this.markedCell.textContent()) ?? '') ?? [];
    return { address, text };
  }

  async undo(): Promise<void> {
    await this.page.getByRole('button', { name: 'Undo this import' }).click();
    await this.page
      .getByRole('alertdialog')
      .getByRole('button', { name: /^Take back/ })
      .click();
  }
}
