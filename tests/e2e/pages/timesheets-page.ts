import { type Locator, type Page } from 'playwright-core';

/** Where the week's workbook is dropped, settled and added. */
export class TimesheetsPage {
  readonly problems: Locator;

  constructor(private readonly page: Page) {
    this.problems = page.locator('app-check-table .problem');
  }

  /** Gives the page a workbook, as the button that chooses a file does. */
  async giveFile(name: string, bytes: Buffer): Promise<void> {
    const mimeType = 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet';
    await this.page
      .locator('app-file-drop input[type=file]')
      .setInputFiles({ name, mimeType, buffer: bytes });
  }

  async mapColumn(field: string, column: string): Promise<void> {
    await this.page.getByLabel(`Column for ${field}`).selectOption(column);
  }

  async chooseName(spelling: string, label: string | RegExp): Promise<void> {
    await this.page
      .locator('app-problem-panel')
      .getByRole('group', { name: `What “${spelling}” stands for` })
      .getByRole('button', { name: label })
      .click();
  }

  /** The problems shown in place, each as its cell with the words for it. */
  async listProblems(): Promise<{ cell: string; message: string }[]> {
    return this.problems.evaluateAll((items) =>
      items.map((item) => ({
        cell: item.querySelector('.cell')?.textContent?.trim() ?? '',
        message: item.querySelector('.message')?.textContent?.trim() ?? '',
      })),
    );
  }

  /** Adds the good rows and says yes to leaving the others out. */
  async commitGoodRows(): Promise<void> {
    await this.page.getByRole('button', { name: /^Add the \d+ good rows?, leave \d+ out$/ }).click();
    await this.page
      .getByRole('alertdialog')
      .getByRole('button', { name: /^Add the/ })
      .click();
  }

  /** A term of 'hours read = ready + already there + refused'. */
  async readTerm(word: string): Promise<string> {
    const term = this.page
      .locator('app-check-summary .term')
      .filter({ has: this.page.getByText(word, { exact: true }) });
    return ((await term.locator('dd').first().textContent()) ?? '').trim();
  }

  historyRow(fileName: string): Locator {
    return this.page.locator('app-import-history tbody tr').filter({ hasText: fileName });
  }
}
