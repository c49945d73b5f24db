import { lengthIn } from '@brakeven/values';
import fc from 'fast-check';
import { findGaugeInches, GAUGE_SYSTEMS, type GaugeSystem, listGauges } from './gauges';
import { findMaterial, MATERIALS } from './materials';
import { parseAngle } from './parse-angle';
import { findResultUnit, parseThickness } from './parse-thickness';

const inchesOf = (text: string, system: GaugeSystem | null = 'steel') => {
  const read = parseThickness(text, system, 'in');
  return read.ok ? lengthIn(read.value.thickness, 'in').toNumber() : read.code;
};

describe('a thickness', () => {
  it.each([
    ['10 ga', 0.1345],
    ['10ga', 0.1345],
    ['#16 gauge', 0.0598],
    ['16 GAGE', 0.0598],
    ['3/16', 0.1875],
    ['1 1/2 in', 1.5],
    ['4.5mm', 4.5 / 25.4],
    ['0.1345"', 0.1345],
    ["5'", 60],
    ['0.06', 0.06],
  ])('is read from %p', (text, inches) => {
    expect(inchesOf(text)).toBeCloseTo(Number(inches), 12);
  });

  it('is read from the gauges of a shop that has its own', () => {
    const findGauge = (system: GaugeSystem, gauge: number) =>
      system === 'stainless' && gauge === 10 ? 0.134 : undefined;
    const read = parseThickness('10 ga', 'stainless', 'in', findGauge);
    expect(read.ok && lengthIn(read.value.thickness, 'in').toNumber()).toBe(0.134);
    expect(parseThickness('10 ga', 'steel', 'in', findGauge)).toMatchObject({ code: 'unknown_gauge' });
  });

  it('is refused as a gauge without a material, and where the table has no such gauge', () => {
    expect(parseThickness('16 ga', null, 'in')).toMatchObject({
      code: 'gauge_needs_material',
      message: expect.stringContaining('Say the material'),
    });
    expect(inchesOf('31 ga')).toBe('unknown_gauge');
    expect(inchesOf('2 ga')).toBe('unknown_gauge');
    expect(parseThickness('7 ga', 'galvanized', 'in')).toMatchObject({
      message: expect.stringContaining('8 ga to 30 ga'),
    });
  });

  it.each(['', 'thin', 'ga', '10 gs', '-3 mm', 'NaN', '1/0', '3,5 mm', '1e-400'])(
    'is not read from %p',
    (text) => {
      expect(parseThickness(text, 'steel', 'in')).toMatchObject({
        ok: false,
        message: expect.stringContaining('such as 10 ga'),
      });
    },
  );
});

it('every gauge is read as its table prints it, and the note of its system comes along', () => {
  fc.assert(
    fc.property(fc.constantFrom(...GAUGE_SYSTEMS), fc.integer({ min: 8, max: 30 }), (system, gauge) => {
      const read = parseThickness(`${gauge} ga`, system, 'mm');
      expect(read.ok && lengthIn(read.value.thickness, 'in').toNumber()).toBe(findGaugeInches(system, gauge));
      expect(read.ok && read.value.note).toBeTruthy();
    }),
  );
});

it.each([
  [['10 ga', '1200 mm'], 'in'],
  [['12', '1200 mm'], 'mm'],
  [['1.2 m', '1 in'], 'mm'],
  [["5'", '3 mm'], 'in'],
  [['3/16', '3 mm'], 'in'],
  [['12', '4'], 'in'],
])('the results of %j are in %s', (texts, unit) => {
  expect(findResultUnit(texts)).toBe(unit);
});

describe('gauges', () => {
  // Source: ounces per square foot of each gauge number, U.S. Standard Gauge (15 U.S.C. 206).
  const OUNCES = [
    160, 150, 140, 130, 120, 110, 100, 90, 80, 70, 60, 50, 45, 40, 36, 32, 28, 24, 22, 20, 18, 16, 14, 12, 11,
    10, 9, 8,
  ];

  it.each(OUNCES.map((ounces, index) => [index + 3, ounces]))(
    '%d follow from the published rules',
    (gauge, ounces) => {
      // Sources: 41.82 lb/ft² per inch and 2.5 oz of zinc; 640 oz per inch; 0.005 in × 92^((36 − n)/39), ASTM B258.
      expect(findGaugeInches('steel', gauge)).toBeCloseTo(ounces / 16 / 41.82, 4);
      expect(findGaugeInches('stainless', gauge)).toBe(ounces / 640);
      expect(findGaugeInches('aluminium', gauge)).toBeCloseTo(0.005 * 92 ** ((36 - gauge) / 39), 4);
      const galvanized = findGaugeInches('galvanized', gauge);
      if (gauge < 8) expect(galvanized).toBeUndefined();
      else expect(galvanized).toBeCloseTo((ounces + 2.5) / 16 / 41.82, 4);
    },
  );

  it('are another thickness in each system', () => {
    expect(GAUGE_SYSTEMS.map((system) => findGaugeInches(system, 16))).toEqual([
      0.0598, 0.0635, 0.0625, 0.0508,
    ]);
    expect(listGauges('galvanized')).toHaveLength(23);
    expect(findGaugeInches('steel', 10.5)).toBeUndefined();
  });
});

describe('materials', () => {
  it('are found by one name only, and each names its sources', () => {
    const names = MATERIALS.flatMap(({ code, name, aliases }) => [code, name.toLowerCase(), ...aliases]);
    expect(new Set(names).size).toBe(names.length);
    for (const material of MATERIALS) {
      expect(findMaterial(` ${material.code.toUpperCase()} `)).toBe(material);
      expect(material.tensileSource + material.densitySource + material.radiusSource).toMatch(
        /(ASTM|EN|practice|data)/,
      );
      expect(material.tensileMin === null || material.tensileMin.lte(material.tensileUsed)).toBe(true);
    }
    expect(findMaterial('unobtainium')).toBeUndefined();
  });

  it('compute mild steel with 60 ksi', () => {
    expect(findMaterial('mild-steel')?.tensileUsed.toFixed(6)).toBe('413.685438');
  });
});

it.each([
  ['90', 90],
  ['92.5°', 92.5],
  ['90 deg', 90],
])('the angle %p is %d', (text, angle) => {
  expect(parseAngle(text)).toEqual({ ok: true, value: angle });
});

it.each(['', 'square', '-90', '1e2', '90 rad', 'NaN'])('%p is no angle', (text) => {
  expect(parseAngle(text)).toMatchObject({
    code: 'not_an_angle',
    message: expect.stringContaining('20 to 175'),
  });
});
