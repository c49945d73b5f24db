import { LIMITS } from '@brakeven/contract';
import { open } from 'node:fs/promises';
import { basename } from 'node:path';
import { UsageError } from './cli';

/**
 * Reads a workbook that a command names; of one that is too large only so much that the reader sees that.
 * @throws UsageError if there is no such file
 */
export async function readWorkbookFile(path: string): Promise<{ name: string; bytes: Uint8Array }> {
  try {
    const handle = await open(path);
    try {
      const { size } = await handle.stat();
      const bytes = Buffer.alloc(Math.min(size, LIMITS.uploadBytesMax + 1));
      await handle.read(bytes, 0, bytes.length, 0);
      return { name: basename(path), bytes };
    } finally {
      await handle.close();
    }
  } catch (cause) {
    const isMissing = cause instanceof Error && 'code' in cause && cause.code === 'ENOENT';
    const reason = isMissing ? 'There is no such file' : 'It cannot be read';
    throw new UsageError(`${path}: ${reason}.`, cause);
  }
}
