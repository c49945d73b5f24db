import fc from 'fast-check';
import { D } from './decimal';
import { forceIn, toForce } from './force';
import { lengthIn, lengthText, toLength } from './length';
import { massIn, toMass } from './mass';

const values = fc.integer({ min: 0, max: 1_000_000_000 }).map((n) => D(n).div(10_000));

it('any quantity comes back from its base unit, to 30 digits at least', () => {
  fc.assert(
    fc.property(values, (value) => {
      const back = [
        lengthIn(toLength(value, 'in'), 'in'),
        lengthIn(toLength(value, 'ft'), 'ft'),
        forceIn(toForce(value, 'US ton'), 'US ton'),
        forceIn(toForce(value, 'tonne'), 'tonne'),
        forceIn(toForce(value, 'lbf'), 'lbf'),
        massIn(toMass(value, 'lb'), 'lb'),
      ];
      for (const returned of back) expect(returned.minus(value).abs().lte('1e-30')).toBe(true);
    }),
  );
});

it('a length in ten-thousandths of an inch survives being stored with five decimals of a millimetre', () => {
  fc.assert(
    fc.property(values, (inches) => {
      const stored = toLength(lengthText(toLength(inches, 'in')), 'mm');
      expect(lengthIn(stored, 'in').toFixed(4)).toBe(inches.toFixed(4));
    }),
  );
});
