import { AppError } from '@brakeven/contract';
import { estimateBlank } from './estimate-blank';
import { type DepthEstimate, estimateDepth } from './estimate-depth';
import { estimateForce } from './estimate-force';

const refusalOf = (work: () => unknown): AppError => {
  try {
    work();
  } catch (error) {
    if (error instanceof AppError) return error;
    throw error;
  }
  throw new Error('Nothing was refused.');
};
const fieldsOf = (work: () => unknown) => refusalOf(work).issues.map(({ field, code }) => [field, code]);

describe('a force', () => {
  const question = { material: 'mild-steel', thickness: '0.25in', length: '10ft', opening: '2 in' };

  // Worked values: 1/4 in on 2 in, 10 ft at 60 ksi: 179.69 US tons by 575·t²·L/V, 168.75 by Oehler (1598.6, 1501.3 kN).
  it('is in US tons where the first length is in inches, feet or a gauge', () => {
    expect(estimateForce(question)).toMatchObject({
      forceLow: 168.75,
      forceHigh: 179.6875,
      unit: 'US ton',
      rules: [
        { rule: 'shop-575', force: 179.6875 },
        { rule: 'oehler', force: 168.75 },
      ],
      openingOverThickness: 8,
      insideRadius: 0.32,
      shortestFlange: expect.closeTo(1.414214, 6),
      lengthUnit: 'in',
      tensile: { value: 60, unit: 'ksi' },
    });
  });

  it('is the same in kN where it is in millimetres', () => {
    const metric = estimateForce({ ...question, thickness: '6.35 mm' });
    expect(metric).toMatchObject({ unit: 'kN', lengthUnit: 'mm', length: 3048, opening: 50.8 });
    expect(metric.forceHigh).toBeCloseTo(1598.58, 2);
    expect(metric.forceLow).toBeCloseTo(1501.275, 2);
  });

  it('goes by the order in which lengths are given, and reads bare numbers in that unit', () => {
    const { thickness: _thickness, ...rest } = question;
    const estimate = estimateForce({ ...rest, length: '1200 mm', opening: '24', thickness: '10 ga' });
    expect(estimate).toMatchObject({ lengthUnit: 'mm', opening: 24, thickness: 3.4163 });
  });

  it('takes a strength that is given, and the punch where it is blunt', () => {
    const estimate = estimateForce({ ...question, tensile: '120 ksi', punchRadius: '1/2' });
    expect(estimate).toMatchObject({
      forceHigh: 359.375,
      insideRadius: 0.5,
      tensile: { source: 'As given.' },
    });
  });

  it.each([
    [{ thickness: '0' }, ['thickness', 'out_of_range']],
    [{ thickness: '-1 mm' }, ['thickness', 'negative']],
    [{ thickness: 'NaN' }, ['thickness', 'not_a_quantity']],
    [{ thickness: '45 ga' }, ['thickness', 'unknown_gauge']],
    [{ opening: '2 furlongs' }, ['opening', 'unknown_unit']],
    [{ opening: '1/4 in' }, ['opening', 'thickness_over_opening']],
    [{ length: '1e5 ft' }, ['length', 'unknown_unit']],
    [{ length: '0' }, ['length', 'out_of_range']],
    [{ material: 'cheese' }, ['material', 'unknown_material']],
    [{ tensile: '60 bar' }, ['tensile', 'unknown_unit']],
    [{ punchRadius: '40 in' }, ['punchRadius', 'out_of_range']],
  ])('of %j is refused, field and reason named once', (wrong, issue) => {
    expect(fieldsOf(() => estimateForce({ ...question, ...wrong }))).toEqual([issue]);
  });

  it('tells everything that is wrong at once', () => {
    const fields = fieldsOf(() =>
      estimateForce({ ...question, thickness: 'thin', length: '-2', opening: '0' }),
    );
    expect(fields.map(([field]) => field)).toEqual(['thickness', 'length', 'opening']);
  });
});

