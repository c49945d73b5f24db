import { toPlainHeader, withoutPerUnit } from './header-text';
import { ESTIMATE_PLANS } from './setup-estimate-plan';
import { MONEY_PLANS } from './setup-money-plans';
import { type SetupColumn, type SetupSheetPlan } from './setup-plan';
import { REGISTER_PLANS } from './setup-register-plans';
import { STOCK_PLANS } from './setup-stock-plans';
import { TOOL_PLANS } from './setup-tool-plans';

export const EXPLAINING_SHEET = 'How to fill this in';

/** The sheets of the set-up workbook and their columns, in the order in which they are written. */
export const SETUP_PLANS: readonly SetupSheetPlan[] = [
  ...REGISTER_PLANS,
  ...TOOL_PLANS,
  ...STOCK_PLANS,
  ...MONEY_PLANS,
  ...ESTIMATE_PLANS,
];

/** The plan of the sheet with this name, whatever its case and spaces. */
export function findSetupPlan(sheetName: string): SetupSheetPlan | undefined {
  return SETUP_PLANS.find(({ sheet }) => toPlainHeader(sheet) === toPlainHeader(sheetName));
}

/** The column of a plan with this header, whatever its case, spaces and unit. */
export function findSetupColumn(plan: SetupSheetPlan, header: string): SetupColumn | undefined {
  return plan.columns.find((column) => {
    const plain = toPlainHeader(column.kind === 'pricePerWeight' ? withoutPerUnit(header) : header);
    return [column.header, ...(column.alsoHeaded ?? [])].some((known) => toPlainHeader(known) === plain);
  });
}
