import { type MachineCostKind, type Role } from '@brakeven/contract';

/** Tern Hollow Fabrication, invented: who works there, with what, on what. */
export const SHOP = {
  name: 'Tern Hollow Fabrication',
  timeZone: 'America/New_York',
  currency: 'USD',
  units: 'us',
} as const;

/** Weeks of history: the press came four weeks after the first one. */
export const WEEKS = 43;
export const PRESS_WEEK = 4;

export interface Person {
  number: string;
  name: string;
  wagePerHour: string;
  raisedTo: string | null;
  burdenPercent: string;
  /** Operations this person does, the usual one first; none: not on the timesheets. */
  skills: readonly string[];
}

export const PEOPLE: readonly Person[] = [
  {
    number: '101',
    name: 'Mara Quill',
    wagePerHour: '38.00',
    raisedTo: null,
    burdenPercent: '24',
    skills: [],
  },
  {
    number: '102',
    name: 'Ines Holloway',
    wagePerHour: '25.50',
    raisedTo: '26.25',
    burdenPercent: '24',
    skills: [],
  },
  {
    number: '103',
    name: 'Tobias Renn',
    wagePerHour: '29.00',
    raisedTo: '30.25',
    burdenPercent: '28',
    skills: ['FORM', 'ASSY', 'SHEAR', 'SAW'],
  },
  {
    number: '104',
    name: 'Jory Vance',
    wagePerHour: '23.75',
    raisedTo: '24.75',
    burdenPercent: '28',
    skills: ['FORM', 'SHEAR', 'GRIND', 'ASSY'],
  },
  {
    number: '105',
    name: 'Della Marsh',
    wagePerHour: '24.50',
    raisedTo: '25.25',
    burdenPercent: '28',
    skills: ['FORM', 'SHEAR', 'SAW', 'PAINT'],
  },
  {
    number: '106',
    name: 'Pike Osborne',
    wagePerHour: '22.00',
    raisedTo: null,
    burdenPercent: '28',
    skills: ['PLASMA', 'SAW', 'SHEAR', 'GRIND'],
  },
  {
    number: '107',
    name: 'Anselm Roe',
    wagePerHour: '28.25',
    raisedTo: '29.00',
    burdenPercent: '30',
    skills: ['WELD', 'GRIND'],
  },
  {
    number: '108',
    name: 'Wren Castell',
    wagePerHour: '27.50',
    raisedTo: '28.50',
    burdenPercent: '30',
    skills: ['WELD', 'ASSY', 'GRIND'],
  },
  {
    number: '109',
    name: 'Nils Hartley',
    wagePerHour: '19.75',
    raisedTo: '20.50',
    burdenPercent: '26',
    skills: ['PAINT', 'ASSY', 'GRIND'],
  },
];

export const SIGN_INS: readonly {
  role: Role;
  name: string;
  email: string;
  password: string;
  employee: string;
}[] = [
  {
    role: 'owner',
    name: 'Mara Quill',
    email: 'mara@ternhollow.example',
    password: 'tern-hollow-owner',
    employee: '101',
  },
  {
    role: 'bookkeeper',
    name: 'Ines Holloway',
    email: 'ines@ternhollow.example',
    password: 'tern-hollow-books',
    employee: '102',
  },
  {
    role: 'lead',
    name: 'Tobias Renn',
    email: 'tobias@ternhollow.example',
    password: 'tern-hollow-lead',
    employee: '103',
  },
  {
    role: 'operator',
    name: 'Jory Vance',
    email: 'jory@ternhollow.example',
    password: 'tern-hollow-press',
    employee: '104',
  },
];

export const OPERATIONS: readonly { code: string; name: string; machine: string | null }[] = [
  { code: 'SHEAR', name: 'Shear', machine: null },
  { code: 'SAW', name: 'Saw', machine: 'SAW' },
  { code: 'PLASMA', name: 'Plasma cut', machine: 'PT' },
  { code: 'FORM', name: 'Form', machine: 'P2' },
  { code: 'WELD', name: 'Weld', machine: 'WB' },
  { code: 'GRIND', name: 'Grind', machine: null },
  { code: 'PAINT', name: 'Paint', machine: null },
  { code: 'ASSY', name: 'Assemble', machine: null },
];

/** In service: weeks from the start of the history; null: long before it. */
export interface DemoMachine {
  code: string;
  name: string;
  kind: string;
  inServiceWeek: number | null;
  ratedForceTons: string | null;
  bedLengthIn: string | null;
  machineHourRate: string;
  chargeOutRate: string;
  runningCostPerHour: string;
}

