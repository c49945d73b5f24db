import { ENDPOINTS } from '@brakeven/contract';
import { checkSetup, getSetupTemplate, importSetup } from '@brakeven/use-cases';
import { type Api } from '../api';

/** The set-up workbook: an empty one to fill in, a check, the import. */
export function mountSetup({ mount, reader }: Api): void {
  mount(ENDPOINTS.getSetupTemplate, async () => {
    const { fileName, bytes } = await getSetupTemplate();
    return { name: fileName, bytes };
  });
  mount(ENDPOINTS.checkSetup, ({ context, file }) => checkSetup(context, file, {}, { reader }));
  mount(ENDPOINTS.importSetup, ({ context, file }) => importSetup(context, file, {}, { reader }));
}
