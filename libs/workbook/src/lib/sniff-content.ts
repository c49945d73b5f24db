/** What a file is by its first bytes, whatever its name says. */
export type ContentKind = 'zip' | 'ole2' | 'picture' | 'pdf' | 'text' | 'binary';

const MAGIC: readonly (readonly [ContentKind, readonly number[]])[] = [
  ['zip', [0x50, 0x4b, 0x03, 0x04]],
  ['zip', [0x50, 0x4b, 0x05, 0x06]],
  ['ole2', [0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1]],
  ['picture', [0x89, 0x50, 0x4e, 0x47]],
  ['picture', [0xff, 0xd8, 0xff]],
  ['picture', [0x47, 0x49, 0x46, 0x38]],
  ['pdf', [0x25, 0x50, 0x44, 0x46]],
];
const UTF_16_MARKS: readonly (readonly number[])[] = [
  [0xff, 0xfe],
  [0xfe, 0xff],
];
const SNIFFED_BYTES = 4_096;

/** Tells what a file is from its content. Text in UTF-16 counts as text. */
export function sniffContent(bytes: Uint8Array): ContentKind {
  const known = MAGIC.find(([, magic]) => startsWith(bytes, magic));
  if (known) return known[0];
  if (UTF_16_MARKS.some((mark) => startsWith(bytes, mark))) return 'text';
  return bytes.subarray(0, SNIFFED_BYTES).includes(0) ? 'binary' : 'text';
}

/** Whether an OLE2 container holds a workbook behind a password, or (`old-xls`) one of the old binary form. */
export function sniffOle2(bytes: Uint8Array): 'encrypted' | 'old-xls' | 'other' {
  const content = Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const holds = (stream: string) => content.includes(Buffer.from(stream, 'utf16le'));
  if (holds('EncryptedPackage') || holds('EncryptionInfo')) return 'encrypted';
  return holds('Workbook') || holds('Book\0') ? 'old-xls' : 'other';
}

function startsWith(bytes: Uint8Array, magic: readonly number[]): boolean {
  return magic.every((byte, index) => bytes[index] === byte);
}
