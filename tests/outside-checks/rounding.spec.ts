import { D, moneyText, roundHalfUp, toMoney } from '@brakeven/values';

// Source: Java SE 17 API, java.math.RoundingMode, 'Summary of Rounding Operations', column HALF_UP (ties go away
// from zero), https://docs.oracle.com/en/java/javase/17/docs/api/java.base/java/math/RoundingMode.html
it.each([
  ['5.5', '6'],
  ['2.5', '3'],
  ['1.6', '2'],
  ['1.1', '1'],
  ['1.0', '1'],
  ['-1.0', '-1'],
  ['-1.1', '-1'],
  ['-1.6', '-2'],
  ['-2.5', '-3'],
  ['-5.5', '-6'],
])('rounds %s to %s, as the table of HALF_UP prints it', (input, printed) => {
  expect(roundHalfUp(D(input), 0).toFixed()).toBe(printed);
});

// Source: PostgreSQL 15 manual, 9.3 Mathematical Functions: round(numeric) breaks ties away from zero, which the SQL
// rollup relies on; its examples are round(42.4) and round(42.4382, 2); pgsql-docs, December 2022: round(42.5) = 43.
it.each([
  ['42.4', 0, '42'],
  ['42.5', 0, '43'],
  ['-42.5', 0, '-43'],
  ['42.4382', 2, '42.44'],
])("rounds %s to %d places as PostgreSQL's manual does: %s", (input, places, printed) => {
  expect(roundHalfUp(D(input), places).toFixed()).toBe(printed);
});

// Independent implementation: Intl.NumberFormat with roundingMode 'halfExpand' (ECMA-402), which takes exact decimal
// texts and rounds ties away from zero.
it('agrees with ECMA-402 on every tenth of a cent from −2.000 to 2.000', () => {
  const reference = new Intl.NumberFormat('en-US', {
    roundingMode: 'halfExpand',
    minimumFractionDigits: 2,
    maximumFractionDigits: 2,
    signDisplay: 'negative',
    useGrouping: false,
  });
  const wrong: string[] = [];
  for (let mills = -2000; mills <= 2000; mills += 1) {
    const exact = D(mills).div(1000).toFixed(3);
    if (moneyText(toMoney(exact)) !== reference.format(exact as Intl.StringNumericLiteral)) wrong.push(exact);
  }
  expect(wrong).toEqual([]);
});
