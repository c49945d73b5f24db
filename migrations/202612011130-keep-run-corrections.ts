import { type Kysely, sql } from 'kysely';

/** A press run that took the place of another notes the first one of them, so that only one of them counts at a time. */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`alter table press_run add column corrects uuid`.execute(db);
}

export async function down(db: Kysely<unknown>): Promise<void> {
  await sql`alter table press_run drop column corrects`.execute(db);
}
