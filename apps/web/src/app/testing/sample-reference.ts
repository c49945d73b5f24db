import { type FormingReference } from '@brakeven/contract';

const MATERIAL: FormingReference['materials'][number] = {
  code: 'mild-steel',
  name: 'Mild steel',
  aliases: ['steel'],
  gaugeSystem: 'steel',
  tensileMinMpa: null,
  tensileUsedMpa: '413.685',
  tensileSource: '60 ksi, common practice',
  densityKgM3: '7850',
  densitySource: '7850 kg/m³',
  radiusPerOpening: '0.16',
  radiusSource: 'common practice',
  origin: 'shipped',
};

/** A press of 60 US tons with one punch and a block of four openings, and mild steel to bend. */
export function sampleReference(change: Partial<FormingReference> = {}): FormingReference {
  const widths = ['19.05', '25.4', '31.75', '38.1'];
  return {
    forceLinePercent: '80',
    machines: [
      {
        machineId: 'm2',
        code: 'P2',
        name: 'Press 2',
        kind: 'Press brake',
        ratedForceKn: '533.78659',
        bedLengthMm: '1828.8',
      },
    ],
    materials: [MATERIAL, { ...MATERIAL, code: 's275jr', name: 'S275JR', tensileUsedMpa: '580' }],
    gauges: [],
    punches: [
      {
        punchId: 'punch-1',
        machineId: 'm2',
        name: 'Long punch',
        noseRadiusMm: '1.5875',
        angle: '85',
        lengthMm: '1828.8',
        forceLimitKnPerM: null,
      },
    ],
    dies: [
      {
        dieId: 'die-1',
        machineId: 'm2',
        name: 'Four-way block',
        lengthMm: '1828.8',
        forceLimitKnPerM: '800',
        openings: widths.map((openingMm, index) => ({
          dieOpeningId: `opening-${index + 1}`,
          openingMm,
          angle: '85',
          shoulderRadiusMm: '2',
        })),
      },
    ],
    ...change,
  };
}
