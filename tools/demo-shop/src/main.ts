import { closeDatabase, createReader, openDatabase } from '@brakeven/use-cases';
import { mkdir, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { seedDemoShop, writeUnsettledTimesheet } from './seed';
import { SIGN_INS } from './story';

/**
 * Makes the demo shop unless there is a shop, and prints what `npm start` tells: the sign-ins, and a timesheet to
 * try. Needs DATABASE_URL and DATABASE_OWNER_URL; the argument names a folder for the timesheet.
 */
async function main(): Promise<void> {
  const db = openDatabase(readUrl('DATABASE_URL'), { connectionsMax: 2 });
  const ownerDb = openDatabase(readUrl('DATABASE_OWNER_URL'), { connectionsMax: 1 });
  try {
    const onProgress = (message: string): void => void process.stderr.write(`${message}\n`);
    const reader = createReader();
    const state = await seedDemoShop({ db, ownerDb, reader, onProgress });
    const isThere = state !== 'not wanted';
    const signIns = isThere ? SIGN_INS.map(({ role, email, password }) => ({ role, email, password })) : [];
    const timesheet = isThere ? await writeTimesheet(process.argv[2]) : null;
    process.stdout.write(`${JSON.stringify({ seeded: state === 'made', signIns, timesheet })}\n`);
  } finally {
    await Promise.all([closeDatabase(db), closeDatabase(ownerDb)]);
  }
}

async function writeTimesheet(folder: string | undefined): Promise<string | null> {
  if (!folder) return null;
  const { name, bytes } = await writeUnsettledTimesheet();
  await mkdir(folder, { recursive: true });
  await writeFile(join(folder, name), bytes);
  return join(folder, name);
}

function readUrl(name: string): string {
  const url = process.env[name];
  if (!url) throw new Error(`${name} is not set; npm start sets it.`);
  return url;
}

await main();
