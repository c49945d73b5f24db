import { AppError } from '@brakeven/contract';
import { type BendCounts } from '@brakeven/database';

/**
 * Refuses to take away what bends were made with, as they would no longer say how.
 * @param what a tool or material as a message calls it, such as `Punch P1`
 * @throws AppError `conflict`
 */
export function refuseUsed(what: string, { trialBends, pressRuns }: BendCounts): void {
  if (trialBends + pressRuns === 0) return;
  const counted = [count(trialBends, 'trial bend'), count(pressRuns, 'press run')].filter(Boolean);
  throw new AppError(
    'conflict',
    `${what} has to stay: ${counted.join(' and ')} refer to it, those that were voided among them. Change it instead.`,
  );
}

function count(number: number, noun: string): string {
  if (number === 0) return '';
  return number === 1 ? `1 ${noun}` : `${number} ${noun}s`;
}
