import { type MaterialForm } from '@brakeven/contract';

/** A material of the demo shop: what a pound of it costs to begin with, and the sheet it comes in. */
export interface DemoMaterial {
  name: string;
  grade: string;
  form: MaterialForm;
  thickness: string;
  thicknessIn: string;
  /** Grams per cubic centimetre; null for what is only weighed. */
  density: string | null;
  strengthKsi: string;
  recoveryPerLb: string;
  dollarsPerLb: number;
  sheetIn: readonly [length: string, width: string] | null;
  vendor: string;
}

const STEEL = { density: '7.85', strengthKsi: '60', recoveryPerLb: '0.09' } as const;

export const MATERIALS = {
  coldRolled: {
    ...STEEL,
    name: '16 ga cold-rolled',
    grade: 'A1008',
    form: 'sheet',
    thickness: '16 ga',
    thicknessIn: '0.0598',
    dollarsPerLb: 0.71,
    sheetIn: ['120', '48'],
    vendor: 'Otter Gap Metals',
  },
  hotRolled: {
    ...STEEL,
    name: '11 ga hot-rolled',
    grade: 'A1011',
    form: 'sheet',
    thickness: '11 ga',
    thicknessIn: '0.1196',
    dollarsPerLb: 0.64,
    sheetIn: ['120', '60'],
    vendor: 'Otter Gap Metals',
  },
  plate: {
    ...STEEL,
    name: '1/4 plate',
    grade: 'A36',
    form: 'plate',
    thickness: '1/4 in',
    thicknessIn: '0.25',
    dollarsPerLb: 0.61,
    sheetIn: ['120', '60'],
    vendor: 'Millrace Steel',
  },
  galvanized: {
    ...STEEL,
    name: '14 ga galvanized',
    grade: 'A653 G90',
    form: 'sheet',
    thickness: '14 ga',
    thicknessIn: '0.0785',
    dollarsPerLb: 0.83,
    sheetIn: ['120', '48'],
    vendor: 'Millrace Steel',
  },
  aluminium: {
    name: '1/8 aluminum',
    grade: '5052-H32',
    form: 'sheet',
    thickness: '0.125 in',
    thicknessIn: '0.125',
    density: '2.68',
    strengthKsi: '33',
    recoveryPerLb: '0.52',
    dollarsPerLb: 2.85,
    sheetIn: ['144', '48'],
    vendor: 'Otter Gap Metals',
  },
  tube: {
    ...STEEL,
    name: '2 x 2 x 3/16 tube',
    grade: 'A500',
    form: 'tube',
    thickness: '3/16 in',
    thicknessIn: '0.1875',
    density: null,
    dollarsPerLb: 0.94,
    sheetIn: null,
    vendor: 'Millrace Steel',
  },
} as const satisfies Record<string, DemoMaterial>;

export type MaterialCode = keyof typeof MATERIALS;

/** What a piece of a kind of work is cut from: a blank in inches, or pounds where it is only weighed. */
export interface KindCosts {
  material: MaterialCode;
  blankIn: readonly [length: string, width: string] | null;
  poundsPerPiece: number | null;
  /** What is sent out on some of the jobs, and for how many dollars a piece. */
  outside: { vendor: string; description: string; dollarsPerPiece: number } | null;
}

const COATING = { vendor: 'Fernside Coatings', description: 'Powder coat' } as const;

/** By the title of the kind of work. */
export const KIND_COSTS: Readonly<Record<string, KindCosts>> = {
  'Trench covers': {
    ...{ material: 'plate', blankIn: ['24', '18'], poundsPerPiece: null },
    outside: { vendor: 'Kettle Bay Galvanizing', description: 'Hot-dip galvanize', dollarsPerPiece: 9.6 },
  },
  'Conveyor guards': {
    ...{ material: 'coldRolled', blankIn: ['30', '16'], poundsPerPiece: null },
    outside: { ...COATING, dollarsPerPiece: 4.4 },
  },
  'Cabinet shells': {
    ...{ material: 'coldRolled', blankIn: ['40', '24'], poundsPerPiece: null },
    outside: { ...COATING, dollarsPerPiece: 6.1 },
  },
  'Hopper chutes': {
    ...{ material: 'hotRolled', blankIn: ['48', '36'], poundsPerPiece: null },
    outside: { vendor: 'Brightwater Laser', description: 'Laser-cut blanks', dollarsPerPiece: 14.5 },
  },
  'Pump skids': { ...{ material: 'tube', blankIn: null, poundsPerPiece: 84 }, outside: null },
  'Drip trays': { ...{ material: 'galvanized', blankIn: ['24', '14'], poundsPerPiece: null }, outside: null },
  'Stair treads': {
    ...{ material: 'aluminium', blankIn: ['36', '10'], poundsPerPiece: null },
    outside: { vendor: 'Brightwater Laser', description: 'Laser-cut anti-slip holes', dollarsPerPiece: 3.2 },
  },
  'Switch boxes': {
    ...{ material: 'coldRolled', blankIn: ['22', '18'], poundsPerPiece: null },
    outside: { ...COATING, dollarsPerPiece: 3.9 },
  },
};
