import { aboveZero, needed, optional, type SetupSheetPlan } from './setup-plan';

/** What jobs were estimated to take. */
export const ESTIMATE_PLANS: readonly SetupSheetPlan[] = [
  {
    list: 'estimates',
    sheet: 'Estimates',
    uniqueBy: [],
    help: 'The lines of each job’s estimate, in their order. All rows of a job are its whole estimate.',
    columns: [
      needed('job', 'Job', 'label', '2041', 'Number of the job.'),
      {
        ...optional(
          'estimatedOn',
          'Estimated on',
          'date',
          '2026-01-28',
          'Day whose rates and prices are used; may stand on one row of the job only.',
        ),
        alsoHeaded: ['Estimated', 'Date'],
      },
      needed('kind', 'Kind', 'estimateKind', 'operation', 'One of: operation, material, outside.'),
      optional('operation', 'Operation', 'label', 'FORM', 'Code of the operation.'),
      optional(
        'machine',
        'Machine',
        'label',
        'P2',
        'Code of the machine; blank means the operation’s own machine.',
      ),
      optional('setupHours', 'Set-up hours', 'hours', '0.75', 'Once for the job.'),
      optional('minutesPerPiece', 'Minutes per piece', 'minutes', '2.5', 'Running.'),
      aboveZero(optional('pieces', 'Pieces', 'count', '24', 'Blank means the quantity of the job.')),
      {
        ...optional(
          'labourRate',
          'Labour rate',
          'rate',
          '36.48',
          'An hour with burden. Blank means the average of the people who work here.',
        ),
        alsoHeaded: ['Labor rate'],
      },
      optional(
        'machineHourRate',
        'Machine-hour rate',
        'rate',
        '34.00',
        'Blank means the machine’s rate on that day.',
      ),
      optional('overheadRate', 'Overhead rate', 'rate', '18.00', 'Blank means the rate on that day.'),
      optional('material', 'Material', 'label', '11 ga hot-rolled', 'As on the Materials sheet.'),
      optional(
        'weightKg',
        'Weight',
        'mass',
        '310',
        'Without the scrap allowance. The unit stands in the header: (lb) or (kg).',
      ),
      optional(
        'pricePerKg',
        'Price',
        'pricePerWeight',
        '0.72',
        'The header says per lb or per kg. Blank means the average of the stock on that day.',
      ),
      optional('description', 'Description', 'label', 'Powder coat', 'In words.'),
      {
        ...aboveZero(optional('amount', 'Amount', 'money', '400.00', 'Of outside work.')),
        insteadOfMinus: 'Leave the row out instead.',
      },
      {
        ...optional(
          'scrapAllowancePercent',
          'Scrap allowance %',
          'percent',
          '3',
          'Of pieces and material, for the whole job; may stand on one row of it only. Blank means 0.',
        ),
        alsoHeaded: ['Scrap allowance'],
      },
      {
        ...optional(
          'marginPercent',
          'Wanted margin %',
          'percent',
          '18',
          'Of the price, for the whole job; may stand on one row of it only. Below 100. Blank means 0.',
        ),
        alsoHeaded: ['Wanted margin', 'Margin'],
      },
    ],
  },
];
