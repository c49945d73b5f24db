import { type Kysely, sql } from 'kysely';

const CORRECTED = ['sheet_lot', 'material_issue', 'outside_service', 'invoice'];

/** A row that took the place of another notes the first one of them, so that only one of them counts at a time. */
export async function up(db: Kysely<unknown>): Promise<void> {
  for (const table of CORRECTED) await sql.raw(`alter table ${table} add column corrects uuid`).execute(db);
}

export async function down(db: Kysely<unknown>): Promise<void> {
  for (const table of CORRECTED) await sql.raw(`alter table ${table} drop column corrects`).execute(db);
}
