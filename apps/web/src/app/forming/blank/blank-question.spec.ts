import { sampleReference } from '../../testing/sample-reference';
import { toBendMaterial } from '../bend-material';
import { BLANK_DEFAULTS, type BlankTexts, readBlankQuestion } from './blank-question';
import { drawProfile } from './profile-drawing';

const materials = sampleReference().materials.map(toBendMaterial);
const read = (change: Partial<BlankTexts> = {}) =>
  readBlankQuestion({ ...BLANK_DEFAULTS.us, ...change }, { materials, gauges: [], units: 'us' });

describe('readBlankQuestion', () => {
  it('takes the radius from the opening where none is typed', () => {
    expect(read().answer?.input.radiusMm).toBeCloseTo(0.16 * 1.25 * 25.4, 6);
    expect(read().answer?.isRadiusFromOpening).toBe(true);
    expect(read({ radius: '1/8' }).answer?.input.radiusMm).toBeCloseTo(3.175, 6);
  });

  it('computes the flat of a part by hand: 2 + 4 + 2 in, K given', () => {
    const [t, r, k] = [0.125, 0.125, 0.4];
    const allowance = (Math.PI / 2) * (r + k * t);
    const deduction = 2 * (r + t) - allowance;
    const answer = read({ thickness: '0.125', radius: '0.125', kFrom: 'given', k: '0.4' }).answer;
    expect((answer?.blank.flatMm ?? 0) / 25.4).toBeCloseTo(8 - 2 * deduction, 6);
    expect((answer?.blank.bends[0]?.gaugeMm ?? 0) / 25.4).toBeCloseTo(2 - deduction / 2, 6);
  });

  it('gives K back from a trial piece that was bent with it', () => {
    const [t, r, k] = [0.125, 0.125, 0.41];
    const blank = 5 - (2 * (r + t) - (Math.PI / 2) * (r + k * t));
    const change = {
      thickness: '0.125',
      radius: '0.125',
      kFrom: 'pieces',
      pieces: `${blank.toFixed(6)}: 2, 3`,
    };
    expect(read(change).answer?.k.k).toBeCloseTo(k, 4);
  });

  it('lays pieces both ways on a sheet', () => {
    const layouts = read().answer?.layouts ?? [];
    expect(layouts.map(({ grain }) => grain).sort()).toEqual(['bends-across-grain', 'bends-along-grain']);
    expect(layouts.every(({ pieces }) => pieces > 0)).toBe(true);
  });

  it.each([
    [{ flanges: '2;;2' }, 'flanges', /^Flange 2: /],
    [{ flanges: '2;0;2' }, 'flanges', /above 0/],
    [{ angles: '90;5' }, 'angles', /^Bend 2: .*20 to 175/],
    [{ flanges: '0.2;4;2' }, 'flanges', /Flange 1 is shorter than its bends/],
    [{ kFrom: 'given', k: '7' }, 'k', /above 0, up to 1/],
    [{ kFrom: 'pieces', pieces: 'five' }, 'pieces', /is not a trial piece/],
    [{ kFrom: 'pieces', pieces: '' }, 'pieces', /at least one trial piece/],
    [{ radius: '-1' }, 'radius', /./],
    [{ sheetWidth: '0' }, 'sheetWidth', /above 0/],
  ])('refuses %j with what is accepted', (change, field, words) => {
    const { answer, issues } = read(change);
    expect(answer).toBeNull();
    expect(issues[0]).toEqual({ field, message: expect.stringMatching(words) as string });
  });
});

describe('drawProfile', () => {
  const part = { flangesMm: [50, 100, 50], insideAngles: [90, 90], thicknessMm: 2, radiusMm: 2, k: 0.4 };

  it('draws a channel as wide as its middle flange, both legs up', () => {
    const { box } = drawProfile(part, ['up', 'up']);
    // Along the middle of the sheet: the outside less half a thickness on each side.
    expect(box.top - box.bottom).toBeCloseTo(100 - 2, 6);
    expect(box.right - box.left).toBeCloseTo(50 - 1, 6);
  });

  it('draws a Z with its legs to both sides', () => {
    const { box } = drawProfile(part, ['up', 'down']);
    expect(box.right - box.left).toBeCloseTo(2 * 50 - 2, 6);
  });
});
