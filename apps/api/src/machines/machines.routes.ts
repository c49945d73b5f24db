import { ENDPOINTS } from '@brakeven/contract';
import {
  createMachine,
  createMachineBuiltRate,
  createMachineCostItem,
  createMachineRate,
  deleteMachineCostItem,
  deleteMachineRate,
  getMachine,
  getMachineRecovery,
  getPayback,
  listMachines,
  updateMachine,
  updateMachineBuiltRate,
  updateMachineCostItem,
  updateMachineRate,
} from '@brakeven/use-cases';
import { type Api } from '../api';

/** The register of machines with landed cost and rates, and each machine's payback. */
export function mountMachines({ mount }: Api): void {
  mount(ENDPOINTS.listMachines, ({ context }) => listMachines(context));
  mount(ENDPOINTS.getMachine, ({ context, params }) => getMachine(context, params));
  mount(ENDPOINTS.createMachine, ({ context, body }) => createMachine(context, body));
  mount(ENDPOINTS.updateMachine, ({ context, params, body }) => updateMachine(context, params, body));
  mount(ENDPOINTS.createMachineCostItem, ({ context, params, body }) =>
    createMachineCostItem(context, params, body),
  );
  mount(ENDPOINTS.updateMachineCostItem, ({ context, params, body }) =>
    updateMachineCostItem(context, params, body),
  );
  mount(ENDPOINTS.deleteMachineCostItem, ({ context, params }) => deleteMachineCostItem(context, params));
  mount(ENDPOINTS.createMachineRate, ({ context, params, body }) => createMachineRate(context, params, body));
  mount(ENDPOINTS.updateMachineRate, ({ context, params, body }) => updateMachineRate(context, params, body));
  mount(ENDPOINTS.deleteMachineRate, ({ context, params }) => deleteMachineRate(context, params));
  mount(ENDPOINTS.createMachineBuiltRate, ({ context, params, body }) =>
    createMachineBuiltRate(context, params, body),
  );
  mount(ENDPOINTS.updateMachineBuiltRate, ({ context, params, body }) =>
    updateMachineBuiltRate(context, params, body),
  );
  mount(ENDPOINTS.getMachineRecovery, ({ context, params, query }) =>
    getMachineRecovery(context, { ...params, ...query }),
  );
  mount(ENDPOINTS.getPayback, ({ context, params }) => getPayback(context, params));
}
