import fc from 'fast-check';
import { checkBlankInput, computeBlank, pieceMassKg } from './blank';
import { computeLayouts } from './sheet-layout';
import { findKFactor } from './k-factor';

const channel = { flangesMm: [40, 60, 40], insideAngles: [90, 90], thicknessMm: 2, radiusMm: 2, k: 0.446 };

// Source: a published 90° deduction of 3.4573 at R 2, t 2, K 0.446 (worked with 30 digits apart from this code).
it('a channel is its outside flanges less a deduction each', () => {
  const blank = computeBlank(channel);
  expect(blank.flatMm).toBeCloseTo(140 - 2 * 3.457257, 5);
  expect(blank.bends.map((bend) => bend.gaugeMm)).toEqual(
    [40, 60].map((flange) => expect.closeTo(flange - 3.457257 / 2, 5)),
  );
  expect(blank.bends[1]?.bendLineMm).toBeCloseTo(100 - 1.5 * 3.457257, 5);
  expect(blank.bends[0]?.gaugeTurnedRoundMm).toBeCloseTo(60 - 3.457257 / 2, 5);
});

it('a sharp part names its convention', () => {
  // Source: Tabellenbuch Metall after DIN 6935: 60°, 16 and 21, r 6, s 5, k 0.7: v = 5.77, L = 31.23.
  const { flatMm, bends } = computeBlank({
    flangesMm: [16, 21],
    insideAngles: [60],
    thicknessMm: 5,
    radiusMm: 6,
    k: 0.35,
  });
  expect(flatMm).toBeCloseTo(31.23, 2);
  expect(bends[0]).toMatchObject({ convention: 'outside-tangent', turned: 120 });
});

it('flat pieces of the legs and bends put together give the blank, for any part', () => {
  const parts = fc
    .array(fc.double({ min: 90, max: 170, noNaN: true }), { minLength: 1, maxLength: 6 })
    .chain((insideAngles) =>
      fc.record({
        insideAngles: fc.constant(insideAngles),
        flangesMm: fc.array(fc.double({ min: 30, max: 500, noNaN: true }), {
          minLength: insideAngles.length + 1,
          maxLength: insideAngles.length + 1,
        }),
        thicknessMm: fc.double({ min: 0.5, max: 4, noNaN: true }),
        radiusMm: fc.double({ min: 0.5, max: 8, noNaN: true }),
        k: fc.double({ min: 0.3, max: 0.5, noNaN: true }),
      }),
    );
  fc.assert(
    fc.property(parts, (part) => {
      const setbacks = part.insideAngles.map(
        (angle) => (part.radiusMm + part.thicknessMm) * Math.tan(((180 - angle) * Math.PI) / 360),
      );
      const legs = part.flangesMm.map((flange, at) => flange - (setbacks[at - 1] ?? 0) - (setbacks[at] ?? 0));
      const arcs = part.insideAngles.map(
        (angle) => (((180 - angle) * Math.PI) / 180) * (part.radiusMm + part.k * part.thicknessMm),
      );
      const pieces = [...legs, ...arcs].reduce((sum, piece) => sum + piece, 0);
      const blank = computeBlank(part);
      expect(blank.flatMm).toBeCloseTo(pieces, 8);
      const last = blank.bends.at(-1);
      expect((last?.bendLineMm ?? NaN) + (last?.gaugeTurnedRoundMm ?? NaN)).toBeCloseTo(blank.flatMm, 8);
    }),
  );
});

it('K of trial pieces bent with it is that K again', () => {
  fc.assert(
    fc.property(
      fc.double({ min: 0.2, max: 0.5, noNaN: true }),
      fc.constantFrom(90, 120, 135, 60),
      fc.double({ min: 20, max: 200, noNaN: true }),
      (k, insideAngle, flange) => {
        const shape = { thicknessMm: 2, radiusMm: 3 };
        const flangesMm = [flange, flange + 10, flange];
        const { flatMm } = computeBlank({ ...shape, flangesMm, insideAngles: [insideAngle, insideAngle], k });
        const pieces = [{ blank: flatMm, flanges: flangesMm }];
        const found = findKFactor({ kind: 'trials', pieces, insideAngle }, 3, 2);
        expect(found.ok && found.value.k).toBeCloseTo(k, 8);
      },
    ),
  );
});

