import { AppError, type Operation, type OperationInput } from '@brakeven/contract';
import {
  findOperationRow,
  insertOperation,
  listOperationRows,
  type ShopTransaction,
  updateOperationRow,
} from '@brakeven/database';
import { v7 as newId } from 'uuid';
import { inShopOf, type ShopContext } from '../context';
import { refusingConflicts } from '../refuse-conflict';

const CONFLICTS = {
  operation_shop_id_code_key: { field: 'code', message: 'Another operation has this code.' },
  operation_shop_id_default_machine_id_fkey: {
    field: 'defaultMachineId',
    message: 'There is no such machine.',
  },
};

/** All operations by code. */
export function listOperations(context: ShopContext): Promise<Operation[]> {
  return inShopOf(context, listOperationRows);
}

/**
 * Adds an operation.
 * @throws AppError `conflict` (code taken), `invalid_input` (no such machine)
 */
export function createOperation(context: ShopContext, body: OperationInput): Promise<Operation> {
  const operationId = newId();
  return refusingConflicts(CONFLICTS, () =>
    inShopOf(context, async (trx) => {
      await insertOperation(trx, { shopId: context.shop.shopId, operationId, ...body });
      return getOperation(trx, operationId);
    }),
  );
}

/**
 * Changes an operation; another default machine moves the costs of its entries that name no machine.
 * @throws AppError `not_found`, `conflict` (code taken), `invalid_input` (no such machine)
 */
export function updateOperation(
  context: ShopContext,
  { operationId }: { operationId: string },
  body: OperationInput,
): Promise<Operation> {
  return refusingConflicts(CONFLICTS, () =>
    inShopOf(context, async (trx) => {
      await updateOperationRow(trx, operationId, body);
      return getOperation(trx, operationId);
    }),
  );
}

async function getOperation(trx: ShopTransaction, operationId: string): Promise<Operation> {
  const operation = await findOperationRow(trx, operationId);
  if (!operation) throw new AppError('not_found', 'There is no such operation.');
  return operation;
}
