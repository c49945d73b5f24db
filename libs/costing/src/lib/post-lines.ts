import { addDays, type Decimal, laterOf, type LocalDate, type Money, sum, toMoney } from '@brakeven/values';
import { type RateGap } from './entry-lines';
import { type SourceLine } from './source-line';

/** A line with its day in the books. It is late where that is not the day of the row itself. */
export interface PostedLine extends SourceLine {
  postedOn: LocalDate;
}

/** A gap with its day in the books. */
export interface PostedGap extends RateGap {
  postedOn: LocalDate;
}

/** A row, and the lines that it owes as rates and settings are now. */
export interface CostSource {
  sourceId: string;
  /** False once the row is voided. */
  isLive: boolean;
  /** What it owes if it is live and not posted in a closed month yet; else they are not looked at. */
  lines: readonly SourceLine[];
  gaps?: readonly RateGap[];
}

/** What the books are made of. */
export interface PostingInput {
  sources: readonly CostSource[];
  /** All lines of the books as they stand, or those posted in closed months alone. */
  stored: readonly PostedLine[];
  /** The last day of the latest closed month; null while none is closed. */
  closedThrough: LocalDate | null;
}

/** The lines and gaps of the days that are open. */
export interface Postings {
  lines: PostedLine[];
  gaps: PostedGap[];
}

/**
 * What the open days of the books hold: a pure function of rows, rates, settings and the frozen lines of closed
 * months. A live row that is not in a closed month posts its lines on its own day, or late on the first open day; one
 * that is there posts nothing; a voided one that is there posts late what takes it back; one that is not, nothing.
 * Rule in words: `RULES.posting`.
 */
export function computePostings({ sources, stored, closedThrough }: PostingInput): Postings {
  const frozen = netFrozenLines(stored, closedThrough);
  const postedOn = (workedOn: LocalDate): LocalDate =>
    closedThrough === null ? workedOn : laterOf(workedOn, addDays(closedThrough, 1));
  const result: Postings = { lines: [], gaps: [] };
  for (const source of sources) {
    const present = frozen.get(source.sourceId);
    const lines = present ? takeBack(present, source.isLive) : linesOf(source);
    result.lines.push(...lines.map((line) => ({ ...line, postedOn: postedOn(line.workedOn) })));
    const gaps = present || !source.isLive ? [] : (source.gaps ?? []);
    result.gaps.push(...gaps.map((gap) => ({ ...gap, postedOn: postedOn(gap.workedOn) })));
  }
  return result;
}

/**
 * What closed months hold, net, by source: lines and those that took them back cancel out. A source without an entry
 * is not in a closed month.
 */
export function netFrozenLines(
  stored: readonly PostedLine[],
  closedThrough: LocalDate | null,
): Map<string, SourceLine[]> {
  const groups = new Map<string, PostedLine[]>();
  for (const line of stored) {
    if (closedThrough === null || line.postedOn > closedThrough) continue;
    const key = lineKey(line);
    groups.set(key, [...(groups.get(key) ?? []), line]);
  }
  const netLines = [...groups.values()].map(addUp).filter((line) => line !== undefined);
  return groupBySource(netLines);
}

/**
 * What entries posted in closed months have there as overtime, net, as `computeOvertimeLines` takes it: 0 for an
 * entry without.
 */
export function findPostedOvertime(frozen: ReadonlyMap<string, readonly SourceLine[]>): Map<string, Money> {
  return findPostedAmounts(frozen, 'overtime');
}

/** What issues and returns posted in closed months have there, net, as `computeMovingAverage` takes it. */
export function findPostedMaterial(frozen: ReadonlyMap<string, readonly SourceLine[]>): Map<string, Money> {
  return findPostedAmounts(frozen, 'material');
}

function findPostedAmounts(
  frozen: ReadonlyMap<string, readonly SourceLine[]>,
  category: SourceLine['category'],
): Map<string, Money> {
  const amounts = [...frozen].map(([sourceId, lines]): [string, Money] => {
    const ofCategory = lines.filter((line) => line.category === category);
    return [sourceId, sum(ofCategory.map((line) => line.amount))];
  });
  return new Map(amounts);
}

function linesOf(source: CostSource): readonly SourceLine[] {
  return source.isLive ? source.lines : [];
}

function takeBack(present: readonly SourceLine[], isLive: boolean): SourceLine[] {
  return isLive ? [] : present.map((line) => withSum(line, line.quantity.negated(), line.amount.negated()));
}

/** Lines that can cancel out: the same row and category, the same bearer, the same rate. */
function lineKey(line: PostedLine): string {
  const { sourceId, category, jobId, employeeId, machineId, rateId } = line;
  const rates = [line.rate.toFixed(), line.rateFactor.toFixed()];
  return [sourceId, category, jobId, employeeId, machineId, rateId, ...rates].join('|');
}

function addUp(lines: readonly PostedLine[]): SourceLine | undefined {
  const [first] = lines;
  const quantity = sum(lines.map((line) => line.quantity));
  const amount = sum(lines.map((line) => line.amount));
  if (!first || (quantity.isZero() && amount.isZero())) return undefined;
  const { postedOn: _postedOn, ...line } = first;
  return withSum(line, quantity, amount);
}

function withSum(line: SourceLine, quantity: Decimal, amount: Decimal): SourceLine {
  return { ...line, quantity, amount: toMoney(amount) };
}

function groupBySource(lines: readonly SourceLine[]): Map<string, SourceLine[]> {
  const groups = new Map<string, SourceLine[]>();
  for (const line of lines) groups.set(line.sourceId, [...(groups.get(line.sourceId) ?? []), line]);
  return groups;
}
