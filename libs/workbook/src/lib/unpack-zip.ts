import { buffer } from 'node:stream/consumers';
import { crc32 } from 'node:zlib';
import { type Entry, fromBufferPromise, type ZipFile } from 'yauzl';
import { READ_LIMITS } from './read-limits';
import { WorkbookError } from './workbook-error';

/** The parts of a zip file by name, unpacked. */
export type ZipParts = ReadonlyMap<string, Buffer>;

const DAMAGED =
  'This file is damaged or cut off, perhaps by a broken download. Open it in your spreadsheet program, ' +
  'save it again as .xlsx and send that.';

/** The error for a file that begins as a workbook and cannot be read to its end. */
export function toDamagedError(): WorkbookError {
  return new WorkbookError('file_truncated', DAMAGED);
}

/**
 * Unpacks the parts of a zip file that `isWanted` names and lists the names of all parts.
 * Nothing is unpacked when the parts together would exceed the limits; each part is checked against its stated
 * size and checksum.
 * @throws WorkbookError `file_truncated`, `file_encrypted`, `file_unpacks_too_large`
 */
export async function unpackZip(
  bytes: Uint8Array,
  isWanted: (name: string) => boolean,
  onUnpacked: (bytesDone: number, bytesTotal: number) => void,
): Promise<{ names: readonly string[]; parts: ZipParts }> {
  const zip = await fromBufferPromise(Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength), {
    lazyEntries: true,
  }).catch(() => Promise.reject(toDamagedError()));
  const entries = await listEntries(zip);
  assertSizes(entries);
  const wanted = entries.filter((entry) => isWanted(partName(entry)));
  const total = wanted.reduce((size, entry) => size + entry.uncompressedSize, 0);
  const parts = new Map<string, Buffer>();
  let done = 0;
  for (const entry of wanted) {
    parts.set(partName(entry), await unpackEntry(zip, entry));
    done += entry.uncompressedSize;
    onUnpacked(done, total);
  }
  return { names: entries.map(partName), parts };
}

async function listEntries(zip: ZipFile): Promise<Entry[]> {
  const entries: Entry[] = [];
  try {
    for await (const entry of zip.eachEntry()) entries.push(entry);
  } catch {
    throw toDamagedError();
  }
  return entries;
}

function assertSizes(entries: readonly Entry[]): void {
  if (entries.some((entry) => entry.isEncrypted())) {
    throw new WorkbookError(
      'file_encrypted',
      'This file is locked with a password. Save it without the password.',
    );
  }
  const total = entries.reduce((size, entry) => size + entry.uncompressedSize, 0);
  const isTrap = entries.some(
    ({ uncompressedSize, compressedSize }) =>
      uncompressedSize > READ_LIMITS.unpackRatioFreeBytes &&
      uncompressedSize > compressedSize * READ_LIMITS.unpackRatioMax,
  );
  if (isTrap || total > READ_LIMITS.unpackedBytesMax) {
    throw new WorkbookError(
      'file_unpacks_too_large',
      `Unpacked, this workbook would take ${toMegabytes(total)} MB; at most ` +
        `${toMegabytes(READ_LIMITS.unpackedBytesMax)} MB can be read, and no part may shrink beyond ` +
        `${READ_LIMITS.unpackRatioMax} times. Copy the rows you need into a new workbook.`,
    );
  }
}

async function unpackEntry(zip: ZipFile, entry: Entry): Promise<Buffer> {
  const content = await zip
    .openReadStreamPromise(entry)
    .then(buffer)
    .catch(() => Promise.reject(toDamagedError()));
  if (content.length !== entry.uncompressedSize || crc32(content) !== entry.crc32) throw toDamagedError();
  return content;
}

/** Some programs write a slash before the name; it means the same part. */
function partName(entry: Entry): string {
  return entry.fileName.replace(/^\/+/, '');
}

function toMegabytes(bytes: number): number {
  return Math.ceil(bytes / (1024 * 1024));
}
