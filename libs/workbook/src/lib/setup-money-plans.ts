import { aboveZero, needed, optional, type SetupSheetPlan } from './setup-plan';

/** What is bought and billed for a job. */
export const MONEY_PLANS: readonly SetupSheetPlan[] = [
  {
    list: 'outsideServices',
    sheet: 'Outside services',
    uniqueBy: [],
    help: 'Work on a job that somebody else did.',
    columns: [
      needed('date', 'Date', 'date', '2026-02-19', 'Day of the cost; not before the job was opened.'),
      needed('job', 'Job', 'label', '2041', 'Number of the job.'),
      optional('vendor', 'Vendor', 'label', 'Fernside Coatings', 'Who did it.'),
      optional('description', 'Description', 'label', 'Powder coat, grey', 'In words.'),
      {
        ...aboveZero(needed('amount', 'Amount', 'money', '412.00', 'Above 0.')),
        insteadOfMinus: 'Correct the row that it takes back instead.',
      },
    ],
  },
  {
    list: 'invoices',
    sheet: 'Invoices',
    uniqueBy: ['job', 'kind', 'number'],
    help: 'What was billed to customers. One invoice over several jobs is one row for each of them.',
    columns: [
      {
        ...needed('number', 'Number', 'label', '7731', 'Of the invoice or credit note.'),
        alsoHeaded: ['Invoice', 'Invoice no'],
      },
      needed('date', 'Date', 'date', '2026-03-02', 'Its date; not before the job was opened.'),
      needed('job', 'Job', 'label', '2041', 'Number of the job.'),
      {
        ...optional('kind', 'Kind', 'invoiceKind', 'invoice', 'invoice or credit note; blank means invoice.'),
        ifBlank: 'invoice',
      },
      optional('description', 'Description', 'label', '24 conveyor guards', 'In words.'),
      {
        ...aboveZero(
          needed('amount', 'Amount', 'money', '5400.00', 'Without sales tax. Above 0 for a credit note too.'),
        ),
        insteadOfMinus: 'Write the amount without the minus, and credit note as its kind.',
      },
    ],
  },
];
