import { D, toMoney } from '@brakeven/values';
import { type EstimateLine } from './estimate';
import { toStockWeight } from './material-weight';
import { roundFraction } from './round-fraction';

/**
 * A line of an estimate for another number of pieces: pieces, weight and outside amounts by `to` ÷ `from`, each
 * rounded half-up once (whole pieces, at least one; kilograms to ten decimals, cents), while set-up and rates stay.
 * @throws RangeError unless both numbers are above 0.
 */
export function scaleEstimateLine<T extends EstimateLine>(line: T, from: number, to: number): T {
  if (!(from > 0 && to > 0)) throw new RangeError('Give numbers of pieces above 0.');
  if (from === to) return line;
  switch (line.kind) {
    case 'operation': {
      const pieces = roundFraction(line.pieces.times(to), D(from), 0);
      return { ...line, pieces: pieces.lt(1) ? D(1) : pieces };
    }
    case 'material':
      return { ...line, weight: toStockWeight(roundFraction(line.weight.times(to), D(from), 10)) };
    case 'outside':
      return { ...line, amount: toMoney(roundFraction(line.amount.times(to), D(from), 2)) };
  }
}
