import { type Stress, toStress } from '@brakeven/values';
import { type GaugeSystem } from './gauges';

/** A material that is bent, with the figures that forces, weights and radii are computed from. */
export interface FormingMaterial {
  /** The name in commands and links. */
  code: string;
  name: string;
  /** Other names under which it is found, in lower case. */
  aliases: readonly string[];
  gaugeSystem: GaugeSystem;
  /** Lowest tensile strength that the standard allows; null where it specifies none. */
  tensileMin: Stress | null;
  /** The strength that forces are computed with: the upper end that is published, as a minimum is not safe here. */
  tensileUsed: Stress;
  tensileSource: string;
  densityGPerCm3: number;
  densitySource: string;
  /** Inside radius of an air bend ÷ die opening. */
  radiusPerOpening: number;
  radiusSource: string;
}

const CHART = 'common practice, no published source';
const STEEL_DENSITY = {
  densityGPerCm3: 7.85,
  densitySource: '7850 kg/m³, the convention of EN 1991 and EN 10025 for structural steel',
};
const STEEL_RADIUS = {
  radiusPerOpening: 0.16,
  radiusSource: `16 % of the die opening for mild steel, used for all carbon steels (${CHART})`,
};
const CARBON_STEEL = { gaugeSystem: 'steel', ...STEEL_DENSITY, ...STEEL_RADIUS } as const;

const mpa = (value: number): Stress => toStress(value, 'MPa');
const ksi = (value: number): Stress => toStress(value, 'ksi');

/** The materials that are shipped; a shop may keep others of its own. */
export const MATERIALS: readonly FormingMaterial[] = [
  {
    ...CARBON_STEEL,
    code: 'mild-steel',
    name: 'Mild steel',
    aliases: ['steel', 'ms'],
    tensileMin: null,
    tensileUsed: ksi(60),
    tensileSource: `60 ksi, the strength that shop charts for mild steel are made for (${CHART})`,
  },
  {
    ...CARBON_STEEL,
    code: 'a36',
    name: 'ASTM A36 plate',
    aliases: ['astm a36', 'a-36'],
    tensileMin: ksi(58),
    tensileUsed: ksi(80),
    tensileSource: 'ASTM A36: 58 to 80 ksi; the upper end is used',
  },
  {
    ...CARBON_STEEL,
    code: 'a1011-cs',
    name: 'Hot-rolled sheet, ASTM A1011 CS',
    aliases: ['a1011', 'hot-rolled', 'hrpo'],
    tensileMin: null,
    tensileUsed: ksi(60),
    tensileSource: `ASTM A1011 CS specifies no tensile strength; 60 ksi as for mild steel (${CHART})`,
  },
  {
    ...CARBON_STEEL,
    code: 'a1008-cs',
    name: 'Cold-rolled sheet, ASTM A1008 CS',
    aliases: ['a1008', 'cold-rolled', 'crs'],
    tensileMin: null,
    tensileUsed: ksi(60),
    tensileSource: `ASTM A1008 CS specifies no tensile strength; 60 ksi as for mild steel (${CHART})`,
  },
  {
    ...CARBON_STEEL,
    code: 'galvanized',
    name: 'Galvanized sheet, ASTM A653 CS',
    aliases: ['a653', 'galvanised', 'galvanized steel', 'galv'],
    gaugeSystem: 'galvanized',
    tensileMin: null,
    tensileUsed: ksi(60),
    tensileSource: `ASTM A653 CS specifies no tensile strength; 60 ksi as for mild steel (${CHART})`,
    densitySource: '7850 kg/m³ as for the steel; use the ordered weight where the zinc matters',
  },
  {
    code: 'stainless-304',
    name: 'Stainless 304, ASTM A240',
    aliases: ['304', 'stainless', 'stainless steel', '304l'],
    gaugeSystem: 'stainless',
    tensileMin: ksi(75),
    tensileUsed: ksi(90),
    tensileSource: `ASTM A240 type 304: 75 ksi (515 MPa) at least; sheet as supplied reaches 90 ksi, 1.5 times mild steel (${CHART})`,
    densityGPerCm3: 8,
    densitySource: '8.00 g/cm³, alloy data sheets for type 304',
    radiusPerOpening: 0.21,
    radiusSource: `20 to 22 % of the die opening (${CHART})`,
  },
  {
    code: 'aluminium-5052-h32',
    name: 'Aluminium 5052-H32, ASTM B209',
    aliases: ['5052', '5052-h32', 'aluminum', 'aluminium', 'aluminum-5052-h32', 'aluminum 5052'],
    gaugeSystem: 'aluminium',
    tensileMin: ksi(31),
    tensileUsed: ksi(33),
    tensileSource:
      'ASTM B209 5052-H32: 31 ksi (215 MPa) at least; 33 ksi (228 MPa) typical in alloy data sheets',
    densityGPerCm3: 2.68,
    densitySource: '2.68 g/cm³, alloy data sheet for 5052',
    radiusPerOpening: 0.14,
    radiusSource: `13 to 15 % of the die opening (${CHART})`,
  },
  {
    code: 'aluminium-6061-t6',
    name: 'Aluminium 6061-T6, ASTM B209',
    aliases: ['6061', '6061-t6', 'aluminum-6061-t6', 'aluminum 6061'],
    gaugeSystem: 'aluminium',
    tensileMin: ksi(42),
    tensileUsed: ksi(45),
    tensileSource:
      'ASTM B209 6061-T6: 42 ksi (290 MPa) at least; 45 ksi (310 MPa) typical in alloy data sheets',
    densityGPerCm3: 2.7,
    densitySource: '2.70 g/cm³, alloy data sheet for 6061',
    radiusPerOpening: 0.14,
    radiusSource: `as for 5052-H32, 13 to 15 % of the die opening (${CHART}); 6061-T6 may crack at this radius`,
  },
  {
    ...CARBON_STEEL,
    code: 's235jr',
    name: 'S235JR, EN 10025-2',
    aliases: ['s235'],
    tensileMin: mpa(360),
    tensileUsed: mpa(510),
    tensileSource: 'EN 10025-2: 360 to 510 MPa; the upper end is used',
  },
  {
    ...CARBON_STEEL,
    code: 's275jr',
    name: 'S275JR, EN 10025-2',
    aliases: ['s275'],
    tensileMin: mpa(410),
    tensileUsed: mpa(580),
    tensileSource:
      'EN 10025-2: 430 to 580 MPa below 3 mm, 410 to 560 MPa from there; the upper end of both is used',
  },
  {
    ...CARBON_STEEL,
    code: 's355jr',
    name: 'S355JR, EN 10025-2',
    aliases: ['s355'],
    tensileMin: mpa(470),
    tensileUsed: mpa(680),
    tensileSource:
      'EN 10025-2: 510 to 680 MPa below 3 mm, 470 to 630 MPa from there; the upper end of both is used',
  },
];

/** Finds a material by its code, name or an alias, whatever the case; among those shipped if no others are given. */
export function findMaterial(
  text: string,
  materials: readonly FormingMaterial[] = MATERIALS,
): FormingMaterial | undefined {
  const plain = text.trim().toLowerCase();
  return materials.find(
    ({ code, name, aliases }) => code === plain || name.toLowerCase() === plain || aliases.includes(plain),
  );
}
