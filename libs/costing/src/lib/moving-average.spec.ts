import { D, moneyText, rateText, toLocalDate, toMass, toMoney } from '@brakeven/values';
import {
  computeLandedLotCost,
  computeMovingAverage,
  findStrandedValue,
  type JobMove,
  type StockMove,
  toMaterialLine,
} from './moving-average';

function lot(moveId: string, movedOn: string, kg: string, landedCost: string): StockMove {
  return {
    kind: 'lot',
    moveId,
    movedOn: toLocalDate(movedOn),
    weight: toMass(kg, 'kg'),
    landedCost: toMoney(landedCost),
  };
}

function job(
  kind: JobMove['kind'],
  moveId: string,
  movedOn: string,
  kg: string,
  changes: Partial<JobMove> = {},
): StockMove {
  return {
    kind,
    moveId,
    movedOn: toLocalDate(movedOn),
    jobId: 'job-1',
    weight: toMass(kg, 'kg'),
    ...changes,
  };
}

/** Id, amount, average, balance in kg and money of each move; or what is missing. */
function foldOf(moves: StockMove[]) {
  const ledger = computeMovingAverage(moves);
  if (!ledger.ok) {
    const { of, move, missingWeight } = ledger.shortage;
    return [of, move.moveId, missingWeight.toFixed()];
  }
  return ledger.moves.map((valued) => [
    valued.move.moveId,
    moneyText(valued.amount),
    rateText(valued.averagePerKg),
    valued.balanceWeight.toFixed(),
    moneyText(valued.balanceAmount),
  ]);
}

const twoLots = [
  lot('lot-1', '2026-03-02', '100', '150.00'),
  job('issue', 'issue-1', '2026-03-03', '40'),
  lot('lot-2', '2026-03-04', '60', '120.00'),
  job('issue', 'issue-2', '2026-03-05', '50'),
];

describe('the moving average', () => {
  it('values an issue at the average of its moment', () => {
    // 40 × 1.50 = 60.00; then (90 + 120) ÷ 120 = 1.75; 50 × 1.75 = 87.50
    expect(foldOf(twoLots)).toEqual([
      ['lot-1', '150.00', '1.50', '100', '150.00'],
      ['issue-1', '-60.00', '1.50', '60', '90.00'],
      ['lot-2', '120.00', '1.75', '120', '210.00'],
      ['issue-2', '-87.50', '1.75', '70', '122.50'],
    ]);
  });

  it('revalues what follows a backdated lot', () => {
    // (150 + 50) ÷ 200 = 1.00 from 2 March: 40.00; then (160 + 120) ÷ 220 × 50 = 63.6363…
    const moves = [...twoLots, lot('lot-3', '2026-03-02', '100', '50.00')];
    expect(foldOf(moves).map(([id, amount]) => `${id} ${amount}`)).toEqual([
      'lot-1 150.00',
      'lot-3 50.00',
      'issue-1 -40.00',
      'lot-2 120.00',
      'issue-2 -63.64',
    ]);
  });

  it('leaves an amount posted in a closed month as it is, and goes on from there', () => {
    // (200 − 60) + 120 = 260 ÷ 220 × 50 = 59.0909…
    const [lot1, issue1, ...others] = twoLots;
    if (!lot1 || issue1?.kind !== 'issue') throw new Error('The second move is an issue.');
    const posted = { ...issue1, postedAmount: toMoney('60.00') };
    const moves = [lot1, posted, ...others, lot('lot-3', '2026-03-02', '100', '50.00')];
    expect(foldOf(moves).slice(2)).toEqual([
      ['issue-1', '-60.00', '1.00', '160', '140.00'],
      ['lot-2', '120.00', '1.181818', '220', '260.00'],
      ['issue-2', '-59.09', '1.181818', '170', '200.91'],
    ]);
  });

  it('takes all the value with what empties the stock, and gives it back at the last average', () => {
    // 3 kg for 10.00: 1 kg takes 3.33, the other two the 6.67 that is left; 1 kg comes back at 6.67 ÷ 2.
    const moves = [
      lot('lot-1', '2026-03-02', '3', '10.00'),
      job('issue', 'a', '2026-03-03', '1'),
      job('issue', 'b', '2026-03-04', '2'),
      job('return', 'c', '2026-03-05', '1'),
    ];
    expect(foldOf(moves)).toEqual([
      ['lot-1', '10.00', '3.333333', '3', '10.00'],
      ['a', '-3.33', '3.333333', '2', '6.67'],
      ['b', '-6.67', '3.335', '0', '0.00'],
      ['c', '3.34', '3.335', '1', '3.34'],
    ]);
  });

  it('brings a return in at the average of its moment, not at that of its issue', () => {
    const moves = [...twoLots, job('return', 'back', '2026-03-06', '10')];
    expect(foldOf(moves).at(-1)).toEqual(['back', '17.50', '1.75', '80', '140.00']);
  });

  it('counts lots before other moves of their day, and then by id', () => {
    const moves = [
      job('issue', 'a', '2026-03-02', '10'),
      lot('z', '2026-03-02', '10', '5.00'),
      lot('y', '2026-03-02', '10', '1.00'),
    ];
    expect(foldOf(moves).map(([id]) => id)).toEqual(['y', 'z', 'a']);
    expect(foldOf(moves).at(-1)).toEqual(['a', '-3.00', '0.30', '10', '3.00']);
  });

  it('has nothing to say of no moves', () => {
    expect(computeMovingAverage([])).toMatchObject({ ok: true, moves: [], averagePerKg: null });
  });
});

