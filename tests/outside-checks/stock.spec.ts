import { computeMovingAverage, type StockMove } from '@brakeven/costing';
import { addDays, D, type Mass, moneyText, toLocalDate, toMoney } from '@brakeven/values';

const day1 = toLocalDate('2026-04-01');

/** Lots as [weight, value], issues as a weight below 0. */
function movesOf(rows: (readonly [number, number] | number)[]): StockMove[] {
  return rows.map((row, index) => {
    const base = { moveId: `${index}`, movedOn: addDays(day1, index) };
    return typeof row === 'number'
      ? { ...base, kind: 'issue', jobId: 'job', weight: D(-row) as Mass }
      : { ...base, kind: 'lot', weight: D(row[0]) as Mass, landedCost: toMoney(row[1]) };
  });
}

function ledgerOf(rows: Parameters<typeof movesOf>[0]) {
  const ledger = computeMovingAverage(movesOf(rows));
  if (!ledger.ok) throw new Error('The stock covers every issue.');
  return ledger;
}

// Source: stores-ledger exercise of a cost-accounting course, weighted average method, with its solution: 300 units
// of 600; 200 of 440; issued 150; 200 of 460; issued 150 and 200; 200 of 480; issued 250. Issues 312, 324, 432 and
// 570; 150 units of 342 left. A unit stands as a kilogram here.
it('keeps the stores ledger as published, line by line', () => {
  const { moves } = ledgerOf([[300, 600], [200, 440], -150, [200, 460], -150, -200, [200, 480], -250]);
  const printed = [
    ['600.00', '2.000000', '300', '600.00'],
    ['440.00', '2.080000', '500', '1040.00'],
    ['-312.00', '2.080000', '350', '728.00'],
    ['460.00', '2.160000', '550', '1188.00'],
    ['-324.00', '2.160000', '400', '864.00'],
    ['-432.00', '2.160000', '200', '432.00'],
    ['480.00', '2.280000', '400', '912.00'],
    ['-570.00', '2.280000', '150', '342.00'],
  ];
  const ours = moves.map((move) => [
    moneyText(move.amount),
    move.averagePerKg.toFixed(6),
    move.balanceWeight.toFixed(),
    moneyText(move.balanceAmount),
  ]);
  expect(ours).toEqual(printed);
});

// Source: accounting exercise on moving-average cost with a perpetual inventory, with its solution: 3000 at 0.60,
// 4000 at 0.74, sold 4400, 2200 at 0.80, sold 2100. Cost of goods sold 2992.00 and 1543.50, 1984.50 left.
it('takes the published cost of goods out of a perpetual inventory', () => {
  const { moves, balanceAmount } = ledgerOf([[3000, 1800], [4000, 2960], -4400, [2200, 1760], -2100]);
  const sold = moves.filter(({ move }) => move.kind === 'issue').map(({ amount }) => moneyText(amount));
  expect(sold).toEqual(['-2992.00', '-1543.50']);
  expect(moneyText(balanceAmount)).toBe('1984.50');
});
