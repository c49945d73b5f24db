import { ENDPOINTS } from '@brakeven/contract';
import { checkSetup, getSetupTemplate, importSetup } from '@brakeven/use-cases';
import { type Api } from '../api';

/** The set-up workbook: an empty one to fill in, a check, the import. */
export function mountSetup({ mount, reader }: Api): void {
  mount(ENDPOINTS.getSetupTemplate, async ({ context }) => {
    const { fileName, bytes } = await getSetupTemplate(context);
    return { name: fileName, bytes };
  });
  mount(ENDPOINTS.checkSetup, ({ context, file }) => checkSetup(context, file, {}, { reader }));
  mount(ENDPOINTS.importSetup, ({ context, file, request }) => {
    const onRollupFailed = (error: unknown) =>
      request.log.error({ err: error }, 'rollup after a set-up failed; its days wait');
    return importSetup(context, file, {}, { reader, onRollupFailed });
  });
}
