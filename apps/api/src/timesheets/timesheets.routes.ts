import { AppError, ENDPOINTS, type Progress } from '@brakeven/contract';
import {
  checkTimesheet,
  getImport,
  getImportFile,
  getSheetExcerpt,
  importTimesheet,
  listImports,
  type ShopContext,
  undoImport,
} from '@brakeven/use-cases';
import { type Request } from 'express';
import { type Api } from '../api';

/** Timesheets: check, commit, undo, history, and the kept workbooks. */
export function mountTimesheets(api: Api): void {
  const { mount, reader } = api;
  mount(ENDPOINTS.checkTimesheet, ({ context, file, body, request }) =>
    reporting(api, context, body.progressId, (onProgress) =>
      checkTimesheet(context, file, body, { reader, onProgress, onRollupFailed: logFailure(request) }),
    ),
  );
  mount(ENDPOINTS.importTimesheet, ({ context, file, body, request }) =>
    reporting(api, context, body.progressId, (onProgress) =>
      importTimesheet(context, file, body, { reader, onProgress, onRollupFailed: logFailure(request) }),
    ),
  );
  mount(ENDPOINTS.undoImport, ({ context, params, request }) =>
    undoImport(context, params, undefined, { onRollupFailed: logFailure(request) }),
  );
  mount(ENDPOINTS.listImports, ({ context }) => listImports(context));
  mount(ENDPOINTS.getImport, ({ context, params }) => getImport(context, params));
  mount(ENDPOINTS.getImportFile, async ({ context, params }) => {
    const { fileName, bytes } = await getImportFile(context, params);
    return { name: fileName, bytes };
  });
  mount(ENDPOINTS.getSheetExcerpt, ({ context, params, query }) =>
    getSheetExcerpt(context, { ...params, ...query }, { reader }),
  );
}

/** Tells whoever watches how the work goes on, and in the end that it has failed, if it has. */
async function reporting<T>(
  { progress }: Api,
  { actor }: ShopContext,
  progressId: string | undefined,
  work: (onProgress?: (state: Progress) => void) => Promise<T>,
): Promise<T> {
  if (!progressId || !actor.userId) return work();
  const { userId } = actor;
  try {
    return await work((state) => progress.publish(userId, progressId, state));
  } catch (error) {
    const message = error instanceof AppError ? error.message : 'Something went wrong on our side.';
    progress.publish(userId, progressId, { stage: 'failed', done: 0, total: null, message });
    throw error;
  }
}

function logFailure(request: Request): (error: unknown) => void {
  return (error) => request.log.error({ err: error }, 'rollup after a timesheet failed; its days wait');
}
