import { type ShopContext } from './context';
import { type UploadTools } from './import-timesheet/upload';
import { runRollup } from './roll-up-costs/run-rollup';

/**
 * Rolls up what a finished change has made dirty. The change stands whatever happens here: a rollup that fails is
 * told to `onRollupFailed`, the days stay marked, and the next rollup takes them.
 */
export async function rollUpAfter(
  context: ShopContext,
  { onProgress, onRollupFailed }: Partial<Pick<UploadTools, 'onProgress' | 'onRollupFailed'>>,
): Promise<void> {
  onProgress?.({ stage: 'rolling-up', done: 0, total: null, message: 'Rolling up the costs' });
  try {
    await runRollup(context, {});
  } catch (error) {
    onRollupFailed?.(error);
  }
}
