import { ISSUE_KINDS, JOB_STATUSES, MACHINE_COST_KINDS, MATERIAL_FORMS } from '@brakeven/contract';
import { type SetupCellKind } from './setup-plan';

/** The words that a column takes, in its order, and other words that mean one of them. */
export interface SetupChoices {
  /** What is kept, by the word that is written. */
  readonly words: Readonly<Record<string, string>>;
  readonly alsoKnown: Readonly<Record<string, string>>;
}

const asWritten = (values: readonly string[]): Readonly<Record<string, string>> =>
  Object.fromEntries(values.map((value) => [value, value]));

const CHOICES: Readonly<Partial<Record<SetupCellKind, SetupChoices>>> = {
  costKind: { words: asWritten(MACHINE_COST_KINDS), alsoKnown: {} },
  jobStatus: {
    words: asWritten(JOB_STATUSES),
    alsoKnown: {
      active: 'open',
      'in progress': 'open',
      closed: 'finished',
      complete: 'finished',
      completed: 'finished',
      done: 'finished',
      canceled: 'cancelled',
    },
  },
  materialForm: { words: asWritten(MATERIAL_FORMS), alsoKnown: {} },
  issueKind: { words: asWritten(ISSUE_KINDS), alsoKnown: { issued: 'issue', returned: 'return' } },
  invoiceKind: {
    words: { invoice: 'invoice', 'credit note': 'credit-note' },
    alsoKnown: { 'credit-note': 'credit-note', credit: 'credit-note' },
  },
  estimateKind: {
    words: asWritten(['operation', 'material', 'outside']),
    alsoKnown: { 'outside service': 'outside', 'outside work': 'outside' },
  },
};

/** The words of a column that takes one of a list; undefined for other columns. */
export function findSetupChoices(kind: SetupCellKind): SetupChoices | undefined {
  return CHOICES[kind];
}

/** The word that is written for what is kept. */
export function toChoiceWord({ words }: SetupChoices, value: string): string {
  return Object.keys(words).find((word) => words[word] === value) ?? value;
}
