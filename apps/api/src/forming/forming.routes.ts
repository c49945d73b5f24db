import { ENDPOINTS } from '@brakeven/contract';
import {
  correctPressRun,
  createDie,
  createFormingMaterial,
  createPressRun,
  createPunch,
  createTrialBend,
  deleteDie,
  deleteFormingMaterial,
  deletePunch,
  deleteShopGauge,
  getDepthCard,
  getDepthFit,
  getForceDistribution,
  getFormingReference,
  getPressRunChoices,
  getSetupCard,
  listPressRuns,
  listTrialBends,
  pasteTrialBends,
  restorePressRun,
  restoreTrialBend,
  updateDepthCard,
  updateDie,
  updateForceLine,
  updateFormingMaterial,
  updatePunch,
  updateShopGauge,
  voidPressRun,
  voidTrialBend,
} from '@brakeven/use-cases';
import { type Api } from '../api';

/** What bends are computed from, trial bends with the depth fitted to them, and press runs. */
export function mountForming(api: Api): void {
  mountReference(api);
  mountTools(api);
  mountTrialBends(api);
  mountPressRuns(api);
}

function mountReference({ mount }: Api): void {
  mount(ENDPOINTS.getFormingReference, ({ context }) => getFormingReference(context));
  mount(ENDPOINTS.updateForceLine, ({ context, body }) => updateForceLine(context, body));
  mount(ENDPOINTS.createFormingMaterial, ({ context, body }) => createFormingMaterial(context, body));
  mount(ENDPOINTS.updateFormingMaterial, ({ context, params, body }) =>
    updateFormingMaterial(context, params, body),
  );
  mount(ENDPOINTS.deleteFormingMaterial, ({ context, params }) => deleteFormingMaterial(context, params));
  mount(ENDPOINTS.updateShopGauge, ({ context, params, body }) => updateShopGauge(context, params, body));
  mount(ENDPOINTS.deleteShopGauge, ({ context, params }) => deleteShopGauge(context, params));
}

function mountTools({ mount }: Api): void {
  mount(ENDPOINTS.createPunch, ({ context, params, body }) => createPunch(context, params, body));
  mount(ENDPOINTS.updatePunch, ({ context, params, body }) => updatePunch(context, params, body));
  mount(ENDPOINTS.deletePunch, ({ context, params }) => deletePunch(context, params));
  mount(ENDPOINTS.createDie, ({ context, params, body }) => createDie(context, params, body));
  mount(ENDPOINTS.updateDie, ({ context, params, body }) => updateDie(context, params, body));
  mount(ENDPOINTS.deleteDie, ({ context, params }) => deleteDie(context, params));
}

function mountTrialBends({ mount }: Api): void {
  mount(ENDPOINTS.listTrialBends, ({ context, query }) => listTrialBends(context, query));
  mount(ENDPOINTS.createTrialBend, ({ context, body }) => createTrialBend(context, body));
  mount(ENDPOINTS.pasteTrialBends, ({ context, body }) => pasteTrialBends(context, body));
  mount(ENDPOINTS.voidTrialBend, ({ context, params }) => voidTrialBend(context, params));
  mount(ENDPOINTS.restoreTrialBend, ({ context, params }) => restoreTrialBend(context, params));
  mount(ENDPOINTS.getDepthFit, ({ context, query }) => getDepthFit(context, query));
  mount(ENDPOINTS.getDepthCard, ({ context, params }) => getDepthCard(context, params));
  mount(ENDPOINTS.updateDepthCard, ({ context, params, body }) => updateDepthCard(context, params, body));
}

function mountPressRuns({ mount }: Api): void {
  mount(ENDPOINTS.listPressRuns, ({ context, query }) => listPressRuns(context, query));
  mount(ENDPOINTS.getPressRunChoices, ({ context, query }) => getPressRunChoices(context, query));
  mount(ENDPOINTS.getForceDistribution, ({ context, query }) => getForceDistribution(context, query));
  mount(ENDPOINTS.createPressRun, ({ context, body }) => createPressRun(context, body));
  mount(ENDPOINTS.correctPressRun, ({ context, params, body }) => correctPressRun(context, params, body));
  mount(ENDPOINTS.voidPressRun, ({ context, params }) => voidPressRun(context, params));
  mount(ENDPOINTS.restorePressRun, ({ context, params }) => restorePressRun(context, params));
  mount(ENDPOINTS.getSetupCard, ({ context, params }) => getSetupCard(context, params));
}
