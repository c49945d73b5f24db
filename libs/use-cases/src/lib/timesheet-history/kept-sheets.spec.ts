import { type SheetFile, type SheetReader } from '@brakeven/workbook';
import { readKeptSheets } from './kept-sheets';

const FILE = { name: 'week.xlsx', bytes: new Uint8Array() };

function makeReader(answer: () => Promise<SheetFile>) {
  const reader: SheetReader = { readSheets: jest.fn(answer) };
  const read = (importId: string) => readKeptSheets(importId, FILE, reader);
  return { read, readSheets: reader.readSheets };
}

const sheetsOf = (rows: number): SheetFile =>
  ({
    sheets: [{ name: 'Hours', rows: Array.from({ length: rows }, () => ({ row: 1, cells: [] })) }],
  }) as never;

describe('readKeptSheets', () => {
  it('reads a file once, also for those who ask at once', async () => {
    const { read, readSheets } = makeReader(async () => sheetsOf(3));
    const [first, second] = await Promise.all([read('a'), read('a')]);
    expect(second).toBe(first);
    expect(await read('a')).toBe(first);
    expect(readSheets).toHaveBeenCalledTimes(1);
  });

  it('keeps the four that were used last', async () => {
    const { read, readSheets } = makeReader(async () => sheetsOf(3));
    for (const importId of ['a', 'b', 'c', 'd', 'a', 'e']) await read(importId);
    expect(readSheets).toHaveBeenCalledTimes(5);
    await read('a');
    expect(readSheets).toHaveBeenCalledTimes(5);
    await read('b');
    expect(readSheets).toHaveBeenCalledTimes(6);
  });

  it('does not keep a long file, nor a failure', async () => {
    const long = makeReader(async () => sheetsOf(20_001));
    await long.read('a');
    await long.read('a');
    expect(long.readSheets).toHaveBeenCalledTimes(2);
    let isBroken = true;
    const shaky = makeReader(async () => {
      if (isBroken) throw new Error('The worker died.');
      return sheetsOf(3);
    });
    await expect(shaky.read('a')).rejects.toThrow('The worker died.');
    isBroken = false;
    await expect(shaky.read('a')).resolves.toBeDefined();
  });
});
