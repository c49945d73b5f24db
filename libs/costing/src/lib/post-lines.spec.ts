import { D, moneyText, toLocalDate, toMoney, toRate } from '@brakeven/values';
import {
  computePostings,
  findPostedMaterial,
  findPostedOvertime,
  netFrozenLines,
  type PostedLine,
} from './post-lines';
import { type SourceLine } from './source-line';

const january = toLocalDate('2026-01-31');

function lineOf(
  sourceId: string,
  workedOn: string,
  changes: Partial<SourceLine> & { cost?: string } = {},
): SourceLine {
  const { cost = '100.00', ...rest } = changes;
  return {
    sourceKind: 'time_entry',
    sourceId,
    workedOn: toLocalDate(workedOn),
    category: 'labour',
    jobId: 'job-1',
    employeeId: 'ana',
    machineId: null,
    quantity: D(4),
    rate: toRate(25),
    rateFactor: D(1),
    rateId: 'pay-1',
    amount: toMoney(cost),
    ...rest,
  };
}

const posted = (line: SourceLine, postedOn: string): PostedLine => ({
  ...line,
  postedOn: toLocalDate(postedOn),
});

function postingsOf(
  sources: { line: SourceLine; isLive?: boolean }[],
  stored: PostedLine[] = [],
  closedThrough: typeof january | null = january,
) {
  const { lines } = computePostings({
    sources: sources.map(({ line, isLive = true }) => ({ sourceId: line.sourceId, isLive, lines: [line] })),
    stored,
    closedThrough,
  });
  return lines.map((line) => [
    line.sourceId,
    line.workedOn,
    line.postedOn,
    line.quantity.toFixed(),
    moneyText(line.amount),
  ]);
}

describe('the open days of the books', () => {
  const old = lineOf('old', '2026-01-20');
  const inJanuary = posted(old, '2026-01-20');

  it('take every live row on its own day while nothing is closed, and no voided one', () => {
    expect(
      postingsOf([{ line: old }, { line: lineOf('gone', '2026-01-21'), isLive: false }], [], null),
    ).toEqual([['old', '2026-01-20', '2026-01-20', '4', '100.00']]);
  });

  it('take what comes late for a closed month on the first day that is open', () => {
    expect(postingsOf([{ line: old }, { line: lineOf('new', '2026-02-03') }])).toEqual([
      ['old', '2026-01-20', '2026-02-01', '4', '100.00'],
      ['new', '2026-02-03', '2026-02-03', '4', '100.00'],
    ]);
  });

  it('take nothing of a row that is in the closed month, whatever it would cost now', () => {
    expect(
      postingsOf([{ line: lineOf('old', '2026-01-20', { cost: '140.00', rate: toRate(35) }) }], [inJanuary]),
    ).toEqual([]);
  });

  it('take back what was voided since, at the rate that it was posted at', () => {
    expect(
      postingsOf([{ line: lineOf('old', '2026-01-20', { cost: '140.00' }), isLive: false }], [inJanuary]),
    ).toEqual([['old', '2026-01-20', '2026-02-01', '-4', '-100.00']]);
  });

  it('take nothing of a voided row that was taken back in a closed month, and post it again if it is restored', () => {
    const back = posted({ ...old, quantity: D(-4), amount: toMoney('-100.00') }, '2026-02-01');
    const stored = [inJanuary, back];
    const february = toLocalDate('2026-02-28');
    expect(postingsOf([{ line: old, isLive: false }], stored, february)).toEqual([]);
    expect(postingsOf([{ line: old }], stored, february)).toEqual([
      ['old', '2026-01-20', '2026-03-01', '4', '100.00'],
    ]);
  });

  it('look at frozen lines alone: what stands on open days is made again', () => {
    expect(postingsOf([{ line: old }], [posted(old, '2026-02-01')])).toHaveLength(1);
  });

  it('take gaps as they take lines', () => {
    const gap = {
      entryId: 'old',
      workedOn: toLocalDate('2026-01-20'),
      category: 'labour' as const,
      jobId: 'job-1',
      employeeId: 'ana',
      machineId: null,
      hours: D(4) as never,
    };
    const source = { sourceId: 'old', isLive: true, lines: [], gaps: [gap] };
    const gapsOf = (stored: PostedLine[], isLive = true) =>
      computePostings({ sources: [{ ...source, isLive }], stored, closedThrough: january }).gaps.map(
        ({ entryId, postedOn }) => `${entryId} ${postedOn}`,
      );
    expect(gapsOf([])).toEqual(['old 2026-02-01']);
    expect(gapsOf([inJanuary])).toEqual([]);
    expect(gapsOf([], false)).toEqual([]);
  });
});

describe('what closed months hold', () => {
  const overtime = lineOf('a', '2026-01-20', {
    category: 'overtime',
    rateId: null,
    cost: '7.50',
    jobId: null,
  });
  const stored = [
    posted(lineOf('a', '2026-01-20'), '2026-01-20'),
    posted(overtime, '2026-01-20'),
    posted(lineOf('b', '2026-01-21'), '2026-01-21'),
    posted(lineOf('issue', '2026-01-22', { category: 'material', cost: '-12.00' }), '2026-01-22'),
    posted(lineOf('c', '2026-02-02'), '2026-02-02'),
  ];

  it('is by row, and of closed months only', () => {
    expect([...netFrozenLines(stored, january).keys()]).toEqual(['a', 'b', 'issue']);
    expect(netFrozenLines(stored, null).size).toBe(0);
  });

  it('says of every row what it has there as overtime or as material', () => {
    const frozen = netFrozenLines(stored, january);
    const texts = (amounts: ReturnType<typeof findPostedOvertime>) =>
      [...amounts].map(([id, amount]) => `${id} ${moneyText(amount)}`);
    expect(texts(findPostedOvertime(frozen))).toEqual(['a 7.50', 'b 0.00', 'issue 0.00']);
    expect(texts(findPostedMaterial(frozen))).toEqual(['a 0.00', 'b 0.00', 'issue -12.00']);
  });
});
