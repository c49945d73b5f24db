import { hash, verify } from '@node-rs/argon2';
import { randomInt } from 'node:crypto';

/** argon2id, which is the package's default kind, at 19 MiB, two passes, one lane. */
const COST = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };

/** Letters and digits that are not taken for one another when read aloud or from paper. */
const READABLE = '23456789abcdefghjkmnpqrstuvwxyz';

let hashOfNothing: Promise<string> | undefined;

/** Hashes a password with a salt of its own. */
export function hashPassword(password: string): Promise<string> {
  return hash(password, COST);
}

/** Whether a password is the one that was hashed. */
export function verifyPassword(passwordHash: string, password: string): Promise<boolean> {
  return verify(passwordHash, password);
}

/** Takes the time that looking at a password takes, for an address without an account. */
export async function verifyNothing(password: string): Promise<void> {
  hashOfNothing ??= hashPassword(newTemporaryPassword());
  await verifyPassword(await hashOfNothing, password);
}

/** A password to tell somebody: four groups of five characters, 99 random bits. */
export function newTemporaryPassword(): string {
  const group = () => Array.from({ length: 5 }, () => READABLE[randomInt(READABLE.length)]).join('');
  return Array.from({ length: 4 }, group).join('-');
}