describe('a blank', () => {
  // Worked value with 30 digits: R 2, t 2, K 0.446, 90°: a deduction of 3.457 257.
  const question = { flanges: '40mm,60,40mm', angles: '90,90', thickness: '2mm', radius: '2mm', k: '0.446' };

  it('has flat, deductions and gauge in the unit of its first flange', () => {
    expect(estimateBlank(question)).toMatchObject({
      flat: 133.085486,
      deductions: [3.457257, 3.457257],
      gauge: [38.271371, 58.271371],
      unit: 'mm',
      k: { value: 0.446, source: 'given' },
      weight: null,
      layouts: [],
    });
  });

  it('is the same in inches', () => {
    const inches = estimateBlank({ ...question, flanges: '1 1/2", 3, 1 1/2 in' });
    expect(inches.unit).toBe('in');
    expect(inches.flat).toBeCloseTo(6 - (2 * 3.457257) / 25.4, 5);
  });

  it('takes K from the radius unless told otherwise', () => {
    const { k: _k, ...open } = question;
    expect(estimateBlank(open).k).toMatchObject({ value: 0.325, source: 'radius' });
    expect(estimateBlank({ ...open, kFrom: 'half-hard' }).k.value).toBeCloseTo(0.4074, 4);
    const trial = ['96.542743 mm: 40 mm, 60 mm'];
    expect(estimateBlank({ ...open, trial }).k).toMatchObject({ value: 0.446, source: 'trials' });
  });

  it('weighs a piece and lays it on a sheet both ways', () => {
    const blank = estimateBlank({ ...question, material: '304', width: '300', sheet: '1220 x 2440mm' });
    expect(blank.weight).toEqual({ value: expect.closeTo(133.085486 * 300 * 2 * 8e-6, 5), unit: 'kg' });
    expect(blank.layouts.map(({ grain, pieces }) => [grain, pieces])).toEqual([
      ['bends-across-grain', 72],
      ['bends-along-grain', 72],
    ]);
    expect(estimateBlank({ ...question, width: '300', sheet: '48inx96in' }).layouts).toHaveLength(2);
  });

  it('states the convention of a sharp angle beside it', () => {
    const [, sharp] = estimateBlank({ ...question, angles: '90,60' }).bends;
    expect(sharp).toMatchObject({ convention: 'outside-tangent', turned: 120 });
    expect(sharp?.conventionWords).toContain('tangent of the bend');
  });

  it.each([
    [{ angles: '90' }, ['angles', 'counts_differ']],
    [{ angles: '90,180' }, ['angles', 'out_of_range']],
    [{ angles: '90,square' }, ['angles', 'not_an_angle']],
    [{ flanges: '40mm,,40mm' }, ['flanges', 'not_a_quantity']],
    [{ thickness: '14 ga' }, ['thickness', 'gauge_needs_material']],
    [{ k: '0,44' }, ['k', 'out_of_range']],
    [{ k: '-1' }, ['k', 'out_of_range']],
    [{ k: undefined, radius: '0' }, ['k', 'radius_too_small_for_k']],
    [{ k: undefined, kFrom: 'guess' }, ['kFrom', 'unknown_source']],
    [{ k: undefined, trial: ['100'] }, ['trial', 'not_a_quantity']],
    [{ sheet: '48 x 96' }, ['width', 'required']],
    [{ width: '300', sheet: '48' }, ['sheet', 'not_a_sheet']],
    [{ width: '0', sheet: '1220x2440' }, ['width', 'out_of_range']],
  ])('of %j is refused, field and reason named', (wrong, issue) => {
    expect(fieldsOf(() => estimateBlank({ ...question, ...wrong }))).toContainEqual(issue);
  });
});

