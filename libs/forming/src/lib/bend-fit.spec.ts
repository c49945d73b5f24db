import { toForce, toStress } from '@brakeven/values';
import { computeBendFit, findLongestBend, findOpeningNeeded, findThickestSheet } from './bend-fit';
import { computeBendForce } from './bend-force';
import { type FitInput, type OwnedOpening } from './fit-row';

const INCH = 25.4;
const opening = (inches: number, more: Partial<OwnedOpening> = {}): OwnedOpening => ({
  code: `V${inches}`,
  openingMm: inches * INCH,
  dieAngle: 85,
  lengthMm: 10 * 12 * INCH,
  ratedKnPerM: null,
  ...more,
});

function inputOf(more: Partial<FitInput> = {}): FitInput {
  return {
    tensileMpa: toStress(60, 'ksi').toNumber(),
    radiusPerOpening: 0.16,
    thicknessMm: 0.1345 * INCH,
    lengthMm: 72 * INCH,
    insideAngle: 90,
    flangeMm: 2 * INCH,
    press: { ratedKn: toForce(90, 'US ton').toNumber(), bedLengthMm: 10 * 12 * INCH },
    punch: { noseRadiusMm: 1, angle: 85, ratedKnPerM: null },
    openings: [0.5, 0.75, 1, 1.5, 2].map((inches) => opening(inches)),
    lineShare: 0.8,
    ...more,
  };
}

const codesOf = (input: FitInput) =>
  Object.fromEntries(
    computeBendFit(input).rows.map((row) => [row.opening.code, row.objections.map(({ code }) => code)]),
  );

describe('the openings that are owned', () => {
  it('are judged row by row, and the one nearest to the usual ratio is best', () => {
    const fit = computeBendFit(inputOf());
    expect(fit.best).toBe('V1');
    expect(fit.reason).toContain('7.4 is nearest to the usual 8 to 10, at 69 % of the rating');
    expect(fit.rows.map(({ verdict }) => verdict)).toEqual(['no', 'no', 'fits', 'fits', 'with-care']);
  });

  it('take the higher of the two rules against the rating', () => {
    const row = computeBendFit(inputOf()).rows[2];
    // 62.41 US tons by the 575 rule, of 90
    expect(row?.share).toBeCloseTo(62.41 / 90, 4);
    expect(row?.rating?.of).toBe('press');
    expect(row?.insideRadiusMm).toBeCloseTo(0.16 * INCH, 10);
  });

  it('say each objection', () => {
    const objections = codesOf(inputOf({ flangeMm: INCH }));
    expect(objections).toMatchObject({
      'V0.5': expect.arrayContaining(['over_rating', 'opening_narrow']),
      V1: [],
    });
    expect(objections['V1.5']).toEqual(['flange_too_short']);
    expect(objections['V0.75']).toContain('over_line');
    expect(codesOf(inputOf({ insideAngle: 80 })).V1).toContain('angle_too_sharp');
    expect(codesOf(inputOf({ lengthMm: 11 * 12 * INCH })).V1).toContain('too_long');
    expect(codesOf(inputOf({ thicknessMm: 0.5 * INCH }))['V0.5']).toContain('thickness_over_opening');
  });

  it('go by the rating of the die where that is lower', () => {
    const weak = opening(1, { ratedKnPerM: 250 });
    const [row] = computeBendFit(inputOf({ openings: [weak] })).rows;
    expect(row?.rating).toEqual({ of: 'die', ratedKn: expect.closeTo(250 * 1.8288, 8) });
    expect(row?.objections.map(({ code }) => code)).toEqual(['over_rating']);
  });

  it('are taken with care where no rating is known, and that is said', () => {
    const fit = computeBendFit(inputOf({ press: { ratedKn: null, bedLengthMm: null } }));
    expect(fit.best).toBe('V1');
    expect(fit.reason).toContain('No rating of press, punch or die is known');
  });

  it('may all be wrong, or none at all', () => {
    expect(computeBendFit(inputOf({ openings: [opening(0.25)] })).best).toBeNull();
    expect(computeBendFit(inputOf({ openings: [] })).reason).toContain('Enter the dies');
  });
});

describe('common practice, no published source', () => {
  it.each([
    ['1/4 in', 0.25, 2],
    ['14 gauge', 0.0747, 0.75],
    ['16 gauge', 0.0598, 0.5],
    ['3/4 in', 0.75, 8],
  ])('%s (%d in) is bent on %d in', (_, thickness, best) => {
    const fit = computeBendFit(
      inputOf({
        thicknessMm: thickness * INCH,
        lengthMm: 12 * INCH,
        flangeMm: null,
        openings: [0.375, 0.5, 0.75, 1, 1.25, 2, 3, 8].map((size) => opening(size)),
      }),
    );
    expect(fit.best).toBe(`V${best}`);
  });

  it('where two openings are usual the narrower one is taken', () => {
    const openings = [2.5, 2.25, 2].map((size) => opening(size));
    expect(computeBendFit(inputOf({ thicknessMm: 0.25 * INCH, lengthMm: 100, openings })).best).toBe('V2');
  });
});

describe('the other way round', () => {
  const press = { ratedKn: toForce(90, 'US ton').toNumber(), bedLengthMm: 14 * 12 * INCH };
  const die = opening(1, { lengthMm: null });
  const shareOf = (input: FitInput, openingMm: number) =>
    computeBendForce({ ...input, openingMm }).highKn / (press.ratedKn ?? NaN);

  it('the longest bend uses the line up', () => {
    const input = inputOf({ press });
    const limit = findLongestBend(input, die);
    if (!limit.found) throw new Error(limit.words);
    expect(shareOf({ ...input, lengthMm: limit.valueMm }, die.openingMm)).toBeCloseTo(0.8, 8);
  });

  it('the thickest sheet uses the line up', () => {
    const input = inputOf({ press });
    const limit = findThickestSheet(input, die);
    if (!limit.found) throw new Error(limit.words);
    expect(shareOf({ ...input, thicknessMm: limit.valueMm }, die.openingMm)).toBeCloseTo(0.8, 8);
  });

  it('the opening needed uses the line up', () => {
    const input = inputOf({ press, lengthMm: 120 * INCH });
    const limit = findOpeningNeeded(input);
    if (!limit.found) throw new Error(limit.words);
    expect(shareOf(input, limit.valueMm)).toBeCloseTo(0.8, 8);
  });

  it('ends at bed and tools where the force leaves room', () => {
    const short = inputOf({ thicknessMm: 0.5, press: { ...press, bedLengthMm: 500 } });
    expect(findLongestBend(short, die)).toMatchObject({ found: true, valueMm: 500 });
    expect(findThickestSheet(inputOf({ press, lengthMm: 10 }), die)).toMatchObject({ valueMm: INCH / 5 });
    expect(findOpeningNeeded(inputOf({ press, lengthMm: 10 }))).toMatchObject({
      valueMm: expect.closeTo(5 * 0.1345 * INCH, 8),
    });
  });

  it('has no answer without a rating', () => {
    const unrated = inputOf({ press: { ratedKn: null, bedLengthMm: null } });
    expect(findLongestBend(unrated, die).found).toBe(false);
    expect(findOpeningNeeded(unrated).found).toBe(false);
  });

  it('refuses what cannot be', () => {
    expect(() => findLongestBend(inputOf({ lineShare: 0 }), die)).toThrow(RangeError);
    expect(() => computeBendFit(inputOf({ insideAngle: NaN }))).toThrow(/such as 90/);
  });
});
