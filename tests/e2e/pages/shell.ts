/// <reference lib="dom" />
import { type Locator, type Page } from 'playwright-core';

/** The frame round every page: rail, bar and messages. */
export class Shell {
  readonly heading: Locator;
  readonly rollUpButton: Locator;

  constructor(readonly page: Page) {
    this.heading = page.locator('app-shell main h1');
    this.rollUpButton = page.getByRole('button', { name: 'Roll up now' });
  }

  /** Goes to a page by its address and waits until it has loaded what it shows. */
  async goTo(path: string): Promise<void> {
    await this.page.goto(path);
    await this.waitUntilSettled();
  }

  /** Goes to a page by the rail. */
  async choose(label: string): Promise<void> {
    await this.page
      .getByRole('navigation', { name: 'Pages' })
      .getByRole('link', { name: label, exact: true })
      .click();
    await this.page.waitForURL((url) => url.pathname !== '/');
    await this.waitUntilSettled();
  }

  async waitUntilShown(): Promise<void> {
    await this.heading.first().waitFor();
  }

  /** No part of the page is waiting for its data any more. */
  async waitUntilSettled(): Promise<void> {
    await this.waitUntilShown();
    await this.page.waitForFunction(
      () => document.querySelectorAll('main app-loading-skeleton, main .ag-loading').length === 0,
    );
  }

  async listRail(): Promise<string[]> {
    return (await this.page.locator('nav.rail a').allTextContents()).map((text) => text.trim());
  }

  /** Rolls up what is waiting, and waits for what the bar says about it. */
  async rollUp(): Promise<string> {
    await this.rollUpButton.click();
    const message = this.page.getByRole('group', { name: 'Message' }).locator('.text');
    await message.filter({ hasText: /rolled up/i }).waitFor();
    return (await message.textContent()) ?? '';
  }

  /** How many pixels of the page stick out to the right. */
  async measureOverflowPx(): Promise<number> {
    // A scroll width is rounded up to whole pixels, so one more is a fraction and scrolls nothing.
    return this.page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth - 1);
  }
}
