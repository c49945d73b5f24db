import { AppError } from '@brakeven/contract';
import { type Database, type ShopContext } from '@brakeven/use-cases';
import { userInfo } from 'node:os';
import { type Cli } from './cli';

const CONNECTIONS_MAX = 4;

/** Runs work with a connection as the application. */
export function withDatabase<T>(cli: Cli, work: (db: Database) => Promise<T>): Promise<T> {
  return withUrl(cli, 'DATABASE_URL', work);
}

/** Runs work with a connection as the schema's owner, who alone makes and lists shops. */
export function withOwnerDatabase<T>(cli: Cli, work: (ownerDb: Database) => Promise<T>): Promise<T> {
  return withUrl(cli, 'DATABASE_OWNER_URL', work);
}

/**
 * Runs work in a shop, as the application and with the rights of an owner of the shop.
 * @throws AppError `shop_not_found`
 */
export function withShop<T>(cli: Cli, name: string, work: (context: ShopContext) => Promise<T>): Promise<T> {
  return withDatabase(cli, async (db) => {
    const { openShop } = await import('@brakeven/use-cases');
    return work(await openShop(db, name, actorName()));
  });
}

/** Who does it, for the audit trail: the account that runs the command. */
export function actorName(): string {
  try {
    return `${userInfo().username} at the command line`;
  } catch {
    // An account without a name, as in some containers, is no reason to stop.
    return 'command line';
  }
}

async function withUrl<T>(
  cli: Cli,
  variable: 'DATABASE_URL' | 'DATABASE_OWNER_URL',
  work: (db: Database) => Promise<T>,
): Promise<T> {
  const url = cli.env[variable];
  if (!url) {
    const message = `${variable} is not set, so the database cannot be reached. npm run cli sets it.`;
    throw new AppError('database_unreachable', message);
  }
  const { closeDatabase, openDatabase } = await import('@brakeven/use-cases');
  const db = openDatabase(url, { connectionsMax: CONNECTIONS_MAX });
  try {
    return await work(db);
  } finally {
    await closeDatabase(db);
  }
}
