import { type Role } from '@brakeven/contract';

/** What a role is called, and what it may see and do, in one sentence. */
export const ROLE_WORDS: Record<Role, { label: string; text: string }> = {
  owner: {
    label: 'Owner',
    text: 'Sees everything, wages and payback included, and runs the shop’s settings.',
  },
  bookkeeper: {
    label: 'Bookkeeper',
    text: 'Takes in timesheets, keeps people, wages and jobs, sees what jobs cost. Not machines, users or settings.',
  },
  lead: { label: 'Lead', text: 'Sees jobs, hours and machines without any money or wage.' },
  operator: { label: 'Operator', text: 'Sees own hours only: link the employee that they log as.' },
};

export const ROLE_OPTIONS = Object.entries(ROLE_WORDS).map(([value, { label }]) => ({ value, label }));
