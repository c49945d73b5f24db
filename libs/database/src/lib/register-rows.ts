import { type RawBuilder, sql } from 'kysely';
import { type ShopTransaction } from './tenancy';

/** What a shop is set up from: each table's id and the columns that people state, with their types. */
export const REGISTER = {
  employee: { id: 'employeeId', columns: { number: 'text', name: 'text' } },
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
} as const satisfies Record<string, { id: string; columns: Record<string, string> }>;

export type RegisterTable = keyof typeof REGISTER;
/** As stored: decimals as text with the column's own number of decimals, dates as text. */
export type RegisterValue = string | number | boolean | null;
export type RegisterValues = Readonly<Record<string, RegisterValue>>;
export interface RegisterRow {
  id: string;
  values: RegisterValues;
}

/** All rows of a table of the register, in the order in which they were added. */
export async function listRegisterRows(
  trx: ShopTransaction,
  shopId: string,
  table: RegisterTable,
): Promise<RegisterRow[]> {
  const { id, columns } = REGISTER[table];
  const names = Object.keys(columns);
  const { rows } = await sql<Record<string, RegisterValue>>`
    select ${sql.join([id, ...names].map((name) => sql.ref(name)))} from ${sql.table(table)}
    where shop_id = ${shopId} order by ${sql.ref(id)}`.execute(trx);
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
