import { type NewTimeEntry, insertTimeEntries, ENTRIES_PER_INSERT } from '@brakeven/database';
import { importTimesheet, type UploadedFile } from '@brakeven/use-cases';
import { addDays, toLocalDate } from '@brakeven/values';
import { createReader, type TimesheetLine, writeTimesheetWorkbook } from '@brakeven/workbook';
import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import pg from 'pg';
import { from as copyFrom } from 'pg-copy-streams';
import { v7 as newId } from 'uuid';
import { type Bench, type BenchRow } from './bench';
import { type BenchShop, createBenchShop, EMPLOYEES, FIRST_DAY } from './bench-shop';
import { alternate, formatAgainst, formatMs, median, timeMs } from './measure';

const ROWS = 10_000;
const ROUNDS = 5;
const JOBS = 100;
const ROWS_PER_DAY = EMPLOYEES * 5;
const DAYS = ROWS / ROWS_PER_DAY;

const bench: Bench = async ({ makeDatabase, say }) => {
  const database = await makeDatabase('bench_import');
  const shop = await createBenchShop(database, JOBS);
  await shop.addHistory({ entries: 20_000, entriesPerDay: 80 });
  await shop.tidy();
  const rows = await compareCommitWithReading(shop, say);
  rows.push(await compareInsertWithCopy(shop, database.DATABASE_OWNER_URL));
  await shop.close();
  return rows;
};
export default bench;

/** Each round takes another ten weeks in, so that every row is new. */
async function compareCommitWithReading(shop: BenchShop, say: (text: string) => void): Promise<BenchRow[]> {
  const taken: Taken[] = [];
  for (let round = 0; round <= ROUNDS; round += 1) {
    const file = await writeFile(round);
    const times = await takeFile(shop, file);
    if (round > 0) taken.push(times);
  }
  const readingMs = median(taken.map((times) => times.readingMs));
  const checkingMs = median(taken.map((times) => times.checkingMs));
  const commitMs = median(taken.map((times) => times.commitMs));
  const rollupMs = median(taken.map((times) => times.rollupMs));
  say(`The rollup of the ${DAYS} days that follows took ${formatMs(rollupMs)}.`);
  const against = (what: string, ms: number) => formatAgainst(what, ms, 'reading', readingMs, ROUNDS);
  return [
    {
      measure: `import of ${ROWS} rows: commit (writing all of it in one transaction) ÷ reading the file`,
      ratio: commitMs / readingMs,
      aim: { atMost: 0.5 },
      detail: against('writing and commit', commitMs),
    },
    {
      measure: '… checks between the two (names, rules, what is there already) ÷ reading the file',
      ratio: checkingMs / readingMs,
      aim: null,
      detail: against('checks', checkingMs),
    },
  ];
}

interface Taken {
  readingMs: number;
  /** Finding the mapping, names, rules, what is there. */
  checkingMs: number;
  /** Writing file, entries, mapping and spellings, and the transaction's end. */
  commitMs: number;
  rollupMs: number;
}

async function takeFile({ owner }: BenchShop, file: UploadedFile): Promise<Taken> {
  const reader = createReader({ workerUrl: new URL('./read-worker.js', import.meta.url) });
  const at = { start: performance.now(), read: 0, checked: 0, committed: 0 };
  const imported = await importTimesheet(
    owner,
    file,
    {},
    {
      reader: {
        readSheets: async (...given) => {
          const sheets = await reader.readSheets(...given);
          at.read = performance.now();
          return sheets;
        },
      },
      onProgress: ({ stage }) => {
        if (stage === 'writing') at.checked ||= performance.now();
        if (stage === 'rolling-up') at.committed = performance.now();
      },
      onRollupFailed: (error) => {
        throw error;
      },
    },
  );
  if (imported.entriesAdded !== ROWS)
    throw new Error(`${imported.entriesAdded} of ${ROWS} entries were added.`);
  return {
    readingMs: at.read - at.start,
    checkingMs: at.checked - at.read,
    commitMs: at.committed - at.checked,
    rollupMs: performance.now() - at.committed,
  };
}

async function writeFile(round: number): Promise<UploadedFile> {
  const firstDay = addDays(toLocalDate('2025-01-01'), round * DAYS);
  const rows = Array.from({ length: ROWS }, (_, index): TimesheetLine => ({
    workedOn: addDays(firstDay, Math.floor(index / ROWS_PER_DAY)),
    employee: String(1 + (index % EMPLOYEES)),
    job: `J-${1 + ((index * 31) % JOBS)}`,
    operation: `OP${1 + (index % 8)}`,
    machine: index % 4 === 0 ? `M${1 + (index % 6)}` : null,
    hours: (0.25 + (index % 9) * 0.25).toFixed(2),
    good: index % 50,
    scrap: index % 100 === 0 ? 1 : null,
    note: index % 10 === 0 ? 'second set-up' : null,
  }));
  const bytes = await writeTimesheetWorkbook({ title: `Hours from ${firstDay}`, rows });
  return { name: `hours-${round}.xlsx`, bytes };
}

