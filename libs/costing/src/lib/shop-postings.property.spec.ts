import {
  addDays,
  D,
  type Decimal,
  endOfMonth,
  type LocalDate,
  type Mass,
  moneyText,
  sum,
  toHours,
  toLocalDate,
  toMoney,
} from '@brakeven/values';
import fc from 'fast-check';
import { bookOf, payRateOf } from '../../testing/example-shop';
import { COST_CATEGORIES } from './cost-categories';
import { type CostedEntry } from './entry-lines';
import { computeMovingAverage, type StockMove } from './moving-average';
import { computeWeekPremium, type OvertimeRule } from './overtime';
import { type PostedLine } from './post-lines';
import { computeShopPostings, type ShopRows, type Voidable } from './shop-postings';
import { type Invoice, type OutsideService } from './source-line';

const firstDay = toLocalDate('2026-03-02');
/** Most of them about the end of March, so that weeks and stocks straddle a close. */
const days = fc
  .oneof(
    { weight: 4, arbitrary: fc.integer({ min: 26, max: 34 }) },
    { weight: 1, arbitrary: fc.integer({ min: 0, max: 75 }) },
  )
  .map((day) => addDays(firstDay, day));
/** Low, so that many weeks have overtime. */
const threshold = toHours(16);
const cents = fc.integer({ min: 1, max: 300_000 }).map((parts) => toMoney(D(parts).div(100)));

type Bearer = OvertimeRule['overtimeTo'];

const someRows = fc.record({
  entries: fc.array(
    fc.record({
      workedOn: days,
      employeeId: fc.constantFrom('ana', 'ben'),
      jobId: fc.constantFrom('job-1', 'job-2'),
      isBillable: fc.boolean(),
      machineId: fc.constantFrom('press', null),
      hours: fc.integer({ min: 20_000, max: 120_000 }).map((parts) => toHours(D(parts).div(10_000))),
    }),
    { maxLength: 30 },
  ),
  moves: fc.array(
    fc.record({
      kind: fc.constantFrom('lot' as const, 'issue' as const, 'return' as const),
      movedOn: days,
      jobId: fc.constantFrom('job-1', 'job-2'),
      weight: fc.integer({ min: 1, max: 900_000 }).map((parts) => D(parts).div(10_000) as Mass),
      landedCost: cents,
    }),
    { maxLength: 15 },
  ),
  outside: fc.array(fc.record({ incurredOn: days, amount: cents }), { maxLength: 4 }),
  invoices: fc.array(
    fc.record({
      invoicedOn: days,
      amount: cents,
      kind: fc.constantFrom<Invoice['kind'][]>('invoice', 'credit-note'),
    }),
    { maxLength: 4 },
  ),
});

/** What happens to the shop, one after another. */
const someChanges = fc.array(
  fc.oneof(
    { weight: 5, arbitrary: fc.record({ kind: fc.constant('void' as const), which: fc.nat({ max: 999 }) }) },
    { weight: 2, arbitrary: fc.record({ kind: fc.constant('close' as const) }) },
    { weight: 1, arbitrary: fc.record({ kind: fc.constant('reopen' as const) }) },
    {
      weight: 1,
      arbitrary: fc.record({
        kind: fc.constant('raise' as const),
        wage: fc.integer({ min: 10, max: 60 }),
        on: days,
      }),
    },
    {
      weight: 1,
      arbitrary: fc.record({
        kind: fc.constant('settings' as const),
        to: fc.constantFrom<Bearer[]>('overhead', 'jobs'),
      }),
    },
  ),
  { minLength: 4, maxLength: 14 },
);
type Change = typeof someChanges extends fc.Arbitrary<(infer T)[]> ? T : never;

interface Shop {
  rows: Omit<ShopRows, 'stored' | 'closedThrough'>;
  closed: LocalDate[];
  /** The books: what is frozen, and the open days as last computed. */
  stored: PostedLine[];
}

function toShop(random: typeof someRows extends fc.Arbitrary<infer T> ? T : never): Shop {
  const opening = { kind: 'lot' as const, moveId: 'opening', movedOn: firstDay, weight: D(60) as Mass };
  const stock: Voidable<StockMove>[] = [{ ...opening, landedCost: toMoney('90.01'), isLive: true }];
  random.moves.forEach(({ jobId, landedCost, ...move }, index) => {
    const base = { ...move, moveId: `move-${index}`, isLive: true };
    const next =
      base.kind === 'lot' ? { ...base, kind: base.kind, landedCost } : { ...base, kind: base.kind, jobId };
    if (computeMovingAverage([...stock, next]).ok) stock.push(next);
  });
  return {
    rows: {
      entries: random.entries.map((entry, index) => ({ ...entry, entryId: `entry-${index}`, isLive: true })),
      stock: [stock],
      outsideServices: random.outside.map((row, index): Voidable<OutsideService> => ({
        ...row,
        outsideServiceId: `outside-${index}`,
        jobId: 'job-1',
        isLive: true,
      })),
      invoices: random.invoices.map((row, index) => ({
        ...row,
        invoiceId: `invoice-${index}`,
        jobId: 'job-1',
        isLive: true,
      })),
      book: bookOf(),
      overtime: { thresholdHours: threshold, overtimeTo: 'overhead', weekStart: 1 },
    },
    closed: [],
    stored: [],
  };
}

