import { type RawBuilder, sql } from 'kysely';
import { type ShopTransaction } from './tenancy';

/** What a shop is set up from: each table's id and the columns that people state, with their types. */
export const REGISTER = {
  employee: { id: 'employeeId', columns: { number: 'text', name: 'text', isActive: 'boolean' } },
  payRate: {
    id: 'payRateId',
    columns: {
      employeeId: 'uuid',
      validFrom: 'date',
      wagePerHour: 'numeric(14,6)',
      burdenPercent: 'numeric(9,4)',
    },
  },
  customer: { id: 'customerId', columns: { name: 'text' } },
  machine: {
    id: 'machineId',
    columns: {
      code: 'text',
      name: 'text',
      kind: 'text',
      inServiceOn: 'date',
      ratedForceKn: 'numeric(12,5)',
      bedLengthMm: 'numeric(12,5)',
    },
  },
  machineCostItem: {
    id: 'machineCostItemId',
    columns: {
      machineId: 'uuid',
      incurredOn: 'date',
      kind: 'text',
      description: 'text',
      amount: 'numeric(14,2)',
    },
  },
  machineRate: {
    id: 'machineRateId',
    columns: {
      machineId: 'uuid',
      validFrom: 'date',
      machineHourRate: 'numeric(14,6)',
      chargeOutRate: 'numeric(14,6)',
      runningCostPerHour: 'numeric(14,6)',
    },
  },
  operation: { id: 'operationId', columns: { code: 'text', name: 'text', defaultMachineId: 'uuid' } },
  overheadRate: {
    id: 'overheadRateId',
    columns: { validFrom: 'date', ratePerLabourHour: 'numeric(14,6)' },
  },
  job: {
    id: 'jobId',
    columns: {
      number: 'text',
      customerId: 'uuid',
      title: 'text',
      quantity: 'integer',
      openedOn: 'date',
      dueOn: 'date',
      quotedPrice: 'numeric(14,2)',
      isBillable: 'boolean',
      status: 'text',
    },
  },
  punch: {
    id: 'punchId',
    columns: {
      machineId: 'uuid',
      name: 'text',
      noseRadiusMm: 'numeric(12,5)',
      angle: 'numeric(7,4)',
      lengthMm: 'numeric(12,5)',
      forceLimitKnPerM: 'numeric(12,5)',
    },
  },
  die: {
    id: 'dieId',
    columns: {
      machineId: 'uuid',
      name: 'text',
      lengthMm: 'numeric(12,5)',
      forceLimitKnPerM: 'numeric(12,5)',
    },
  },
  dieOpening: {
    id: 'dieOpeningId',
    columns: {
      dieId: 'uuid',
      openingMm: 'numeric(12,5)',
      angle: 'numeric(7,4)',
      shoulderRadiusMm: 'numeric(12,5)',
    },
  },
  material: {
    id: 'materialId',
    columns: {
      name: 'text',
      grade: 'text',
      form: 'text',
      gauge: 'text',
      thicknessMm: 'numeric(12,5)',
      densityKgM3: 'numeric(10,3)',
      tensileStrengthMpa: 'numeric(10,3)',
      recoveryPricePerKg: 'numeric(14,6)',
    },
  },
  sheetLot: {
    id: 'lotId',
    isVoidable: true,
    columns: {
      number: 'text',
      materialId: 'uuid',
      receivedOn: 'date',
      vendor: 'text',
      sheets: 'integer',
      sheetLengthMm: 'numeric(12,5)',
      sheetWidthMm: 'numeric(12,5)',
      weightKg: 'numeric(20,10)',
      cost: 'numeric(14,2)',
      freight: 'numeric(14,2)',
    },
  },
  materialIssue: {
    id: 'issueId',
    isVoidable: true,
    columns: {
      jobId: 'uuid',
      materialId: 'uuid',
      issuedOn: 'date',
      kind: 'text',
      sheets: 'integer',
      pieces: 'integer',
      blankLengthMm: 'numeric(12,5)',
      blankWidthMm: 'numeric(12,5)',
      weightKg: 'numeric(20,10)',
      note: 'text',
    },
  },
  outsideService: {
    id: 'outsideServiceId',
    isVoidable: true,
    columns: {
      jobId: 'uuid',
      incurredOn: 'date',
      vendor: 'text',
      description: 'text',
      amount: 'numeric(14,2)',
    },
  },
  invoice: {
    id: 'invoiceId',
    isVoidable: true,
    columns: {
      jobId: 'uuid',
      kind: 'text',
      number: 'text',
      invoicedOn: 'date',
      description: 'text',
      amount: 'numeric(14,2)',
    },
  },
  estimate: {
    id: 'jobId',
    columns: { estimatedOn: 'date', scrapAllowancePercent: 'numeric(9,4)', marginPercent: 'numeric(9,4)' },
  },
  estimateLine: {
    id: 'estimateLineId',
    columns: {
      jobId: 'uuid',
      position: 'integer',
      kind: 'text',
      operationId: 'uuid',
      machineId: 'uuid',
      setupHours: 'numeric(9,4)',
      minutesPerPiece: 'numeric(12,4)',
      pieces: 'integer',
      labourRate: 'numeric(14,6)',
      machineHourRate: 'numeric(14,6)',
      overheadRate: 'numeric(14,6)',
      materialId: 'uuid',
      weightKg: 'numeric(20,10)',
      pricePerKg: 'numeric(14,6)',
      description: 'text',
      amount: 'numeric(14,2)',
    },
  },
} as const satisfies Record<string, RegisterSpec>;

interface RegisterSpec {
  id: string;
  columns: Record<string, string>;
  /** Rows are not overwritten where they cost something: they are voided and others take their place. */
  isVoidable?: true;
}