describe('stock that is not there', () => {
  it('is refused with the move and what is missing', () => {
    const moves = [...twoLots, job('issue', 'too-much', '2026-03-04', '100.5', { jobId: 'job-2' })];
    expect(foldOf(moves)).toEqual(['stock', 'issue-2', '30.5']);
    expect(foldOf([job('issue', 'early', '2026-03-01', '1'), ...twoLots])).toEqual(['stock', 'early', '1']);
  });

  it('is refused as well where a job gives back more than it drew, whatever others drew', () => {
    const moves = [...twoLots, job('return', 'back', '2026-03-06', '5', { jobId: 'job-2' })];
    expect(foldOf(moves)).toEqual(['return', 'back', '5']);
    expect(foldOf([...twoLots, job('return', 'back', '2026-03-04', '40.25')])).toEqual([
      'return',
      'back',
      '0.25',
    ]);
  });
});

it('lines of issues cost the job, lines of returns give back, and lots are no line', () => {
  const ledger = computeMovingAverage([...twoLots, job('return', 'back', '2026-03-06', '10')]);
  if (!ledger.ok) throw new Error('The stock covers it.');
  const lines = ledger.moves.map(toMaterialLine);
  expect(lines.map((line) => line && [line.quantity.toFixed(), moneyText(line.amount)])).toEqual([
    undefined,
    ['40', '60.00'],
    undefined,
    ['50', '87.50'],
    ['-10', '-17.50'],
  ]);
  expect(lines[1]).toMatchObject({
    sourceKind: 'material_issue',
    sourceId: 'issue-1',
    category: 'material',
    jobId: 'job-1',
    rate: D('1.5'),
    rateId: null,
  });
});

it('a lot costs its price and its freight', () => {
  expect(moneyText(computeLandedLotCost(toMoney('1180.00'), toMoney('64.95')))).toBe('1244.95');
});

describe('findStrandedValue', () => {
  const findOf = (moves: StockMove[]) => {
    const ledger = computeMovingAverage(moves);
    return ledger.ok ? findStrandedValue(ledger.moves)?.move.moveId : 'not covered';
  };
  const taken = (amount: string) =>
    job('issue', 'issue-1', '2026-03-03', '100', { postedAmount: toMoney(amount) });

  it('names the issue of a closed month that leaves value without weight, or less than nothing', () => {
    const cheap = lot('lot-1', '2026-03-02', '100', '150.00');
    expect(findOf([cheap, taken('150.00')])).toBeUndefined();
    expect(findOf([cheap, taken('149.99')])).toBe('issue-1');
    expect(findOf([cheap, taken('150.01')])).toBe('issue-1');
    const more = lot('lot-2', '2026-03-02', '50', '75.00');
    expect(findOf([cheap, more, taken('149.99')])).toBeUndefined();
    expect(findOf([cheap, more, taken('225.01')])).toBe('issue-1');
  });

  it('finds nothing where each issue takes the average of its moment', () => {
    expect(findOf(twoLots)).toBeUndefined();
    expect(findOf([...twoLots, job('issue', 'issue-3', '2026-03-06', '70')])).toBeUndefined();
  });
});
