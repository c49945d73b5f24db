import { ENTRY_SORTS, type EntryListQuery } from '@brakeven/contract';
import { getEntryTotals, listEntries } from '@brakeven/use-cases';
import pg from 'pg';
import { type Bench, type BenchDatabase, type BenchRow } from './bench';
import { type BenchShop, createBenchShop } from './bench-shop';
import { alternate, formatAgainst, formatMs, timeMs } from './measure';

const ENTRIES = 1_000_000;
const ENTRIES_PER_DAY = 400;
const PAGE = 100;
const ROUNDS = 31;
/** Pages in a row, so that a clock's tick is small against what is timed. */
const PAGES_PER_ROUND = 5;

const bench: Bench = async ({ makeDatabase, say }) => {
  const database = await makeDatabase('bench_grid');
  const shop = await createBenchShop(database, ENTRIES / 100);
  const fillMs = await timeMs(() => shop.addHistory({ entries: ENTRIES, entriesPerDay: ENTRIES_PER_DAY }));
  say(`${ENTRIES} entries were made in ${formatMs(fillMs)}.`);
  await shop.tidy();
  const query = await connectAsShop(database, shop.shop.shopId);
  const rows: BenchRow[] = [];
  for (const depth of DEPTHS) rows.push(...(await comparePages(shop, query, depth)));
  await query.end();
  await tellOtherSorts(shop, say);
  await shop.close();
  return rows;
};
export default bench;

const DEPTHS = [
  { name: 'start', skip: 0 },
  { name: 'middle', skip: ENTRIES / 2 },
  { name: 'end', skip: ENTRIES - PAGE - 1 },
] as const;

/** The application's role under the same row-level security; its shop is set once, not at each query. */
async function connectAsShop(database: BenchDatabase, shopId: string): Promise<pg.Client> {
  const client = new pg.Client({ connectionString: database.DATABASE_URL });
  await client.connect();
  await client.query(`select set_config('app.shop_id', $1, false)`, [shopId]);
  return client;
}

interface Position {
  workedOn: string;
  entryId: string;
}

async function comparePages(
  shop: BenchShop,
  client: pg.Client,
  { name, skip }: (typeof DEPTHS)[number],
): Promise<BenchRow[]> {
  const after = skip === 0 ? null : await findPosition(client, skip - 1);
  const request = toRequest(after);
  await assertSamePage(shop, client, request, after);
  const perPage = async (work: () => Promise<unknown>): Promise<number> => {
    const ms = await timeMs(async () => {
      for (let page = 0; page < PAGES_PER_ROUND; page += 1) await work();
    });
    return ms / PAGES_PER_ROUND;
  };
  const taken = await alternate(ROUNDS, {
    page: () => perPage(() => listEntries(shop.owner, request)),
    query: () => perPage(() => client.query(toQuery(NAMED, after))),
    bare: () => perPage(() => client.query(toQuery(BARE, after))),
  });
  return [
    {
      measure: `grid page at the ${name} of ${ENTRIES} entries ÷ raw keyset query of the same columns`,
      ratio: taken.page / taken.query,
      aim: { atMost: 2 },
      detail: formatAgainst('page', taken.page, 'query', taken.query, ROUNDS),
    },
    {
      measure: `… ÷ raw keyset query of the entries' own columns, no names`,
      ratio: taken.page / taken.bare,
      aim: null,
      detail: formatAgainst('page', taken.page, 'query', taken.bare, ROUNDS),
    },
  ];
}

async function findPosition(client: pg.Client, skip: number): Promise<Position> {
  const { rows } = await client.query<Position>(
    `select worked_on::text as "workedOn", entry_id as "entryId" from time_entry where voided_at is null
     order by worked_on desc, entry_id desc offset $1 limit 1`,
    [skip],
  );
  const [position] = rows;
  if (!position) throw new Error(`There is no entry ${skip}.`);
  return position;
}

function toRequest(after: Position | null): EntryListQuery {
  const position = after && { value: after.workedOn, id: after.entryId };
  const cursor = position && JSON.stringify({ list: 'entries.workedOn.desc', position });
  return {
    sort: 'workedOn',
    direction: 'desc',
    limit: PAGE,
    ...(cursor && { cursor: Buffer.from(cursor).toString('base64url') }),
  };
}

const BARE = `select t.* from time_entry t`;
const NAMED = `select t.entry_id, t.worked_on::text, t.employee_id, e.name as employee, t.job_id, j.number, j.title,
    o.name as operation, m.name as machine, t.hours, t.good_pieces, t.scrap_pieces, t.note, t.import_id, i.file_name,
    i.sheet, t.source_row, t.source_cell
  from time_entry t
  join employee e on e.shop_id = t.shop_id and e.employee_id = t.employee_id
  join job j on j.shop_id = t.shop_id and j.job_id = t.job_id
  join operation o on o.shop_id = t.shop_id and o.operation_id = t.operation_id
  left join machine m on m.shop_id = t.shop_id and m.machine_id = coalesce(t.machine_id, o.default_machine_id)
  left join timesheet_import i on i.shop_id = t.shop_id and i.import_id = t.import_id`;

function toQuery(select: string, after: Position | null): pg.QueryConfig {
  const position = after && 'and (t.worked_on, t.entry_id) < ($1::date, $2::uuid)';
  return {
    text: `${select} where t.voided_at is null ${position ?? ''}
      order by t.worked_on desc, t.entry_id desc limit ${PAGE}`,
    values: after ? [after.workedOn, after.entryId] : [],
  };
}

async function assertSamePage(
  shop: BenchShop,
  client: pg.Client,
  request: EntryListQuery,
  after: Position | null,
): Promise<void> {
  const { items } = await listEntries(shop.owner, request);
  const { rows } = await client.query<{ entry_id: string }>(toQuery(NAMED, after));
  const [ours, theirs] = [items.map((item) => item.entryId), rows.map((row) => row.entry_id)];
  if (ours.length !== PAGE || ours.join() !== theirs.join()) throw new Error('The pages are not the same.');
}

/** Once each: without an index of its own, a sort at this size takes seconds. */
async function tellOtherSorts({ owner }: BenchShop, say: (text: string) => void): Promise<void> {
  for (const sort of ENTRY_SORTS) {
    const request: EntryListQuery = { sort, direction: 'asc', limit: PAGE };
    let cursor: string | null = null;
    const firstMs = await timeMs(async () => {
      ({ nextCursor: cursor } = await listEntries(owner, request));
    });
    const nextMs = await timeMs(() => listEntries(owner, { ...request, cursor: cursor ?? undefined }));
    say(`Sorted by ${sort}: first page ${formatMs(firstMs)}, next page ${formatMs(nextMs)}.`);
  }
  const ofYear = { from: '2020-01-01', to: '2020-12-31' };
  const allMs = await timeMs(() => getEntryTotals(owner, {}));
  const yearMs = await timeMs(() => getEntryTotals(owner, ofYear));
  say(`Totals: of all entries ${formatMs(allMs)}, of one year of them ${formatMs(yearMs)}.`);
}
