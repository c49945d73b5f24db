import { parseTrialTable } from './trial-table';

const HEADER = [
  'opening (mm)',
  'thickness (mm)',
  'punchRadius (mm)',
  'shoulderRadius (mm)',
  'depth (mm)',
  'angle (deg)',
];
const ROW = ['16', '2', '1', '2', '103.4', '90.5'];
const TRIAL = {
  openingMm: 16,
  thicknessMm: 2,
  punchRadiusMm: 1,
  shoulderRadiusMm: 2,
  depthMm: 103.4,
  insideAngle: 90.5,
};

it('reads a row by the names of its columns, wherever they stand', () => {
  expect(parseTrialTable(HEADER, [ROW])).toEqual({ ok: true, value: { trials: [TRIAL], unit: 'mm' } });
  const shuffled = parseTrialTable(['who', ...HEADER.slice().reverse()], [['Ada', ...ROW.slice().reverse()]]);
  expect(shuffled).toMatchObject({ value: { trials: [TRIAL] } });
});

it.each([
  ['opening_mm', 'thickness mm', 'punch radius [mm]', 'shoulder-radius (mm)', 'depthMm', 'angle'],
  ['Opening, mm', 'THICKNESS (MM)', 'PunchRadius_mm', 'shoulder_radius_mm', 'depth(mm)', 'angle °'],
])('reads headers as people write them: %s …', (...header) => {
  expect(parseTrialTable(header, [ROW])).toMatchObject({ ok: true, value: { trials: [TRIAL] } });
});

it('turns inches into millimetres, fractions and readings below nought too', () => {
  const header = HEADER.map((text) => text.replace('mm', 'in'));
  const read = parseTrialTable(header, [['5/8', '0.0747', '1/32', '0.0625', '-0.125', '91']]);
  expect(read).toMatchObject({
    value: { unit: 'in', trials: [{ openingMm: 15.875, depthMm: -3.175, insideAngle: 91 }] },
  });
});

it.each([
  [['opening (mm)', ...HEADER.slice(2)], ROW, 'column_missing'],
  [[...HEADER, 'depth (in)'], ROW, 'column_twice'],
  [['opening', ...HEADER.slice(1)], ROW, 'unit_missing'],
  [['opening (yd)', ...HEADER.slice(1)], ROW, 'unknown_unit'],
  [[...HEADER.slice(0, 5), 'angle (rad)'], ROW, 'unknown_unit'],
  [HEADER, ['16', '2', '1', '2', '', '90'], 'cell_not_a_number'],
  [HEADER, ['16', '2', '1', '2', '--3', '90'], 'cell_not_a_number'],
  [HEADER, ['16', '2', '1', '2', '103,4', '90'], 'cell_not_a_number'],
  [HEADER, ['16', '2', '1', '2', '103.4', 'square'], 'cell_not_a_number'],
  [HEADER, ['16'], 'cell_not_a_number'],
])('header %j with %j is refused as %s', (header, row, code) => {
  expect(parseTrialTable(header, [row])).toMatchObject({ ok: false, code });
});

it('names row and column of a cell that cannot be read', () => {
  const read = parseTrialTable(HEADER, [ROW, ['16', '2', '1', '2', 'deep', '90']]);
  expect(read).toMatchObject({ message: expect.stringMatching(/Row 3, depth: 'deep'/) });
});

it('has a limit to how many bends are fitted at once', () => {
  expect(
    parseTrialTable(
      HEADER,
      Array.from({ length: 1001 }, () => ROW),
    ),
  ).toMatchObject({ code: 'too_many_bends' });
});
