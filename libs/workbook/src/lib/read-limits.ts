import { LIMITS } from '@brakeven/contract';

/** What a file may ask of the machine that reads it. */
export const READ_LIMITS = {
  fileBytesMax: LIMITS.uploadBytesMax,
  rowsMax: LIMITS.timesheetRowsMax,
  cellsMax: 2_000_000,
  unpackedBytesMax: 200 * 1024 * 1024,
  /** A part this much larger than its packed form is a trap; sheets of a shop pack 5 to 40 times. */
  unpackRatioMax: 200,
  /** Smaller parts may pack better than that. */
  unpackRatioFreeBytes: 20 * 1024 * 1024,
  workerHeapMbMax: 1_536,
  readSecondsMax: 300,
} as const;
