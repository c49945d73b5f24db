import { computeBendFit } from '@brakeven/forming';
import { sampleReference } from '../../testing/sample-reference';
import { toBendMaterial } from '../bend-material';
import { toPresses } from '../press-tooling';
import { FIT_DEFAULTS, type FitFacts, type FitTexts, readFitQuestion } from './fit-question';

const reference = sampleReference();
const facts: FitFacts = {
  materials: reference.materials.map(toBendMaterial),
  gauges: [],
  presses: toPresses(reference),
  lineShare: 0.8,
  units: 'us',
};
const ask = (change: Partial<FitTexts> = {}, other: Partial<FitFacts> = {}) =>
  readFitQuestion({ ...FIT_DEFAULTS.us, machine: 'P2', ...change }, { ...facts, ...other });

describe('readFitQuestion', () => {
  it('reads gauges, fractions and other units as they are typed', () => {
    expect(ask({ thickness: '10 ga' }).input?.thicknessMm).toBeCloseTo(0.1345 * 25.4, 6);
    expect(ask({ thickness: '3/16' }).input?.thicknessMm).toBeCloseTo(4.7625, 6);
    expect(ask({ thickness: '4.5mm', length: "5'" }).input).toMatchObject({
      thicknessMm: 4.5,
      lengthMm: 1524,
    });
  });

  it('takes the shop’s own chart before the table for a gauge', () => {
    const own = {
      system: 'steel',
      gauge: 10,
      thicknessMm: '3.3',
      source: 'mill list',
      origin: 'changed',
    } as const;
    const read = ask({}, { gauges: [own] });
    expect(read.input?.thicknessMm).toBe(3.3);
    expect(read.note).toContain('mill list');
    expect(ask({ thickness: '12 ga' }, { gauges: [own] }).input?.thicknessMm).toBeCloseTo(0.1046 * 25.4, 6);
  });

  it('compares typed openings with those owned, narrowest first', () => {
    const { openings } = ask({ openings: '7/8, 2' });
    expect(openings.map(({ openingMm }) => Math.round(openingMm * 100) / 100)).toEqual([
      19.05, 22.23, 25.4, 31.75, 38.1, 50.8,
    ]);
  });

  it.each([
    ['thickness', '99 ga', /gauge 99/],
    ['thickness', '-1', /thickness/],
    ['length', '0', /1 mm to 20 m/],
    ['angle', '10', /20 to 175/],
    ['angle', 'NaN', /20 to 175/],
    ['flange', '-2', /length|above 0/i],
    ['openings', '1, wide', /'wide' is not an opening/],
    ['openings', '-1', /1 to 1000 mm/],
  ] as const)('refuses %s of %s with what is accepted', (field, text, words) => {
    const { input, issues } = ask({ [field]: text });
    expect(input).toBeNull();
    expect(issues).toEqual([{ field, message: expect.stringMatching(words) as string }]);
  });

  it('asks for the rating where the press is not in the register', () => {
    expect(ask({ machine: '', rating: '25 tons' }).input?.press.ratedKn).toBeCloseTo(222.411, 3);
    expect(ask({ machine: '' }).input?.press.ratedKn).toBeNull();
  });

  it('hands the rules what they judge: 10 gauge, 48 in on a 1 1/4 in opening', () => {
    const { input } = ask();
    if (!input) throw new Error('The question of the page as it opens cannot be read.');
    const row = computeBendFit(input).rows.find(({ opening }) => opening.openingMm === 31.75);
    // 575 · 0.1345² · 4 ÷ 1.25 US tons, the shop rule by hand.
    const [shopRule] = row?.force?.rules ?? [];
    expect((shopRule?.forceKn ?? 0) / 8.896443230521).toBeCloseTo((575 * 0.1345 ** 2 * 4) / 1.25, 2);
    expect(row?.rating?.of).toBe('press');
  });
});
