import { type SheetReader } from '@brakeven/use-cases';

/**
 * A reader that reads so many files at a time and lets the others wait their turn, since each may take hundreds of
 * megabytes while it is read.
 */
export function limitReader(reader: SheetReader, filesMax: number): SheetReader {
  let reading = 0;
  const waiting: (() => void)[] = [];
  return {
    readSheets: async (file, onProgress) => {
      if (reading >= filesMax) await new Promise<void>((resolve) => waiting.push(resolve));
      else reading += 1;
      try {
        return await reader.readSheets(file, onProgress);
      } finally {
        // The place goes to who waits longest, or back.
        const next = waiting.shift();
        if (next) next();
        else reading -= 1;
      }
    },
  };
}
