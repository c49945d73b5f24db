import { type RateGap } from '@brakeven/contract';
import { formatLocalDate, toLocalDate } from '@brakeven/values';

export interface GapAdvice {
  text: string;
  advice: string;
  path: string;
}

const MISSING: Readonly<Record<RateGap['category'], string>> = {
  labour: 'wage',
  overtime: 'wage in a week of overtime',
  machine: 'machine-hour rate',
  overhead: 'overhead rate',
  earned: 'charge-out rate',
  running: 'running cost',
  material: 'average cost',
  outside: 'amount',
  invoiced: 'amount',
};

/** Entries without a rate: what is missing, and where to put it. */
export function toGapAdvice({ category, subject, entries, firstDay, lastDay }: RateGap): GapAdvice {
  const from = formatLocalDate(toLocalDate(firstDay));
  const to = formatLocalDate(toLocalDate(lastDay));
  const days = firstDay === lastDay ? `on ${from}` : `from ${from} to ${to}`;
  const count = `${entries.toLocaleString('en-US')} ${entries === 1 ? 'entry' : 'entries'}`;
  const who = subject ?? 'The shop';
  const isPeople = ['labour', 'overtime', 'overhead'].includes(category);
  return {
    text: `${who} has no ${MISSING[category]} for ${count} ${days}. It is left out of the figures, not counted as 0.`,
    advice: `Add one valid from ${from}`,
    path: isPeople ? '/people' : '/machines',
  };
}