/**
 * The same rows into the same table, with its indexes, references and triggers. PostgreSQL refuses COPY where
 * row-level security holds, so COPY runs as the table's owner with it lifted; the application's insert keeps it.
 */
async function compareInsertWithCopy(shop: BenchShop, ownerUrl: string): Promise<BenchRow> {
  const owner = new pg.Client({ connectionString: ownerUrl });
  await owner.connect();
  await owner.query('alter table time_entry no force row level security');
  const importId = await shop.addImport();
  const ids = await listIds(shop);
  let round = 0;
  const taken = await alternate(ROUNDS, {
    insert: () => timeInsert(shop, importId, makeEntries(ids, (round += 1))),
    copy: () => timeCopy(owner, shop.shop.shopId, importId, makeEntries(ids, (round += 1))),
  });
  await owner.end();
  return {
    measure: `${ROWS} entries written, share of COPY’s speed`,
    ratio: taken.copy / taken.insert,
    aim: { atLeast: 0.7 },
    detail: formatAgainst('insert', taken.insert, 'COPY', taken.copy, ROUNDS),
  };
}

type Ids = Record<'employees' | 'jobs' | 'operations' | 'machines', string[]>;

function listIds(shop: BenchShop): Promise<Ids> {
  return shop.inShop(async (trx) => ({
    employees: (await trx.selectFrom('employee').select('employeeId as id').execute()).map(({ id }) => id),
    jobs: (await trx.selectFrom('job').select('jobId as id').execute()).map(({ id }) => id),
    operations: (await trx.selectFrom('operation').select('operationId as id').execute()).map(({ id }) => id),
    machines: (await trx.selectFrom('machine').select('machineId as id').execute()).map(({ id }) => id),
  }));
}

function makeEntries({ employees, jobs, operations, machines }: Ids, round: number): NewTimeEntry[] {
  const firstDay = addDays(toLocalDate(FIRST_DAY), 500 + round * DAYS);
  const pick = (ids: string[], index: number): string => ids[index % ids.length] ?? '';
  return Array.from({ length: ROWS }, (_, index) => ({
    workedOn: addDays(firstDay, Math.floor(index / ROWS_PER_DAY)),
    employeeId: pick(employees, index),
    jobId: pick(jobs, index * 31),
    operationId: pick(operations, index),
    machineId: index % 4 === 0 ? pick(machines, index) : null,
    hours: (0.25 + (index % 9) * 0.25).toFixed(4),
    goodPieces: index % 50,
    scrapPieces: index % 100 === 0 ? 1 : null,
    note: index % 10 === 0 ? 'second set-up' : null,
    sourceRow: index,
    sourceCell: `F${index}`,
  }));
}

function timeInsert(shop: BenchShop, importId: string, entries: NewTimeEntry[]): Promise<number> {
  return timeMs(() =>
    shop.inShop(async (trx) => {
      for (let start = 0; start < entries.length; start += ENTRIES_PER_INSERT) {
        const batch = entries.slice(start, start + ENTRIES_PER_INSERT);
        await insertTimeEntries(trx, shop.shop.shopId, importId, batch);
      }
    }),
  );
}

/** Its text is made before the clock starts. */
async function timeCopy(
  owner: pg.Client,
  shopId: string,
  importId: string,
  entries: NewTimeEntry[],
): Promise<number> {
  const lines = entries.map((entry) => {
    const values = [shopId, importId, newId(), ...COPIED.map((name) => entry[name] ?? '\\N')];
    return `${values.join('\t')}\n`;
  });
  const columns = COPIED.map((name) => name.replace(/[A-Z]/g, (letter) => `_${letter.toLowerCase()}`));
  const text = `copy time_entry (shop_id, import_id, entry_id, ${columns.join(', ')}) from stdin`;
  return timeMs(async () => {
    await owner.query('begin');
    await owner.query(`select set_config('app.shop_id', $1, true)`, [shopId]);
    await pipeline(Readable.from([lines.join('')]), owner.query(copyFrom(text)));
    await owner.query('commit');
  });
}

const COPIED = [
  'workedOn',
  'employeeId',
  'jobId',
  'operationId',
  'machineId',
  'hours',
  'goodPieces',
  'scrapPieces',
  'note',
  'sourceRow',
  'sourceCell',
] as const satisfies readonly (keyof NewTimeEntry)[];
