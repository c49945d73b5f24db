import fc from 'fast-check';
import { lengthIn, parseLength } from './length';

const denominators = fc.constantFrom(2, 4, 8, 16, 32, 64);
const proper = denominators.chain((under) =>
  fc.integer({ min: 1, max: under - 1 }).map((over) => ({ over, under })),
);
const inchesOf = (text: string): number | undefined => {
  const read = parseLength(text, 'mm');
  return read.ok ? lengthIn(read.value, 'in').toNumber() : undefined;
};

it('any mixed fraction of an inch is read as its sum, however it is written', () => {
  fc.assert(
    fc.property(fc.nat(200), proper, fc.constantFrom('', ' in', '"', ' inches'), (whole, part, unit) => {
      const inches = whole + part.over / part.under;
      expect(inchesOf(`${whole} ${part.over}/${part.under}${unit}`)).toBe(inches);
      expect(inchesOf(`${whole}-${part.over}/${part.under}${unit}`)).toBe(inches);
    }),
  );
});

it('feet and inches are read as twelve inches a foot', () => {
  fc.assert(
    fc.property(fc.nat(40), fc.nat(11), proper, (feet, whole, part) => {
      const inches = feet * 12 + whole + part.over / part.under;
      expect(inchesOf(`${feet}' ${whole} ${part.over}/${part.under}"`)).toBe(inches);
      expect(inchesOf(`${feet} ft ${whole} ${part.over}/${part.under} in`)).toBe(inches);
    }),
  );
});
