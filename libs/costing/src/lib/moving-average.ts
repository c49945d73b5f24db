import {
  D,
  type Decimal,
  type LocalDate,
  type Mass,
  type Money,
  type Rate,
  sum,
  toMoney,
  toRate,
} from '@brakeven/values';
import { roundFraction } from './round-fraction';
import { type SourceLine } from './source-line';

/** A lot of sheets that came in. */
export interface LotMove {
  kind: 'lot';
  moveId: string;
  movedOn: LocalDate;
  weight: Mass;
  landedCost: Money;
}

/** Material that went to a job, or came back from it. */
export interface JobMove {
  kind: 'issue' | 'return';
  moveId: string;
  movedOn: LocalDate;
  jobId: string;
  weight: Mass;
  /** What the job bears for it in a closed month, below 0 for a return; it stays as it is. */
  postedAmount?: Money;
}

/** A move of one material's stock; `weight` is above 0 whatever its kind. */
export type StockMove = LotMove | JobMove;

/** A move with its value, and the stock after it. Weight and amount are signed as the stock sees them. */
export interface ValuedMove {
  move: StockMove;
  weight: Mass;
  amount: Money;
  /** At which an issue or a return was valued; after it for a lot. Six decimals. */
  averagePerKg: Rate;
  balanceWeight: Mass;
  balanceAmount: Money;
}

/** A move that cannot be, and by how much. */
export interface StockShortage {
  /** `stock`: the stock does not cover an issue; `return`: a job gives back more than it drew. */
  of: 'stock' | 'return';
  move: JobMove;
  missingWeight: Mass;
}

/** The stock of one material, move by move, or the first move that cannot be. */
export type StockLedger =
  | { ok: true; moves: ValuedMove[]; balanceWeight: Mass; balanceAmount: Money; averagePerKg: Rate | null }
  | { ok: false; shortage: StockShortage };

const NO_WEIGHT = D(0) as Mass;
const NO_AMOUNT = toMoney(0);

/** What the stock is at one moment; the average is that of the last moment that had stock. */
interface Stock {
  weight: Mass;
  amount: Money;
  average: StockAverage | null;
}

/** An average as the exact fraction that it is. */
interface StockAverage {
  amount: Money;
  weight: Mass;
}

/**
 * Values the moves of one material by the perpetual moving average, in order of date, lots before other moves of
 * their day, then id; the order given does not matter. A lot brings in its landed cost. An issue takes
 * weight × value ÷ weight in stock, one exact fraction rounded half-up to the cent once, so that what empties the
 * stock takes all its value. A return comes in at the average of its moment, or at the last one if there is no stock.
 * Amounts posted in a closed month are taken as they are.
 * Rules in words: `RULES.material`, `.stock`. Common practice, no published source for the order within a day.
 */
export function computeMovingAverage(moves: readonly StockMove[]): StockLedger {
  const valued: ValuedMove[] = [];
  const drawn = new Map<string, Decimal>();
  let stock: Stock = { weight: NO_WEIGHT, amount: NO_AMOUNT, average: null };
  for (const move of [...moves].sort(byOrder)) {
    const shortage = move.kind === 'lot' ? undefined : findShortage(move, stock, drawn);
    if (shortage) return { ok: false, shortage };
    const before = stock;
    const amount = valueOf(move, before);
    stock = addMove(before, move, amount);
    valued.push(toValuedMove(move, amount, before, stock));
  }
  return {
    ok: true,
    moves: valued,
    balanceWeight: stock.weight,
    balanceAmount: stock.amount,
    averagePerKg: stock.average && averageOf(stock.average),
  };
}

/**
 * The first issue after which value is left in a stock of nothing, or less than nothing in it, which the next lot would
 * bear; undefined if there is none. Only an amount that stays because its month is closed can make it so.
 */
export function findStrandedValue(
  moves: readonly ValuedMove[],
): (ValuedMove & { move: JobMove }) | undefined {
  return moves.find(
    (valued): valued is ValuedMove & { move: JobMove } =>
      valued.move.kind !== 'lot' &&
      (valued.balanceAmount.lt(0) || (valued.balanceWeight.isZero() && !valued.balanceAmount.isZero())),
  );
}

/** The landed cost of a lot: its price and its freight. Rule in words: `RULES.landedLotCost`. */
export function computeLandedLotCost(cost: Money, freight: Money): Money {
  return sum([cost, freight]);
}

/**
 * The cost line of an issue or a return: kg and amount as the job bears them, below 0 for a return, at the average
 * of its moment. Rule in words: `RULES.material`.
 */
export function toMaterialLine(valued: ValuedMove): SourceLine | undefined {
  const { move, weight, amount, averagePerKg } = valued;
  if (move.kind === 'lot') return undefined;
  return {
    sourceKind: 'material_issue',
    sourceId: move.moveId,
    workedOn: move.movedOn,
    category: 'material',
    jobId: move.jobId,
    employeeId: null,
    machineId: null,
    quantity: D(0).minus(weight),
    rate: averagePerKg,
    rateFactor: D(1),
    rateId: null,
    amount: toMoney(amount.negated()),
  };
}

function byOrder(a: StockMove, b: StockMove): number {
  const [keyA, keyB] = [a, b].map((move) => `${move.movedOn} ${move.kind === 'lot' ? 0 : 1} ${move.moveId}`);
  return (keyA ?? '') < (keyB ?? '') ? -1 : 1;
}

/** Notes what a job has drawn, and answers if it or the stock does not cover the move. */
function findShortage(move: JobMove, stock: Stock, drawn: Map<string, Decimal>): StockShortage | undefined {
  const before = drawn.get(move.jobId) ?? D(0);
  const after = move.kind === 'issue' ? before.plus(move.weight) : before.minus(move.weight);
  drawn.set(move.jobId, after);
  if (after.lt(0)) return { of: 'return', move, missingWeight: after.negated() as Mass };
  const left = move.kind === 'issue' ? stock.weight.minus(move.weight) : stock.weight;
  return left.lt(0) ? { of: 'stock', move, missingWeight: left.negated() as Mass } : undefined;
}

/** What a move adds to the stock's value; below 0 for an issue. */
function valueOf(move: StockMove, stock: Stock): Money {
  if (move.kind === 'lot') return move.landedCost;
  if (move.postedAmount) return toMoney(move.postedAmount.negated());
  const average = getAverage(move, stock);
  const value = toMoney(roundFraction(move.weight.times(average.amount), average.weight, 2));
  return move.kind === 'issue' ? toMoney(value.negated()) : value;
}

function getAverage(move: StockMove, { average }: Stock): StockAverage {
  if (average === null) throw new Error(`Material moves on ${move.movedOn} that never came in.`);
  return average;
}

function addMove(stock: Stock, move: StockMove, amount: Money): Stock {
  const weight = sum([stock.weight, signedWeight(move)]);
  const value = sum([stock.amount, amount]);
  return { weight, amount: value, average: weight.gt(0) ? { amount: value, weight } : stock.average };
}

function signedWeight(move: StockMove): Mass {
  return move.kind === 'issue' ? (move.weight.negated() as Mass) : move.weight;
}

function averageOf({ amount, weight }: StockAverage): Rate {
  return toRate(roundFraction(amount, weight, 6));
}

function toValuedMove(move: StockMove, amount: Money, before: Stock, after: Stock): ValuedMove {
  return {
    move,
    weight: signedWeight(move),
    amount,
    averagePerKg: averageOf(getAverage(move, move.kind === 'lot' ? after : before)),
    balanceWeight: after.weight,
    balanceAmount: after.amount,
  };
}
