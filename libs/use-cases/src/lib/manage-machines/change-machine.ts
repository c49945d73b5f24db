import { AppError, type Machine } from '@brakeven/contract';
import { type ShopTransaction } from '@brakeven/database';
import { inShopOf, type ShopContext } from '../context';
import { refusingConflicts } from '../refuse-conflict';
import { readMachine } from './machines';

/** Which machine is meant. */
export interface MachineRef {
  machineId: string;
}

const CONFLICTS = {
  machine_rate_shop_id_machine_id_valid_from_key: {
    field: 'validFrom',
    message: 'There are already rates from this day on. Correct those.',
  },
};

/**
 * Changes what belongs to a machine and answers the machine as it is then.
 * @throws AppError `not_found` (no such machine, or `work` found nothing to change), `conflict` (two rates from one day)
 */
export function changeMachine(
  context: ShopContext,
  machineId: string,
  work: (trx: ShopTransaction) => Promise<boolean>,
): Promise<Machine> {
  return refusingConflicts(CONFLICTS, () =>
    inShopOf(context, async (trx) => {
      await readMachine(context, trx, machineId);
      if (!(await work(trx))) throw new AppError('not_found', 'This is not on the machine, or no longer.');
      return readMachine(context, trx, machineId);
    }),
  );
}
