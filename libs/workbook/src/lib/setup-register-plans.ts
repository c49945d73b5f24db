import { JOB_STATUSES, MACHINE_COST_KINDS } from '@brakeven/contract';
import { needed, optional, type SetupSheetPlan } from './setup-plan';

/** Who works here, with what, for whom: the sheets that a shop starts with. */
export const REGISTER_PLANS: readonly SetupSheetPlan[] = [
  {
    list: 'people',
    sheet: 'People',
    uniqueBy: ['number', 'rateFrom'],
    help: 'One row for each person and pay rate. A later raise is another row with the same number.',
    columns: [
      {
        ...needed('number', 'Number', 'label', '101', 'The number that the timesheets use.'),
        alsoHeaded: ['Employee no', 'Employee'],
      },
      optional('name', 'Name', 'label', 'Mara Quill', 'May be left blank on later rates of the same number.'),
      optional('rateFrom', 'Rate from', 'date', '2026-01-01', 'First day on which the wage is paid.'),
      {
        ...optional('wagePerHour', 'Wage per hour', 'rate', '28.50', 'Before taxes.'),
        alsoHeaded: ['Wage'],
      },
      {
        ...optional(
          'burdenPercent',
          'Burden %',
          'percent',
          '28',
          'Taxes, insurance and benefits on top of the wage, in percent of it. Write 0 if there is none.',
        ),
        alsoHeaded: ['Burden', 'Burden percent'],
      },
    ],
  },
  {
    list: 'customers',
    sheet: 'Customers',
    uniqueBy: ['name'],
    help: 'One row for each customer.',
    columns: [
      needed('name', 'Name', 'label', 'Harbor Lane Conveyors', 'As the Jobs sheet names the customer.'),
    ],
  },
  {
    list: 'operations',
    sheet: 'Operations',
    uniqueBy: ['code'],
    help: 'The kinds of work that timesheets name.',
    columns: [
      needed('code', 'Code', 'label', 'FORM', 'As the timesheets write it.'),
      needed('name', 'Name', 'label', 'Forming', 'In words.'),
      optional(
        'machine',
        'Machine',
        'label',
        'P2',
        'Code of the machine it runs on when an entry names none.',
      ),
    ],
  },
  {
    list: 'machines',
    sheet: 'Machines',
    uniqueBy: ['code'],
    help: 'The machines whose hours are costed.',
    columns: [
      needed('code', 'Code', 'label', 'P2', 'As the timesheets write it.'),
      needed('name', 'Name', 'label', 'Press 2', 'In words.'),
      optional('kind', 'Kind', 'label', 'Press brake', 'What sort of machine it is.'),
      {
        ...optional('inServiceOn', 'In service', 'date', '2026-02-02', 'First day on which it earned.'),
        alsoHeaded: ['In service on', 'In service from'],
      },
      optional(
        'ratedForceKn',
        'Rated force',
        'force',
        '60',
        'From the rating plate; the unit stands in the header: (tons), (tonnes) or (kN).',
      ),
      optional(
        'bedLengthMm',
        'Bed length',
        'length',
        '72',
        'The unit stands in the header: (in), (ft) or (mm).',
      ),
    ],
  },
  {
    list: 'machineCosts',
    sheet: 'Machine costs',
    uniqueBy: [],
    help: 'Everything paid to get a machine working: its landed cost.',
    columns: [
      needed('machine', 'Machine', 'label', 'P2', 'Code of the machine.'),
      needed('date', 'Date', 'date', '2026-01-19', 'Day of the cost.'),
      needed('kind', 'Kind', 'costKind', 'freight', `One of: ${MACHINE_COST_KINDS.join(', ')}.`),
      optional('description', 'Description', 'label', 'Truck from the dealer', 'In words.'),
      needed('amount', 'Amount', 'money', '1450.00', 'Not below 0.'),
    ],
  },
  {
    list: 'machineRates',
    sheet: 'Machine rates',
    uniqueBy: ['machine', 'validFrom'],
    help: 'Rates of a machine. Later rates are further rows.',
    columns: [
      needed('machine', 'Machine', 'label', 'P2', 'Code of the machine.'),
      {
        ...needed('validFrom', 'From', 'date', '2026-02-02', 'First day of the rates.'),
        alsoHeaded: ['Valid from'],
      },
      needed('machineHourRate', 'Machine-hour rate', 'rate', '34.00', 'What an hour of it costs a job.'),
      needed('chargeOutRate', 'Charge-out rate', 'rate', '95.00', 'What an hour of it is sold for.'),
      needed('runningCostPerHour', 'Running cost per hour', 'rate', '6.50', 'Power, consumables and upkeep.'),
    ],
  },
  {
    list: 'overhead',
    sheet: 'Overhead',
    uniqueBy: ['validFrom'],
    help: 'What an hour of work carries of rent, office and the like.',
    columns: [
      {
        ...needed('validFrom', 'From', 'date', '2026-01-01', 'First day of the rate.'),
        alsoHeaded: ['Valid from'],
      },
      {
        ...needed('ratePerLabourHour', 'Rate per labour hour', 'rate', '18.00', 'Not below 0.'),
        alsoHeaded: ['Rate per labor hour'],
      },
    ],
  },
  {
    list: 'jobs',
    sheet: 'Jobs',
    uniqueBy: ['number'],
    help: 'The jobs that timesheets book on.',
    columns: [
      {
        ...needed('number', 'Number', 'label', '2041', 'As the timesheets write it.'),
        alsoHeaded: ['Job', 'Job no'],
      },
      optional('customer', 'Customer', 'label', 'Harbor Lane Conveyors', 'As on the Customers sheet.'),
      optional('title', 'Title', 'label', 'Conveyor guards', 'In words.'),
      optional('quantity', 'Quantity', 'count', '24', 'Pieces ordered.'),
      optional('openedOn', 'Opened', 'date', '2026-02-03', 'Day on which work could begin.'),
      optional('dueOn', 'Due', 'date', '2026-02-27', 'Day promised.'),
      optional('quotedPrice', 'Quoted price', 'money', '5400.00', 'For the whole job.'),
      needed('isBillable', 'Billable', 'yesNo', 'yes', 'yes or no; no for own work such as shop repairs.'),
      {
        ...optional(
          'status',
          'Status',
          'jobStatus',
          'open',
          `One of: ${JOB_STATUSES.join(', ')}; blank means open.`,
        ),
        ifBlank: 'open',
      },
    ],
  },
];
