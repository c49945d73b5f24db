import { migrations } from '@brakeven/migrations';
import { Migrator } from 'kysely';
import { type Database } from './connect';

/**
 * Brings the schema up to date; run as brakeven_owner.
 *
 * @returns names of the migrations that were applied, none when the schema was up to date
 * @throws the first migration's own error; what was applied before it stays applied
 */
export async function migrateToLatest(owner: Database): Promise<string[]> {
  const { error, results } = await createMigrator(owner).migrateToLatest();
  if (error) throw error;
  return (results ?? []).map((result) => result.migrationName);
}

/** Names of the migrations that have not been applied yet. */
export async function listPendingMigrations(owner: Database): Promise<string[]> {
  const all = await createMigrator(owner).getMigrations();
  return all.filter((migration) => !migration.executedAt).map((migration) => migration.name);
}

/** Undoes the latest migration; for tests and development. */
export async function migrateDown(owner: Database): Promise<string[]> {
  const { error, results } = await createMigrator(owner).migrateDown();
  if (error) throw error;
  return (results ?? []).map((result) => result.migrationName);
}

function createMigrator(owner: Database): Migrator {
  return new Migrator({ db: owner.withoutPlugins(), provider: { getMigrations: async () => migrations } });
}