describe('K', () => {
  it('says where it comes from', () => {
    expect(findKFactor({ kind: 'given', k: 0.44 }, 1, 1)).toMatchObject({
      value: { k: 0.44, kind: 'given' },
    });
    expect(findKFactor({ kind: 'radius' }, 1, 1)).toMatchObject({
      value: { k: 0.325, words: expect.stringContaining('DIN 6935') },
    });
    expect(findKFactor({ kind: 'handbook', group: 'hard' }, 1, 1)).toMatchObject({
      value: { k: expect.closeTo(0.452, 4) },
    });
  });

  it.each([
    [{ kind: 'given' as const, k: 0 }, 'out_of_range'],
    [{ kind: 'given' as const, k: NaN }, 'out_of_range'],
    [{ kind: 'radius' as const }, 'radius_too_small_for_k'],
    [{ kind: 'trials' as const, pieces: [], insideAngle: 90 }, 'no_trial_pieces'],
    [
      { kind: 'trials' as const, pieces: [{ blank: 90, flanges: [90] }], insideAngle: 90 },
      'trial_piece_without_bend',
    ],
    [
      { kind: 'trials' as const, pieces: [{ blank: 150, flanges: [40, 60] }], insideAngle: 90 },
      'trial_pieces_do_not_fit',
    ],
  ])('is refused from %j', (source, code) => {
    expect(findKFactor(source, 0.1, 2)).toMatchObject({ ok: false, code });
  });
});

describe('a part that cannot be', () => {
  it.each([
    [{ flangesMm: [40] }, 'counts_differ'],
    [{ insideAngles: [90] }, 'counts_differ'],
    [{ insideAngles: [90, 176] }, 'out_of_range'],
    [{ insideAngles: [19, 90] }, 'out_of_range'],
    [{ flangesMm: [40, 0, 40] }, 'out_of_range'],
    [{ thicknessMm: NaN }, 'out_of_range'],
    [{ flangesMm: [40, 7, 40] }, 'flange_inside_bend'],
  ])('%j is refused as %s', (wrong, code) => {
    const input = { ...channel, ...wrong };
    expect(checkBlankInput(input).map((issue) => issue.code)).toContain(code);
    expect(() => computeBlank(input)).toThrow(RangeError);
  });
});

// Source: 12 × 24 in of 11 gauge steel, 0.1196 in at 0.2836 lb/in³, is 9.7685 lb (decimal arithmetic apart from this code).
it('weighs a sheet by its density', () => {
  const kg = pieceMassKg(12 * 25.4, 24 * 25.4, 0.1196 * 25.4, 0.2836 * 27.6799047102031);
  expect(kg / 0.45359237).toBeCloseTo(9.7685, 4);
});

describe('pieces from a sheet', () => {
  const sheet = { sheetWidthMm: 48 * 25.4, sheetLengthMm: 96 * 25.4, gapMm: 0, trimMm: 0 };

  it('are counted with both directions of the grain, the better one first', () => {
    const layouts = computeLayouts({ ...sheet, flatMm: 10 * 25.4, widthMm: 24 * 25.4 });
    expect(layouts.map(({ grain, pieces }) => [grain, pieces])).toEqual([
      ['bends-across-grain', 18],
      ['bends-along-grain', 16],
    ]);
    expect(layouts[0]?.yield).toBeCloseTo((18 * 240) / (48 * 96), 12);
    expect(layouts[0]?.offcuts).toEqual([
      { widthMm: expect.closeTo(48 * 25.4, 6), lengthMm: expect.closeTo(6 * 25.4, 6) },
    ]);
  });

  it('fill it to the edge where they divide it', () => {
    const [best] = computeLayouts({ ...sheet, flatMm: 4 * 25.4, widthMm: 12 * 25.4 });
    expect(best).toMatchObject({ pieces: 96, yield: expect.closeTo(1, 12), offcuts: [] });
  });

  it('are none where they are larger than the sheet', () => {
    const layouts = computeLayouts({ ...sheet, flatMm: 100 * 25.4, widthMm: 60 * 25.4 });
    expect(layouts.map(({ pieces }) => pieces)).toEqual([0, 0]);
    expect(layouts[0]?.offcuts).toEqual([{ widthMm: sheet.sheetWidthMm, lengthMm: sheet.sheetLengthMm }]);
  });

  it('and offcuts together never exceed the sheet, and with gaps there are never more', () => {
    const size = fc.double({ min: 20, max: 1500, noNaN: true });
    fc.assert(
      fc.property(size, size, fc.double({ min: 0, max: 10, noNaN: true }), (flatMm, widthMm, gapMm) => {
        const tight = computeLayouts({ ...sheet, flatMm, widthMm });
        const loose = computeLayouts({ ...sheet, flatMm, widthMm, gapMm });
        expect(loose[0]?.pieces).toBeLessThanOrEqual(tight[0]?.pieces ?? NaN);
        for (const { pieces, offcuts } of tight) {
          const areas = offcuts.reduce(
            (sum, offcut) => sum + offcut.widthMm * offcut.lengthMm,
            pieces * flatMm * widthMm,
          );
          expect(areas / (sheet.sheetWidthMm * sheet.sheetLengthMm)).toBeCloseTo(1, 6);
        }
      }),
    );
  });
});

it('a refusal names the flange or the angle that it is of', () => {
  const issues = checkBlankInput({ ...channel, flangesMm: [40, -1, 40], insideAngles: [90, 179] });
  expect(issues.map(({ field, message }) => [field, message.slice(0, 20)])).toEqual([
    ['flanges', 'Flange 2 is outside '],
    ['angles', 'Angle 2 is outside w'],
  ]);
});