export type RegisterTable = keyof typeof REGISTER;
/** As stored: decimals as text with the column's own number of decimals, dates as text. */
export type RegisterValue = string | number | boolean | null;
export type RegisterValues = Readonly<Record<string, RegisterValue>>;
export interface RegisterRow {
  id: string;
  values: RegisterValues;
}

/** All rows of a table of the register that count, in the order in which they were added. */
export async function listRegisterRows(
  trx: ShopTransaction,
  shopId: string,
  table: RegisterTable,
): Promise<RegisterRow[]> {
  const { id, columns, isVoidable }: RegisterSpec = REGISTER[table];
  const names = Object.keys(columns);
  const { rows } = await sql<Record<string, RegisterValue>>`
    select ${sql.join([id, ...names].map((name) => sql.ref(name)))} from ${sql.table(table)}
    where shop_id = ${shopId} ${isVoidable ? sql`and voided_at is null` : sql``} order by ${sql.ref(id)}`.execute(
    trx,
  );
  return rows.map((row) => ({
    id: String(row[id]),
    values: Object.fromEntries(names.map((name) => [name, row[name] ?? null])),
  }));
}

/** Adds rows in one statement; each states every column. */
export async function insertRegisterRows(
  trx: ShopTransaction,
  shopId: string,
  table: RegisterTable,
  rows: readonly RegisterRow[],
): Promise<void> {
  if (rows.length === 0) return;
  const { id, columns } = REGISTER[table];
  const names = sql.join([id, ...Object.keys(columns)].map((name) => sql.ref(name)));
  await sql`
    insert into ${sql.table(table)} (shop_id, ${names})
    select ${shopId}::uuid, given.* from ${toRecordset(table, rows)}`.execute(trx);
}

/**
 * Adds rows and voids those whose place they take, in one statement: the books are looked at with both, and numbers
 * that are unique among the rows that count may be used again.
 */
export async function replaceRegisterRows(
  trx: ShopTransaction,
  shopId: string,
  table: RegisterTable,
  rows: readonly RegisterRow[],
  voided: { ids: readonly string[]; by: string },
): Promise<void> {
  const { id, columns } = REGISTER[table];
  const names = sql.join([id, ...Object.keys(columns)].map((name) => sql.ref(name)));
  // Counting what was voided makes the voiding come first.
  await sql`
    with voided as (
      update ${sql.table(table)} set voided_at = now(), voided_by = ${voided.by}
      where shop_id = ${shopId} and ${sql.ref(id)} = any (${voided.ids}::uuid[]) and voided_at is null
      returning 1
    )
    insert into ${sql.table(table)} (shop_id, ${names})
    select ${shopId}::uuid, given.*
    from (select count(*) from voided) gone cross join ${toRecordset(table, rows)}`.execute(trx);
}

/** Deletes rows in one statement. */
export async function deleteRegisterRows(
  trx: ShopTransaction,
  shopId: string,
  table: RegisterTable,
  ids: readonly string[],
): Promise<void> {
  if (ids.length === 0) return;
  await sql`
    delete from ${sql.table(table)}
    where shop_id = ${shopId} and ${sql.ref(REGISTER[table].id)} = any (${ids}::uuid[])`.execute(trx);
}

/**
 * What issues and returns cost their jobs in months that are closed, by their ids; below 0 for a return. Those
 * amounts stay, whatever the stock's average is now.
 */
export async function listPostedIssueAmounts(
  trx: ShopTransaction,
  shopId: string,
): Promise<Map<string, string>> {
  const { rows } = await sql<{ issueId: string; amount: string }>`
    select i.issue_id, sum(l.amount) as amount
    from material_issue i
    join cost_line l on l.shop_id = i.shop_id and l.job_id = i.job_id and l.source_id = i.issue_id
      and l.posted_on between i.issued_on and books_closed_through()
    where i.shop_id = ${shopId} and i.voided_at is null
    group by i.issue_id having sum(l.quantity) <> 0`.execute(trx);
  return new Map(rows.map(({ issueId, amount }) => [issueId, amount]));
}

/** Changes rows in one statement, so that their audit events and dirty days are written in one go as well. */
export async function updateRegisterRows(
  trx: ShopTransaction,
  shopId: string,
  table: RegisterTable,
  rows: readonly RegisterRow[],
): Promise<void> {
  if (rows.length === 0) return;
  const { id, columns } = REGISTER[table];
  const changes = Object.keys(columns).map((name) => sql`${sql.ref(name)} = ${sql.ref(`given.${name}`)}`);
  await sql`
    update ${sql.table(table)} as kept set ${sql.join(changes)} from ${toRecordset(table, rows)}
    where kept.shop_id = ${shopId} and ${sql.ref(`kept.${id}`)} = ${sql.ref(`given.${id}`)}`.execute(trx);
}

function toRecordset(table: RegisterTable, rows: readonly RegisterRow[]): RawBuilder<unknown> {
  const { id, columns } = REGISTER[table];
  const types = Object.entries({ [id]: 'uuid', ...columns });
  const definition = types.map(([name, type]) => sql`${sql.ref(name)} ${sql.raw(type)}`);
  const json = rows.map(({ id: rowId, values }) => toSnakeKeys({ [id]: rowId, ...values }));
  return sql`json_to_recordset(${JSON.stringify(json)}::json) as given (${sql.join(definition)})`;
}

/** Kysely turns the names of references into snake case, not those inside JSON. */
function toSnakeKeys(row: Record<string, RegisterValue>): Record<string, RegisterValue> {
  return Object.fromEntries(
    Object.entries(row).map(([name, value]) => [
      name.replace(/[A-Z]/g, (letter) => `_${letter.toLowerCase()}`),
      value,
    ]),
  );
}
