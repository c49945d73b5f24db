import fc from 'fast-check';
import { computeBendForce, type ForceInput } from './bend-force';

const inputs: fc.Arbitrary<ForceInput> = fc
  .record({
    tensileMpa: fc.double({ min: 100, max: 900, noNaN: true }),
    thicknessMm: fc.double({ min: 0.2, max: 20, noNaN: true }),
    lengthMm: fc.double({ min: 10, max: 9000, noNaN: true }),
    ratio: fc.double({ min: 5, max: 20, noNaN: true }),
  })
  .map(({ ratio, ...rest }) => ({ ...rest, openingMm: ratio * rest.thicknessMm }));

const forces = (input: ForceInput): [number, number] => {
  const [shop, oehler] = computeBendForce(input).rules;
  return [shop?.forceKn ?? NaN, oehler?.forceKn ?? NaN];
};

it('doubling the length or the strength doubles the force', () => {
  fc.assert(
    fc.property(inputs, (input) => {
      const [shop, oehler] = forces(input);
      const long = forces({ ...input, lengthMm: 2 * input.lengthMm });
      const strong = forces({ ...input, tensileMpa: 2 * input.tensileMpa });
      for (const doubled of [long, strong]) {
        expect(doubled[0] / shop).toBeCloseTo(2, 10);
        expect(doubled[1] / oehler).toBeCloseTo(2, 10);
      }
    }),
  );
});

it('doubling the thickness makes the shop force 4 times, and Oehler’s 4·(1 + 8t/V)/(1 + 4t/V) times', () => {
  fc.assert(
    fc.property(inputs, (input) => {
      const [shop, oehler] = forces(input);
      const thick = forces({ ...input, thicknessMm: 2 * input.thicknessMm });
      const ratio = input.thicknessMm / input.openingMm;
      expect(thick[0] / shop).toBeCloseTo(4, 10);
      expect(thick[1] / oehler).toBeCloseTo((4 * (1 + 8 * ratio)) / (1 + 4 * ratio), 10);
    }),
  );
});

it('doubling the opening halves the shop force, and the band always holds both rules', () => {
  fc.assert(
    fc.property(inputs, (input) => {
      const force = computeBendForce(input);
      const [shop, oehler] = forces(input);
      expect(forces({ ...input, openingMm: 2 * input.openingMm })[0] / shop).toBeCloseTo(0.5, 10);
      expect([force.lowKn, force.highKn]).toEqual([Math.min(shop, oehler), Math.max(shop, oehler)]);
    }),
  );
});
