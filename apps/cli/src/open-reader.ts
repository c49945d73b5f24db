import { type SheetReader } from '@brakeven/use-cases';

/** Reads workbooks in a worker thread with bounded memory; its program lies beside this one. */
export async function openReader(): Promise<SheetReader> {
  const { createReader } = await import('@brakeven/use-cases');
  return createReader({ workerUrl: new URL('./read-worker.js', import.meta.url) });
}
