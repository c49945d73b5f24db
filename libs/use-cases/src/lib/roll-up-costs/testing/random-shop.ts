import { createTestShop, type TestShop } from '@brakeven/test-shop';
import { addDays } from '@brakeven/values';
import { FIRST_DAY } from './random-changes';

/** What changes may refer to. */
export interface Register {
  employees: string[];
  machines: string[];
  operations: string[];
  jobs: string[];
  materials: string[];
}

/** A shop with people, machines, operations and jobs, but neither rates nor entries. */
export async function createBareShop(): Promise<{ shop: TestShop; register: Register }> {
  const shop = await createTestShop();
  const machines = [await shop.addMachine({ inServiceOn: addDays(FIRST_DAY, 3) }), await shop.addMachine()];
  return {
    shop,
    register: {
      machines,
      employees: [await shop.addEmployee(), await shop.addEmployee()],
      operations: [
        await shop.addOperation({ defaultMachineId: machines[0] }),
        await shop.addOperation(),
        await shop.addOperation({ defaultMachineId: machines[1] }),
      ],
      jobs: [await shop.addJob(), await shop.addJob({ isBillable: false }), await shop.addJob()],
      materials: [await shop.addMaterial(), await shop.addMaterial()],
    },
  };
}

/** The same with every rate and some stock from before the first day, so that months can be closed. */
export async function createRatedShop(): Promise<{ shop: TestShop; register: Register }> {
  const { shop, register } = await createBareShop();
  const validFrom = '2026-01-01';
  for (const employeeId of register.employees)
    await shop.addPayRate({ employeeId, validFrom, wagePerHour: '23.415', burdenPercent: '28.5' });
  for (const machineId of register.machines)
    await shop.addMachineRate({
      machineId,
      validFrom,
      machineHourRate: '31.2',
      chargeOutRate: '95',
      runningCostPerHour: '4.37',
    });
  await shop.addOverheadRate({ validFrom, ratePerLabourHour: '12.345' });
  for (const materialId of register.materials)
    await shop.addLot({
      materialId,
      receivedOn: validFrom,
      weightKg: '2000',
      cost: '3177.77',
      freight: '95',
    });
  return { shop, register };
}
