import { connect, type Database, listPendingMigrations, migrateToLatest } from '@brakeven/database';

export { findUnstorableValue, isUnreachable } from '@brakeven/database';
export { listPendingMigrations, type Database };

/** Opens a pool of connections; nothing is connected before the first query. */
export const openDatabase = connect;

/** Ends a pool once its queries have ended. */
export function closeDatabase(db: Database): Promise<void> {
  return db.destroy();
}

/** Asks the database for nothing, to learn that it answers. */
export async function pingDatabase(db: Database): Promise<void> {
  await db.selectNoFrom((eb) => eb.lit(1).as('one')).execute();
}

/** Brings the schema up to date, as brakeven_owner; answers the names of what was applied. */
export const migrateDatabase = migrateToLatest;
