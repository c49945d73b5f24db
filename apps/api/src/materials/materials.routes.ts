import { ENDPOINTS } from '@brakeven/contract';
import {
  createMaterial,
  createMaterialIssue,
  createSheetLot,
  getMaterial,
  listMaterials,
  listStockMoves,
  restoreMaterialIssue,
  restoreSheetLot,
  updateMaterial,
  updateMaterialIssue,
  updateSheetLot,
  voidMaterialIssue,
  voidSheetLot,
} from '@brakeven/use-cases';
import { type Api } from '../api';
import { loggingRollup } from '../rollup/logging-rollup';

/** Materials, their sheet lots, issues to jobs and returns, and the stock ledger made from them. */
export function mountMaterials({ mount }: Api): void {
  mount(ENDPOINTS.listMaterials, ({ context }) => listMaterials(context));
  mount(ENDPOINTS.getMaterial, ({ context, params }) => getMaterial(context, params));
  mount(ENDPOINTS.createMaterial, ({ context, body }) => createMaterial(context, body));
  mount(ENDPOINTS.updateMaterial, ({ context, params, body }) => updateMaterial(context, params, body));
  mount(ENDPOINTS.listStockMoves, ({ context, params, query }) =>
    listStockMoves(context, { ...params, ...query }),
  );
  mount(ENDPOINTS.createSheetLot, ({ context, params, body, request }) =>
    createSheetLot(context, params, body, loggingRollup(request)),
  );
  mount(ENDPOINTS.updateSheetLot, ({ context, params, body, request }) =>
    updateSheetLot(context, params, body, loggingRollup(request)),
  );
  mount(ENDPOINTS.voidSheetLot, ({ context, params, request }) =>
    voidSheetLot(context, params, loggingRollup(request)),
  );
  mount(ENDPOINTS.restoreSheetLot, ({ context, params, request }) =>
    restoreSheetLot(context, params, loggingRollup(request)),
  );
  mount(ENDPOINTS.createMaterialIssue, ({ context, body, request }) =>
    createMaterialIssue(context, body, loggingRollup(request)),
  );
  mount(ENDPOINTS.updateMaterialIssue, ({ context, params, body, request }) =>
    updateMaterialIssue(context, params, body, loggingRollup(request)),
  );
  mount(ENDPOINTS.voidMaterialIssue, ({ context, params, request }) =>
    voidMaterialIssue(context, params, loggingRollup(request)),
  );
  mount(ENDPOINTS.restoreMaterialIssue, ({ context, params, request }) =>
    restoreMaterialIssue(context, params, loggingRollup(request)),
  );
}