export const MACHINES: readonly DemoMachine[] = [
  {
    code: 'P1',
    name: 'Press 1',
    kind: 'press brake',
    inServiceWeek: null,
    ratedForceTons: '25',
    bedLengthIn: '48',
    machineHourRate: '11.50',
    chargeOutRate: '68',
    runningCostPerHour: '4.10',
  },
  {
    code: 'P2',
    name: 'Press 2',
    kind: 'press brake',
    inServiceWeek: PRESS_WEEK,
    ratedForceTons: '60',
    bedLengthIn: '72',
    machineHourRate: '18.40',
    chargeOutRate: '85',
    runningCostPerHour: '5.02',
  },
  {
    code: 'PT',
    name: 'Plasma table',
    kind: 'plasma table',
    inServiceWeek: null,
    ratedForceTons: null,
    bedLengthIn: null,
    machineHourRate: '16.75',
    chargeOutRate: '92',
    runningCostPerHour: '9.80',
  },
  {
    code: 'SAW',
    name: 'Band saw',
    kind: 'saw',
    inServiceWeek: null,
    ratedForceTons: null,
    bedLengthIn: null,
    machineHourRate: '5.20',
    chargeOutRate: '58',
    runningCostPerHour: '1.90',
  },
  {
    code: 'WB',
    name: 'Weld bays',
    kind: 'welding',
    inServiceWeek: null,
    ratedForceTons: null,
    bedLengthIn: null,
    machineHourRate: '7.60',
    chargeOutRate: '74',
    runningCostPerHour: '6.40',
  },
];

/** What Press 2 cost until it made its first part; days before it went into service. */
export const PRESS_COSTS: readonly {
  daysBefore: number;
  kind: MachineCostKind;
  description: string;
  amount: string;
}[] = [
  {
    daysBefore: 48,
    kind: 'price',
    description: 'Press brake, 60 ton, 6 ft, two-axis back gauge',
    amount: '27500.00',
  },
  { daysBefore: 12, kind: 'freight', description: 'Flatbed, tarped, door to door', amount: '1480.00' },
  { daysBefore: 9, kind: 'rigging', description: 'Unload and set, machinery movers', amount: '1950.00' },
  {
    daysBefore: 6,
    kind: 'electrical',
    description: 'Disconnect, 30 A three-phase drop, permit',
    amount: '2630.00',
  },
  {
    daysBefore: 5,
    kind: 'tooling',
    description: 'Gooseneck punch set and two-way die block',
    amount: '3400.00',
  },
  {
    daysBefore: 3,
    kind: 'installation',
    description: 'Levelling, oil, light curtain check',
    amount: '700.00',
  },
  { daysBefore: 1, kind: 'training', description: 'Two operators, one day on site', amount: '600.00' },
];

export const CUSTOMERS = [
  'Alder Creek Dairy',
  'Brindle & Pope Conveyors',
  'Cold Harbor Bakery Supply',
  'Fenwick County Roads',
  'Gable Point Marina',
  'Larkspur Feed Mill',
  'Northing Cabinets',
  'Saltmarsh Pumps',
] as const;

/** A kind of work: share of its hours by operation. */
export const JOB_KINDS: readonly {
  title: string;
  customers: readonly number[];
  route: Readonly<Record<string, number>>;
  piecesPerHour: number;
}[] = [
  {
    title: 'Trench covers',
    customers: [3, 0],
    route: { PLASMA: 0.2, FORM: 0.14, WELD: 0.32, GRIND: 0.18, PAINT: 0.16 },
    piecesPerHour: 9,
  },
  {
    title: 'Conveyor guards',
    customers: [1, 5],
    route: { SHEAR: 0.16, FORM: 0.18, WELD: 0.26, PAINT: 0.2, ASSY: 0.2 },
    piecesPerHour: 13,
  },
  {
    title: 'Cabinet shells',
    customers: [6, 2],
    route: { SHEAR: 0.16, FORM: 0.2, WELD: 0.22, GRIND: 0.16, PAINT: 0.14, ASSY: 0.12 },
    piecesPerHour: 11,
  },
  {
    title: 'Hopper chutes',
    customers: [5, 0],
    route: { PLASMA: 0.18, FORM: 0.12, WELD: 0.44, GRIND: 0.26 },
    piecesPerHour: 5,
  },
  {
    title: 'Pump skids',
    customers: [7, 4],
    route: { SAW: 0.2, PLASMA: 0.12, FORM: 0.08, WELD: 0.36, PAINT: 0.12, ASSY: 0.12 },
    piecesPerHour: 4,
  },
  {
    title: 'Drip trays',
    customers: [2, 0, 7],
    route: { SHEAR: 0.26, FORM: 0.22, WELD: 0.34, GRIND: 0.18 },
    piecesPerHour: 16,
  },
  {
    title: 'Stair treads',
    customers: [4, 3],
    route: { PLASMA: 0.3, SHEAR: 0.1, FORM: 0.2, GRIND: 0.22, PAINT: 0.18 },
    piecesPerHour: 12,
  },
  {
    title: 'Switch boxes',
    customers: [7, 6],
    route: { SHEAR: 0.2, FORM: 0.2, WELD: 0.2, PAINT: 0.18, ASSY: 0.22 },
    piecesPerHour: 14,
  },
];

/** Not billable: upkeep of the shop's own machines, a few hours a week. */
export const UPKEEP_JOB = { number: '1000', title: 'Shop upkeep' } as const;
