import { type SheetReader } from '@brakeven/use-cases';
import { limitReader } from './limited-reader';

type Read = Awaited<ReturnType<SheetReader['readSheets']>>;

/** A reader whose files are read when the test says so. */
function createSlowReader() {
  const begun: string[] = [];
  const ends = new Map<string, { resolve: () => void; reject: (error: Error) => void }>();
  const reader: SheetReader = {
    readSheets: ({ name }) => {
      begun.push(name);
      return new Promise<Read>((resolve, reject) => {
        ends.set(name, { resolve: () => resolve({ name } as Read), reject });
      });
    },
  };
  return { begun, ends, reader: limitReader(reader, 2) };
}

const file = (name: string) => ({ name, bytes: new Uint8Array() });
const turn = () => new Promise((resolve) => setImmediate(resolve));

describe('limitReader', () => {
  it('reads two files at a time and the third when one is through', async () => {
    const { begun, ends, reader } = createSlowReader();
    const reads = ['a', 'b', 'c'].map((name) => reader.readSheets(file(name)));
    await turn();
    expect(begun).toEqual(['a', 'b']);
    ends.get('b')?.resolve();
    await turn();
    expect(begun).toEqual(['a', 'b', 'c']);
    ends.get('a')?.resolve();
    ends.get('c')?.resolve();
    expect((await Promise.all(reads)).map(({ name }) => name)).toEqual(['a', 'b', 'c']);
  });

  it('gives the place of a file that cannot be read to the next', async () => {
    const { begun, ends, reader } = createSlowReader();
    const reads = ['a', 'b', 'c'].map((name) => reader.readSheets(file(name)));
    await turn();
    ends.get('a')?.reject(new Error('unreadable'));
    await expect(reads[0]).rejects.toThrow('unreadable');
    await turn();
    expect(begun).toEqual(['a', 'b', 'c']);
    ends.get('b')?.resolve();
    ends.get('c')?.resolve();
    await Promise.all(reads.slice(1));
    void reader.readSheets(file('d'));
    void reader.readSheets(file('e'));
    void reader.readSheets(file('f'));
    await turn();
    expect(begun).toEqual(['a', 'b', 'c', 'd', 'e']);
  });
});
