import { setImmediate } from 'node:timers/promises';

/** Items worked on before others get their turn; about ten milliseconds of checking. */
export const ITEMS_PER_TURN = 1_000;

/** Lets requests that wait be served before long work goes on. */
export async function nextTurn(): Promise<void> {
  await setImmediate();
}
