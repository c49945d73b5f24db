import { setTimeout as pause } from 'node:timers/promises';

const WITHIN_MS = 15_000;
const BETWEEN_LOOKS_MS = 50;

/** Holds an expectation against the page again and again until it is met; fails with its last failure. */
export async function eventually(expectation: () => Promise<void>): Promise<void> {
  const deadline = Date.now() + WITHIN_MS;
  for (;;) {
    try {
      await expectation();
      return;
    } catch (error) {
      if (Date.now() > deadline) throw error;
      await pause(BETWEEN_LOOKS_MS);
    }
  }
}
