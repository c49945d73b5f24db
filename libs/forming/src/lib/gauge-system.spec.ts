import { findGaugeSystem } from './gauge-system';

it.each([
  [['a1011', '11 ga hot-rolled'], 'steel'],
  [['', 'Mild steel 3/16'], 'steel'],
  [['G90', 'Galvanized steel sheet 16 ga'], 'galvanized'],
  [['304', '14 ga 304 2B'], 'stainless'],
  [['304-2B', 'Kitchen sheet'], 'stainless'],
  [['5052-H32', 'Tread plate'], 'aluminium'],
  [['', 'Aluminum 1/8'], 'aluminium'],
  [['', 'Copper 20 ga'], null],
])('finds the gauge system of %j: %s', (texts, system) => {
  expect(findGaugeSystem(texts)).toBe(system);
});
