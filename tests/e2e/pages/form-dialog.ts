import { type Locator, type Page } from 'playwright-core';

/** The dialog in front of the page. */
export class FormDialog {
  readonly dialog: Locator;

  constructor(page: Page) {
    this.dialog = page.getByRole('dialog');
  }

  async fill(values: Readonly<Record<string, string>>): Promise<void> {
    for (const [label, value] of Object.entries(values)) {
      await this.dialog.getByLabel(label).fill(value);
    }
  }

  /** Presses the button that saves, and waits until the dialog is gone. */
  async submit(button: string): Promise<void> {
    const heading = await this.dialog.getByRole('heading').first().textContent();
    await this.dialog.getByRole('button', { name: button, exact: true }).click();
    await this.dialog
      .getByRole('heading', { name: heading ?? '', exact: true })
      .waitFor({ state: 'detached' });
  }
}
