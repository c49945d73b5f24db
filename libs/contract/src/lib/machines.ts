import { z } from 'zod';
import { endpoint } from './endpoint';
import {
  amountInputSchema,
  codeInputSchema,
  idSchema,
  localDateSchema,
  moneySchema,
  nameInputSchema,
  quantityInputSchema,
  quantitySchema,
  rateInputSchema,
  rateSchema,
} from './schema-values';

export const MACHINE_COST_KINDS = [
  'price',
  'freight',
  'rigging',
  'electrical',
  'tooling',
  'installation',
  'training',
  'other',
] as const;
export type MachineCostKind = (typeof MACHINE_COST_KINDS)[number];

export const machineCostItemSchema = z.object({
  machineCostItemId: idSchema,
  incurredOn: localDateSchema,
  kind: z.enum(MACHINE_COST_KINDS),
  description: z.string(),
  amount: moneySchema,
});
export type MachineCostItem = z.infer<typeof machineCostItemSchema>;
export const machineRateSchema = z.object({
  machineRateId: idSchema,
  validFrom: localDateSchema,
  machineHourRate: rateSchema,
  chargeOutRate: rateSchema,
  runningCostPerHour: rateSchema,
});
export type MachineRate = z.infer<typeof machineRateSchema>;

/** Money fields are absent for those without `machines.money`. */
export const machineSchema = z.object({
  machineId: idSchema,
  code: z.string(),
  name: z.string(),
  kind: z.string(),
  inServiceOn: localDateSchema.nullable(),
  /** kN; the screens convert to the shop's units. */
  ratedForceKn: quantitySchema.nullable(),
  /** mm. */
  bedLengthMm: quantitySchema.nullable(),
  outlay: moneySchema.optional(),
  costItems: z.array(machineCostItemSchema).optional(),
  /** Latest first. */
  rates: z.array(machineRateSchema).optional(),
});
export type Machine = z.infer<typeof machineSchema>;

export const machineInputSchema = z.object({
  code: codeInputSchema,
  name: nameInputSchema,
  kind: nameInputSchema,
  inServiceOn: localDateSchema.nullable(),
  ratedForceKn: quantityInputSchema.nullable(),
  bedLengthMm: quantityInputSchema.nullable(),
});
export type MachineInput = z.infer<typeof machineInputSchema>;
export const machineCostItemInputSchema = z.object({
  incurredOn: localDateSchema,
  kind: z.enum(MACHINE_COST_KINDS),
  description: z.string().trim().max(300).default(''),
  amount: amountInputSchema,
});
export type MachineCostItemInput = z.infer<typeof machineCostItemInputSchema>;
export const machineRateInputSchema = z.object({
  validFrom: localDateSchema,
  machineHourRate: rateInputSchema,
  chargeOutRate: rateInputSchema,
  runningCostPerHour: rateInputSchema,
});
export type MachineRateInput = z.infer<typeof machineRateInputSchema>;

const machineId = z.object({ machineId: idSchema });
const costItemId = machineId.extend({ machineCostItemId: idSchema });
const rateId = machineId.extend({ machineRateId: idSchema });
export const machineEndpoints = {
  listMachines: endpoint({
    method: 'get',
    path: '/machines',
    summary: 'All machines',
    permission: 'machines.view',
    response: z.array(machineSchema),
  }),
  getMachine: endpoint({
    method: 'get',
    path: '/machines/:machineId',
    summary: 'A machine with costs and rates',
    permission: 'machines.view',
    params: machineId,
    response: machineSchema,
  }),
  createMachine: endpoint({
    method: 'post',
    path: '/machines',
    summary: 'Add a machine',
    permission: 'machines.edit',
    body: machineInputSchema,
    response: machineSchema,
  }),
  updateMachine: endpoint({
    method: 'patch',
    path: '/machines/:machineId',
    summary: 'Change a machine',
    permission: 'machines.edit',
    params: machineId,
    body: machineInputSchema,
    response: machineSchema,
  }),
  createMachineCostItem: endpoint({
    method: 'post',
    path: '/machines/:machineId/cost-items',
    summary: 'Add to the landed cost',
    permission: 'machines.edit',
    params: machineId,
    body: machineCostItemInputSchema,
    response: machineSchema,
  }),
  updateMachineCostItem: endpoint({
    method: 'patch',
    path: '/machines/:machineId/cost-items/:machineCostItemId',
    summary: 'Correct a cost item',
    permission: 'machines.edit',
    params: costItemId,
    body: machineCostItemInputSchema,
    response: machineSchema,
  }),
  deleteMachineCostItem: endpoint({
    method: 'delete',
    path: '/machines/:machineId/cost-items/:machineCostItemId',
    summary: 'Take a cost item out',
    permission: 'machines.edit',
    params: costItemId,
    response: machineSchema,
  }),
  createMachineRate: endpoint({
    method: 'post',
    path: '/machines/:machineId/rates',
    summary: 'Add rates from a day on',
    permission: 'machines.edit',
    params: machineId,
    body: machineRateInputSchema,
    response: machineSchema,
  }),
  updateMachineRate: endpoint({
    method: 'patch',
    path: '/machines/:machineId/rates/:machineRateId',
    summary: 'Correct rates',
    permission: 'machines.edit',
    params: rateId,
    body: machineRateInputSchema,
    response: machineSchema,
  }),
  deleteMachineRate: endpoint({
    method: 'delete',
    path: '/machines/:machineId/rates/:machineRateId',
    summary: 'Take rates out',
    permission: 'machines.edit',
    params: rateId,
    response: machineSchema,
  }),
};
