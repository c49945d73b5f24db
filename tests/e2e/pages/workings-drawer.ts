import { type Locator, type Page } from 'playwright-core';
import { toCents } from './figure-text';

export interface WorkingsPart {
  label: string;
  cents: number;
}

export interface WorkingsRow {
  cents: number;
  /** '7.50 h × $95.00'. */
  sum: string;
  source: string;
}

/** The drawer that shows how a figure was made. */
export class WorkingsDrawer {
  readonly dialog: Locator;
  private readonly rows: Locator;
  /** Whether the parts, else the rows, add up to the figure. */
  readonly verdict: Locator;

  constructor(private readonly page: Page) {
    this.dialog = page.locator('app-workings-drawer dialog[open]');
    this.rows = this.dialog.locator('ol > li');
    this.verdict = this.dialog.locator('.check').first();
  }

  /** Presses what opens workings and waits until those are shown. */
  async openBy(figure: Locator): Promise<void> {
    const answer = this.page.waitForResponse((response) => response.url().includes('/api/workings/'));
    await figure.click();
    const { title } = (await (await answer).json()) as { title: string };
    await this.dialog.getByRole('heading', { name: title, exact: true }).waitFor();
    await this.verdict.waitFor();
  }

  async openPart(label: string): Promise<void> {
    const part = this.dialog.locator('dl > div').filter({ has: this.page.getByText(label, { exact: true }) });
    await this.openBy(part.getByRole('button'));
  }

  async readCents(): Promise<number> {
    return toCents((await this.dialog.locator('.amount').textContent()) ?? '');
  }

  /** The figures that this one is made of and that open in turn. */
  async listParts(): Promise<WorkingsPart[]> {
    const parts = this.dialog.locator('dl > div').filter({ has: this.page.locator('button.part') });
    const labels = await parts.locator('dt').allTextContents();
    const amounts = await parts.locator('button.part').allTextContents();
    return labels.map((label, index) => ({ label: label.trim(), cents: toCents(amounts[index] ?? '') }));
  }

  /** All rows, after asking for every further page of them. */
  async listRows(): Promise<WorkingsRow[]> {
    const more = this.dialog.getByRole('button', { name: 'Show more rows' });
    while (await more.isVisible()) {
      const shown = await this.rows.count();
      await more.click();
      await this.rows.nth(shown).waitFor();
      await this.dialog.getByRole('button', { name: 'Loading…' }).waitFor({ state: 'detached' });
    }
    return this.rows
      .evaluateAll((items) =>
        items.map((item) => {
          const read = (part: string) => item.querySelector(part)?.textContent?.trim() ?? '';
          return { amount: read('.money'), sum: read('.sum'), source: read('.source') };
        }),
      )
      .then((rows) => rows.map(({ amount, sum, source }) => ({ cents: toCents(amount), sum, source })));
  }

  async readVerdict(): Promise<string> {
    return (await this.verdict.textContent()) ?? '';
  }

  /** Follows a row to the cell of the workbook that it came from. */
  async followRow(index: number): Promise<void> {
    await this.rows.nth(index).getByRole('link').click();
    await this.page.waitForURL(/\/timesheets\/.+cell=/);
  }
}
