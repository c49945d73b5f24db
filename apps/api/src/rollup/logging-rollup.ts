import { type ChangeTools } from '@brakeven/use-cases';
import { type Request } from 'express';

/** What a change of dated rows is given: it stands though its rollup fails, which the log then tells. */
export function loggingRollup(request: Request): ChangeTools {
  return {
    onRollupFailed: (error) =>
      request.log.error({ err: error }, 'rollup after a change failed; its days wait for the next'),
  };
}