describe('a ram depth', () => {
  const HEADER = 'opening (mm),thickness (mm),punchRadius (mm),shoulderRadius (mm),depth (mm),angle (deg)';

  /** A reading by the closed form with a datum of 100 mm and 2° of springback, to be fitted from a file. */
  const reading = (angle: number, t = 2): number => {
    const alpha = ((182 - angle) * Math.PI) / 360;
    return 100 + 8 * Math.tan(alpha) - (2.56 + t + 2) * (1 / Math.cos(alpha) - 1) - t;
  };
  const fileOf = (rows: readonly string[], header = HEADER, name = 'trials.csv') => ({
    name,
    bytes: new TextEncoder().encode([header, ...rows].join('\n')),
  });
  const rowOf = (angle: number, t = 2) => `16,${t},1,2,${reading(angle, t)},${angle}`;
  const file = fileOf([75, 90, 105, 130].map((angle) => rowOf(angle)));
  const refused = async (work: Promise<unknown>) =>
    work.then(
      () => 'answered',
      (error: AppError) => [error.code, error.issues[0]?.code],
    );

  it('is answered from a file, with datum, springback and errors', async () => {
    const answer = (await estimateDepth(file, { angle: '90' })) as DepthEstimate;
    expect(answer.depth).toBeCloseTo(reading(90), 5);
    expect(answer).toMatchObject({
      unit: 'mm',
      bendCount: 4,
      isGuess: false,
      setup: { opening: 16, thickness: 2 },
    });
    expect(answer.datum).toBeCloseTo(100, 4);
    expect(answer.springback).toBeCloseTo(2, 3);
    expect(answer.rmsAngle).toBe(0);
  });

  it('is answered the other way round', async () => {
    const answer = await estimateDepth(file, { atDepth: `${reading(88)} mm` });
    expect('insideAngle' in answer && answer.insideAngle).toBeCloseTo(88, 4);
  });

  it('is answered for another sheet as a guess', async () => {
    const answer = (await estimateDepth(file, { angle: '90', thickness: '2.4 mm' })) as DepthEstimate;
    expect(answer.isGuess).toBe(true);
    expect(answer.depth).toBeCloseTo(reading(90, 2.4), 4);
    expect(answer.workings.map(({ rule }) => rule).join(' ')).toContain('a guess');
  });

  it('is answered for the sheet that was bent most, readings in inches', async () => {
    const inches = (angle: number, t: number) =>
      `0.6299212598,${t / 25.4},0.04,0.0787401575,${reading(angle, t) / 25.4},${angle}`;
    const rows = [inches(80, 1.5), inches(75, 2), inches(90, 2), inches(130, 2)];
    const answer = await estimateDepth(fileOf(rows, HEADER.replaceAll('mm', 'in')), { angle: '90' });
    expect(answer).toMatchObject({ unit: 'in', setup: { thickness: expect.closeTo(2 / 25.4, 5) } });
    expect('depth' in answer && answer.depth * 25.4).toBeCloseTo(reading(90), 3);
  });

  it('is refused with the reason', async () => {
    expect(await refused(estimateDepth(file, {}))).toEqual(['invalid_input', 'required']);
    expect(await refused(estimateDepth(file, { angle: '60' }))).toEqual(['invalid_input', 'beyond_trials']);
    expect(await refused(estimateDepth(file, { angle: 'ninety' }))).toEqual([
      'invalid_input',
      'not_an_angle',
    ]);
    expect(await refused(estimateDepth(file, { angle: '90', material: 'cheese' }))).toEqual([
      'invalid_input',
      'unknown_material',
    ]);
    expect(await refused(estimateDepth(file, { angle: '90', thickness: '14 ga' }))).toEqual([
      'invalid_input',
      'gauge_needs_material',
    ]);
    expect(await refused(estimateDepth(fileOf([rowOf(90)]), { angle: '90' }))).toEqual([
      'invalid_input',
      'too_few_bends',
    ]);
    expect(await refused(estimateDepth(fileOf([], 'depth'), { angle: '90' }))).toEqual([
      'invalid_input',
      'unit_missing',
    ]);
    expect(await refused(estimateDepth(fileOf(['16,2,1,2,,90']), { angle: '90' }))).toEqual([
      'invalid_input',
      'cell_not_a_number',
    ]);
    expect(await refused(estimateDepth(fileOf([], 'who,when'), { angle: '90' }))).toEqual([
      'invalid_input',
      'column_missing',
    ]);
    expect(await refused(estimateDepth(fileOf([], HEADER, 'trials.pdf'), { angle: '90' }))).toEqual([
      'file_refused',
      undefined,
    ]);
  });
});
