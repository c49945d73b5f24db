import { crc32 } from 'node:zlib';

const LOCAL_HEADER_BYTES = 30;
const CENTRAL_HEADER_BYTES = 46;
const END_RECORD_BYTES = 22;
const VERSION_NEEDED = 20;

interface StoredPart {
  readonly name: Buffer;
  readonly content: Buffer;
  readonly checksum: number;
  readonly offset: number;
}

/** Packs parts into a zip file without compressing them (APPNOTE.TXT 6.3, method 0). */
export function packStoredZip(parts: ReadonlyMap<string, Buffer>): Buffer {
  const stored: StoredPart[] = [];
  let offset = 0;
  for (const [partName, content] of parts) {
    const name = Buffer.from(partName, 'ascii');
    stored.push({ name, content, checksum: crc32(content), offset });
    offset += LOCAL_HEADER_BYTES + name.length + content.length;
  }
  const body = stored.flatMap((part) => [toLocalHeader(part), part.name, part.content]);
  const directory = stored.flatMap((part) => [toCentralHeader(part), part.name]);
  const directoryBytes = directory.reduce((size, piece) => size + piece.length, 0);
  return Buffer.concat([...body, ...directory, toEndRecord(stored.length, directoryBytes, offset)]);
}

function toLocalHeader({ name, content, checksum }: StoredPart): Buffer {
  const header = Buffer.alloc(LOCAL_HEADER_BYTES);
  header.writeUInt32LE(0x04034b50, 0);
  header.writeUInt16LE(VERSION_NEEDED, 4);
  header.writeUInt32LE(checksum, 14);
  header.writeUInt32LE(content.length, 18);
  header.writeUInt32LE(content.length, 22);
  header.writeUInt16LE(name.length, 26);
  return header;
}

function toCentralHeader({ name, content, checksum, offset }: StoredPart): Buffer {
  const header = Buffer.alloc(CENTRAL_HEADER_BYTES);
  header.writeUInt32LE(0x02014b50, 0);
  header.writeUInt16LE(VERSION_NEEDED, 4);
  header.writeUInt16LE(VERSION_NEEDED, 6);
  header.writeUInt32LE(checksum, 16);
  header.writeUInt32LE(content.length, 20);
  header.writeUInt32LE(content.length, 24);
  header.writeUInt16LE(name.length, 28);
  header.writeUInt32LE(offset, 42);
  return header;
}

function toEndRecord(count: number, directoryBytes: number, directoryOffset: number): Buffer {
  const record = Buffer.alloc(END_RECORD_BYTES);
  record.writeUInt32LE(0x06054b50, 0);
  record.writeUInt16LE(count, 8);
  record.writeUInt16LE(count, 10);
  record.writeUInt32LE(directoryBytes, 12);
  record.writeUInt32LE(directoryOffset, 16);
  return record;
}
