export * from './lib/audit/list-audit-events';
export { type ChangeTools } from './lib/change-dated-rows';
export { closeMonth, reopenMonth } from './lib/close-months/close-month';
export { getMonth } from './lib/close-months/month-end';
export { listMonths } from './lib/close-months/month-states';
export * from './lib/close-months/payroll-hours';
export * from './lib/context';
export * from './lib/estimate-jobs/copy-estimate';
export { getEstimateChoices } from './lib/estimate-jobs/estimate-choices';
export * from './lib/estimate-jobs/estimates';
export * from './lib/estimate-jobs/get-estimate-workings';
export * from './lib/examine/examine-database';
export * from './lib/export-jobs/export-jobs';
export * from './lib/forming/estimate-blank';
export * from './lib/forming/estimate-depth';
export * from './lib/forming/estimate-fit';
export * from './lib/forming/estimate-force';
export * from './lib/import-timesheet/adjust-mapping';
export * from './lib/import-timesheet/check-timesheet';
export * from './lib/import-timesheet/import-timesheet';
export * from './lib/import-timesheet/undo-import';
export { type FileDownload, type UploadedFile, type UploadTools } from './lib/import-timesheet/upload';
export {
  createMachineBuiltRate,
  getMachineRate,
  type MachineRateSummary,
  updateMachineBuiltRate,
} from './lib/manage-machines/built-rates';
export {
  createInvoice,
  listInvoices,
  restoreInvoice,
  updateInvoice,
  voidInvoice,
} from './lib/manage-job-money/invoices';
export * from './lib/manage-job-money/outside-services';
export * from './lib/manage-machines/machine-costs';
export { getMachineRecovery } from './lib/manage-machines/machine-recovery';
export * from './lib/manage-machines/machines';
export * from './lib/manage-people/employees';
export * from './lib/manage-people/operations';
export * from './lib/manage-people/overhead-rates';
export * from './lib/manage-people/pay-rates';
export * from './lib/manage-shop/create-shop';
export * from './lib/manage-shop/open-shop';
export * from './lib/manage-shop/shop-settings';
export * from './lib/manage-stock/material-issues';
export { createMaterial, getMaterial, listMaterials, updateMaterial } from './lib/manage-stock/materials';
export * from './lib/manage-stock/sheet-lots';
export * from './lib/manage-stock/stock-moves';
export { createDie, deleteDie, updateDie } from './lib/manage-tooling/dies';
export { createPunch, deletePunch, updatePunch } from './lib/manage-tooling/punches';
export * from './lib/manage-tooling/reference';
export * from './lib/manage-users/users';
export * from './lib/open-database';
export { getForceDistribution } from './lib/press-runs/force-distribution';
export { correctPressRun, createPressRun } from './lib/press-runs/log-press-run';
export {
  getPressRunChoices,
  getSetupCard,
  listPressRuns,
  restorePressRun,
  voidPressRun,
} from './lib/press-runs/press-runs';
export { type RefusedFields, refusingRows, toRefusalWords } from './lib/refuse-rows';
export * from './lib/roll-up-costs/get-rollup-status';
export * from './lib/roll-up-costs/run-rollup';
export * from './lib/saved-views/saved-views';
export * from './lib/set-up-shop/get-setup-template';
export * from './lib/set-up-shop/import-setup';
export * from './lib/show-customers/customers';
export * from './lib/show-hours/entries';
export * from './lib/show-hours/void-entry';
export * from './lib/show-jobs/change-job';
export { getJob, listJobLines } from './lib/show-jobs/get-job';
export * from './lib/show-jobs/job-costs';
export * from './lib/show-jobs/list-jobs';
export * from './lib/show-payback/get-payback';
export * from './lib/show-workings/get-books-workings';
export * from './lib/show-workings/get-hours-workings';
export * from './lib/show-workings/get-job-workings';
export * from './lib/show-workings/get-overtime-workings';
export * from './lib/show-workings/get-payback-workings';
export * from './lib/show-workings/get-stock-workings';
export * from './lib/sign-in/change-password';
export * from './lib/sign-in/find-session-user';
export * from './lib/sign-in/sign-in';
export { getImportFile } from './lib/timesheet-history/get-import-file';
export * from './lib/timesheet-history/get-sheet-excerpt';
export { getImport, listImports } from './lib/timesheet-history/list-imports';
export { getDepthCard, updateDepthCard } from './lib/trial-bends/depth-card';
export { getDepthFit } from './lib/trial-bends/depth-fit';
export { pasteTrialBends } from './lib/trial-bends/paste-trial-bends';
export {
  createTrialBend,
  listTrialBends,
  restoreTrialBend,
  voidTrialBend,
} from './lib/trial-bends/trial-bends';
export * from './lib/workbook-reader';
