/** Tools of the demo shop's presses, in inches and US tons per foot. */
export const PUNCHES = [
  { machine: 'P1', punch: 'Old straight', noseIn: '0.0625', angle: '85', lengthIn: '48', tonsPerFoot: '12' },
  { machine: 'P2', punch: 'Gooseneck', noseIn: '0.0315', angle: '85', lengthIn: '72', tonsPerFoot: '15' },
  { machine: 'P2', punch: 'Heavy straight', noseIn: '0.125', angle: '80', lengthIn: '72', tonsPerFoot: '40' },
] as const;

export const DIES = [
  {
    machine: 'P1',
    die: 'Old block',
    openingsIn: ['0.5', '1'],
    angle: '85',
    lengthIn: '48',
    tonsPerFoot: '14',
  },
  {
    machine: 'P2',
    die: 'Two-way block',
    openingsIn: ['0.5', '1'],
    angle: '85',
    lengthIn: '72',
    tonsPerFoot: '20',
  },
  { machine: 'P2', die: 'Plate die', openingsIn: ['2'], angle: '80', lengthIn: '72', tonsPerFoot: '40' },
] as const;
export const SHOULDER_PER_OPENING = 0.1;

/** How the pieces of a kind of work are bent, by its title. */
export interface KindBends {
  materialCode: string;
  thicknessIn: string;
  openingIn: string;
  punch: 'Gooseneck' | 'Heavy straight';
  bendIn: string;
  bendsPerPiece: number;
}

const COLD = {
  materialCode: 'a1008-cs',
  thicknessIn: '0.0598',
  openingIn: '0.5',
  punch: 'Gooseneck',
} as const;
const HOT = { materialCode: 'a1011-cs', thicknessIn: '0.1196', openingIn: '1', punch: 'Gooseneck' } as const;

export const KIND_BENDS: Readonly<Record<string, KindBends>> = {
  'Trench covers': {
    ...{ materialCode: 'a36', thicknessIn: '0.25', openingIn: '2', punch: 'Heavy straight' },
    ...{ bendIn: '24', bendsPerPiece: 2 },
  },
  'Conveyor guards': { ...COLD, bendIn: '30', bendsPerPiece: 3 },
  'Cabinet shells': { ...COLD, bendIn: '40', bendsPerPiece: 4 },
  'Hopper chutes': { ...HOT, bendIn: '36', bendsPerPiece: 2 },
  'Pump skids': { ...HOT, bendIn: '14', bendsPerPiece: 2 },
  'Drip trays': {
    ...{ materialCode: 'galvanized', thicknessIn: '0.0785', openingIn: '0.5', punch: 'Gooseneck' },
    ...{ bendIn: '24', bendsPerPiece: 4 },
  },
  'Stair treads': {
    ...{ materialCode: 'aluminium-5052-h32', thicknessIn: '0.125', openingIn: '1', punch: 'Gooseneck' },
    ...{ bendIn: '36', bendsPerPiece: 2 },
  },
  'Switch boxes': { ...COLD, bendIn: '18', bendsPerPiece: 4 },
};

/** Where Press 2 shows a tip level with the die, and how far its parts spring open. */
export const DEPTH_STORY = { datumMm: 109.5, springback: 2.1 } as const;

/** Trial bends on Press 2 with the gooseneck: narrow strips, and one bend over the full length at the end. */
export const TRIAL_SERIES = [
  { ...HOT, angles: [72, 84, 90, 97, 110, 128, 136], stripIn: '2', fullLengthAngle: 90 },
  { ...COLD, angles: [78, 90, 104, 121, 135], stripIn: '2', fullLengthAngle: null },
] as const;