function voidOne(shop: Shop, which: number): Shop['rows'] {
  const { entries, stock, outsideServices, invoices } = shop.rows;
  const moves = stock.flat();
  const count = entries.length + moves.length + outsideServices.length + invoices.length;
  let left = count === 0 ? -1 : which % count;
  const flip = <T extends Voidable<object>>(rows: readonly T[]): T[] =>
    rows.map((row) => ((left -= 1) === -1 ? { ...row, isLive: !row.isLive } : row));
  const flipped = {
    entries: flip(entries),
    moves: flip(moves),
    outside: flip(outsideServices),
    invoices: flip(invoices),
  };
  const isCovered = computeMovingAverage(flipped.moves.filter((move) => move.isLive)).ok;
  return {
    ...shop.rows,
    entries: flipped.entries,
    stock: isCovered ? [flipped.moves] : stock,
    outsideServices: flipped.outside,
    invoices: flipped.invoices,
  };
}

function applyChange(shop: Shop, change: Change): Shop {
  switch (change.kind) {
    case 'void':
      return { ...shop, rows: voidOne(shop, change.which) };
    case 'raise': {
      const rates = [
        payRateOf('first', '2026-01-01', '24', '30'),
        payRateOf('raise', change.on, `${change.wage}`, '31'),
      ];
      const payRates = new Map([...shop.rows.book.payRates, ['ana', rates]]);
      return { ...shop, rows: { ...shop.rows, book: { ...shop.rows.book, payRates } } };
    }
    case 'settings':
      return { ...shop, rows: { ...shop.rows, overtime: { ...shop.rows.overtime, overtimeTo: change.to } } };
    case 'close': {
      const last = shop.closed.at(-1);
      return { ...shop, closed: [...shop.closed, endOfMonth(last ? addDays(last, 1) : firstDay)] };
    }
    case 'reopen':
      return { ...shop, closed: shop.closed.slice(0, -1) };
  }
}

const closedThrough = (shop: Shop): LocalDate | null => shop.closed.at(-1) ?? null;
const frozenOf = (shop: Shop): PostedLine[] =>
  shop.stored.filter((line) => line.postedOn <= (closedThrough(shop) ?? ''));

/** Computes the open days and leaves the frozen lines alone, as a rollup does. */
function rollUp(shop: Shop): Shop {
  const { lines } = computeShopPostings({
    ...shop.rows,
    stored: shop.stored,
    closedThrough: closedThrough(shop),
  });
  return { ...shop, stored: [...frozenOf(shop), ...lines] };
}

const textOf = (line: PostedLine): string =>
  [
    line.postedOn,
    line.sourceId,
    line.category,
    line.jobId,
    line.quantity.toFixed(),
    moneyText(line.amount),
  ].join(' ');
const textsOf = (lines: readonly PostedLine[]): string[] => lines.map(textOf).sort();

/** Every state of a shop after each of its changes, rolled up each time. */
function statesOf(random: Parameters<typeof toShop>[0], changes: readonly Change[]): Shop[] {
  const states = [rollUp(toShop(random))];
  for (const change of changes) states.push(rollUp(applyChange(states.at(-1) as Shop, change)));
  return states;
}

it('a closed month stays as it is, whatever happens after', () => {
  fc.assert(
    fc.property(someRows, someChanges, (random, changes) => {
      const states = statesOf(random, changes);
      states.slice(1).forEach((state, index) => {
        const before = states[index];
        if (!before || state.closed.length < before.closed.length) return;
        const postedNow = state.stored.filter((line) => line.postedOn <= (closedThrough(before) ?? ''));
        expect(textsOf(postedNow)).toEqual(textsOf(frozenOf(before)));
      });
    }),
  );
});

it('rolled up again, or from the frozen lines alone, nothing changes', () => {
  fc.assert(
    fc.property(someRows, someChanges, (random, changes) => {
      const last = statesOf(random, changes).at(-1) as Shop;
      expect(textsOf(rollUp(last).stored)).toEqual(textsOf(last.stored));
      expect(textsOf(rollUp({ ...last, stored: frozenOf(last) }).stored)).toEqual(textsOf(last.stored));
    }),
  );
});

