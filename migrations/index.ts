import { type Migration } from 'kysely';
import * as createShopAndAccounts from './202612010900-create-shop-and-accounts';
import * as createRegister from './202612010910-create-register';
import * as createTimeEntry from './202612010920-create-time-entry';
import * as createCosts from './202612010930-create-costs';
import * as markDirtyDays from './202612010940-mark-dirty-days';
import * as supportSignIn from './202612010950-support-sign-in';
import * as createStock from './202612011000-create-stock';
import * as createJobMoney from './202612011010-create-job-money';
import * as closeMonths from './202612011020-close-months';
import * as markMoneyDays from './202612011030-mark-money-days';
import * as showOvertimeSettings from './202612011040-show-overtime-settings';
import * as keepCorrections from './202612011050-keep-corrections';
import * as createTooling from './202612011100-create-tooling';
import * as createBends from './202612011105-create-bends';
import * as keepRunCorrections from './202612011130-keep-run-corrections';
import * as keepStockValue from './202612011140-keep-stock-value';
import * as keepInServiceDay from './202612011150-keep-in-service-day';

/** All migrations by name, in order; listed here so that they can be bundled with the command line. */
export const migrations: Record<string, Migration> = {
  '202612010900-create-shop-and-accounts': createShopAndAccounts,
  '202612010910-create-register': createRegister,
  '202612010920-create-time-entry': createTimeEntry,
  '202612010930-create-costs': createCosts,
  '202612010940-mark-dirty-days': markDirtyDays,
  '202612010950-support-sign-in': supportSignIn,
  '202612011000-create-stock': createStock,
  '202612011010-create-job-money': createJobMoney,
  '202612011020-close-months': closeMonths,
  '202612011030-mark-money-days': markMoneyDays,
  '202612011040-show-overtime-settings': showOvertimeSettings,
  '202612011050-keep-corrections': keepCorrections,
  '202612011100-create-tooling': createTooling,
  '202612011105-create-bends': createBends,
  '202612011130-keep-run-corrections': keepRunCorrections,
  '202612011140-keep-stock-value': keepStockValue,
  '202612011150-keep-in-service-day': keepInServiceDay,
};
