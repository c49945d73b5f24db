import { type Locator, type Page } from 'playwright-core';
import { FormDialog } from './form-dialog';
import { Shell } from './shell';

/** A part of Forming, by its address. */
export type FormingPart = 'fit' | 'depth' | 'card' | 'blank' | 'runs' | 'setup-card' | 'tooling';

/** Chooses the option that has these words in it. */
export async function chooseOption(select: Locator, words: string): Promise<void> {
  const option = select.locator('option').filter({ hasText: words }).first();
  await option.waitFor({ state: 'attached' });
  await select.selectOption(await option.getAttribute('value'));
}

/** Forming with its parts: fields at the left, the answer as a heading at the right. */
export class FormingPage {
  private readonly shell: Shell;
  /** What a part answers, before anything else is read. */
  readonly answer: Locator;

  constructor(private readonly page: Page) {
    this.shell = new Shell(page);
    this.answer = page.locator('.stack > section h2').first();
  }

  async open(part: FormingPart, query = ''): Promise<void> {
    await this.shell.goTo(`/forming/${part}${query}`);
  }

  /** Goes to another part by its link. */
  async choose(label: string): Promise<void> {
    await this.page
      .getByRole('navigation', { name: 'Parts of Forming' })
      .getByRole('link', { name: label })
      .click();
    await this.shell.waitUntilSettled();
  }

  field(label: string): Locator {
    return this.page.locator('.layout form').getByLabel(label, { exact: true });
  }

  /** The row of an opening of a die in the table of fits. */
  openingRow(opening: string, die: string): Locator {
    return this.page
      .locator('app-fit-table tbody tr')
      .filter({ has: this.page.getByRole('button', { name: opening, exact: true }), hasText: die });
  }

  /** The card of a press under Dies and punches. */
  pressCard(press: string): Locator {
    return this.page
      .locator('app-tooling-page section.card')
      .filter({ has: this.page.getByRole('heading', { name: press }) });
  }

  /** Adds a tool to a press by its dialog. */
  async addTool(
    press: string,
    kind: 'punch' | 'die',
    values: Readonly<Record<string, string>>,
  ): Promise<void> {
    await this.pressCard(press)
      .getByRole('button', { name: `Add a ${kind}` })
      .click();
    const form = new FormDialog(this.page);
    await form.fill(values);
    await form.submit(`Add ${kind}`);
    await this.pressCard(press)
      .getByText(values['Name'] ?? '', { exact: true })
      .waitFor();
  }

  /** Notes a trial bend of the set-up that is chosen. */
  async noteTrial(reading: string, angle: string): Promise<void> {
    const trials = this.page.locator('app-trial-table tbody tr');
    const before = await trials.count();
    await this.page.getByRole('button', { name: 'Note a trial bend' }).click();
    const form = new FormDialog(this.page);
    await form.fill({ 'Reading of the ram': reading, 'Angle measured': angle });
    await form.submit('Note it');
    await trials.nth(before).waitFor();
  }
}