it('a row counts once if it stands and not at all if it does not, however often it was posted and taken back', () => {
  fc.assert(
    fc.property(someRows, someChanges, (random, changes) => {
      const { rows, stored } = statesOf(random, changes).at(-1) as Shop;
      const netOf = (sourceId: string, category: string): Decimal =>
        sum(
          stored
            .filter((line) => line.sourceId === sourceId && line.category === category)
            .map((l) => l.quantity),
        );
      for (const entry of rows.entries)
        expect(netOf(entry.entryId, 'labour').toFixed()).toBe(entry.isLive ? entry.hours.toFixed() : '0');
      for (const invoice of rows.invoices)
        expect(netOf(invoice.invoiceId, 'invoiced').toNumber()).toBe(signOf(invoice));
      for (const entry of rows.entries.filter((of) => !of.isLive))
        for (const category of COST_CATEGORIES) expect(netOf(entry.entryId, category).toFixed()).toBe('0');
    }),
  );
});

function signOf({ isLive, kind }: Voidable<Invoice>): number {
  if (!isLive) return 0;
  return kind === 'invoice' ? 1 : -1;
}

it('an issue of an open day takes the average of what the books have before it', () => {
  fc.assert(
    fc.property(someRows, someChanges, (random, changes) => {
      const shop = statesOf(random, changes).at(-1) as Shop;
      const frozen = new Set(frozenOf(shop).map((line) => line.sourceId));
      const order = (move: StockMove) => `${move.movedOn} ${move.kind === 'lot' ? 0 : 1} ${move.moveId}`;
      const live = shop.rows.stock.flat().filter((move) => move.isLive);
      let [value, weight]: [Decimal, Decimal] = [D(0), D(0)];
      for (const move of live.sort((a, b) => (order(a) < order(b) ? -1 : 1))) {
        const onJob = sum(
          shop.stored.filter((line) => line.sourceId === move.moveId).map((line) => line.amount),
        );
        if (move.kind === 'issue' && !frozen.has(move.moveId))
          expect(onJob.minus(move.weight.times(value).div(weight)).abs().lte('0.005')).toBe(true);
        value = value.plus(move.kind === 'lot' ? move.landedCost : onJob.negated());
        weight = move.kind === 'issue' ? weight.minus(move.weight) : weight.plus(move.weight);
      }
      const landed = sum(live.flatMap((move) => (move.kind === 'lot' ? [move.landedCost] : [])));
      const onJobs = sum(
        shop.stored.filter((line) => line.category === 'material').map((line) => line.amount),
      );
      expect(moneyText(toMoney(landed.minus(onJobs)))).toBe(moneyText(toMoney(value)));
    }),
  );
});

it('the overtime of a week comes to its premium, unless all of it lies in a closed month', () => {
  fc.assert(
    fc.property(someRows, someChanges, (random, changes) => {
      const shop = statesOf(random, changes).at(-1) as Shop;
      const openFrom = closedThrough(shop) ?? '';
      const frozen = new Set(frozenOf(shop).map((line) => line.sourceId));
      const weeks = new Map<string, Voidable<CostedEntry>[]>();
      for (const entry of shop.rows.entries.filter((of) => of.isLive)) {
        const weekday = new Date(`${entry.workedOn}T00:00:00Z`).getUTCDay();
        const key = `${entry.employeeId} ${addDays(entry.workedOn, -((weekday + 6) % 7))}`;
        weeks.set(key, [...(weeks.get(key) ?? []), entry]);
      }
      for (const week of weeks.values()) {
        if (week.every((entry) => entry.workedOn <= openFrom && frozen.has(entry.entryId))) continue;
        const { premium } = computeWeekPremium(
          week.map((entry) => ({ hours: entry.hours, wagePerHour: wageOf(shop, entry) })),
          threshold,
        );
        const lines = shop.stored.filter(
          (line) => line.category === 'overtime' && week.some((entry) => entry.entryId === line.sourceId),
        );
        expect(moneyText(sum(lines.map((line) => line.amount)))).toBe(premium && moneyText(premium));
      }
    }),
  );
});

function wageOf({ rows }: Shop, { employeeId, workedOn }: CostedEntry) {
  const rates = [...(rows.book.payRates.get(employeeId) ?? [])].sort((a, b) =>
    a.validFrom < b.validFrom ? 1 : -1,
  );
  return rates.find((rate) => rate.validFrom <= workedOn)?.wagePerHour ?? null;
}
