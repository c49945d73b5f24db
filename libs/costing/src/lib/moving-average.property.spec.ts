import { addDays, D, type Mass, moneyText, sum, toLocalDate, toMoney } from '@brakeven/values';
import fc from 'fast-check';
import { computeMovingAverage, type StockMove } from './moving-average';

const firstDay = toLocalDate('2026-03-02');
const days = fc.integer({ min: 0, max: 60 });
const weights = fc.integer({ min: 1, max: 40_000_000 }).map((parts) => D(parts).div(100_000) as Mass);

const lots = fc
  .record({ day: days, weight: weights, cents: fc.integer({ min: 1, max: 500_000 }) })
  .map(({ day, weight, cents }) => ({
    kind: 'lot' as const,
    movedOn: addDays(firstDay, day),
    weight,
    landedCost: toMoney(D(cents).div(100)),
  }));
const movements = fc
  .record({
    kind: fc.constantFrom('issue' as const, 'issue' as const, 'return' as const),
    day: days,
    weight: weights,
    jobId: fc.constantFrom('job-1', 'job-2'),
  })
  .map(({ day, ...rest }) => ({ ...rest, movedOn: addDays(firstDay, day) }));

/** Moves that the stock covers: those that it does not are left out, as a shop would have been refused them. */
const someMoves = fc.array(fc.oneof(lots, movements), { minLength: 1, maxLength: 30 }).map((list) => {
  let kept: StockMove[] = [];
  list.forEach((move, index) => {
    const more: StockMove[] = [...kept, { ...move, moveId: `move-${String(index).padStart(2, '0')}` }];
    if (computeMovingAverage(more).ok) kept = more;
  });
  return kept;
});

function valuedOf(moves: readonly StockMove[]) {
  const ledger = computeMovingAverage(moves);
  if (!ledger.ok) throw new Error('These moves are covered.');
  return ledger;
}

it('keeps every cent: lots = issues − returns + stock', () => {
  fc.assert(
    fc.property(someMoves, (moves) => {
      const { moves: valued, balanceAmount, balanceWeight } = valuedOf(moves);
      const amountOf = (kind: StockMove['kind']) =>
        sum(valued.filter(({ move }) => move.kind === kind).map(({ amount }) => amount));
      const landed = sum(moves.flatMap((move) => (move.kind === 'lot' ? [move.landedCost] : [])));
      const drawn = amountOf('issue').negated().minus(amountOf('return'));
      expect(moneyText(landed)).toBe(moneyText(toMoney(drawn.plus(balanceAmount))));
      if (balanceWeight.isZero()) expect(moneyText(balanceAmount)).toBe('0.00');
      expect(balanceWeight.gte(0)).toBe(true);
    }),
  );
});

it('values an issue at value ÷ weight of the moment before, to half a cent', () => {
  fc.assert(
    fc.property(someMoves, (moves) => {
      const { moves: valued } = valuedOf(moves);
      valued.forEach(({ move, amount }, index) => {
        if (move.kind !== 'issue') return;
        const before = valued[index - 1];
        if (!before) throw new Error('An issue has a lot before it.');
        const exact = move.weight.times(before.balanceAmount).div(before.balanceWeight);
        expect(amount.plus(exact).abs().lte('0.005')).toBe(true);
        expect(amount.lte(0)).toBe(true);
      });
    }),
  );
});

it('does not ask in which order the moves came', () => {
  const shuffled = someMoves.chain((list) =>
    fc.tuple(fc.constant(list), fc.shuffledSubarray(list, { minLength: list.length })),
  );
  fc.assert(
    fc.property(shuffled, ([list, mixed]) => {
      expect(computeMovingAverage(mixed)).toEqual(computeMovingAverage(list));
    }),
  );
});

it('changes nothing when what it computed is posted, whatever lots come before it after that', () => {
  fc.assert(
    fc.property(someMoves, lots, (moves, late) => {
      const { moves: valued } = valuedOf(moves);
      const posted = valued.map(({ move, amount }): StockMove =>
        move.kind === 'lot' ? move : { ...move, postedAmount: toMoney(amount.negated()) },
      );
      const again = valuedOf(posted);
      const amounts = (of: typeof again) =>
        of.moves.map(({ move, amount }) => `${move.moveId} ${moneyText(amount)}`);
      expect(amounts(again)).toEqual(valued.map(({ move, amount }) => `${move.moveId} ${moneyText(amount)}`));
      const withLate = valuedOf([...posted, { ...late, moveId: 'late' }]);
      expect(amounts(withLate).filter((text) => !text.startsWith('late'))).toEqual(amounts(again));
      expect(moneyText(withLate.balanceAmount)).toBe(moneyText(sum([again.balanceAmount, late.landedCost])));
    }),
  );
});
