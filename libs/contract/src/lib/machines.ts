import { z } from 'zod';
import { endpoint } from './endpoint';
import {
  amountInputSchema,
  codeInputSchema,
  idSchema,
  hoursSchema,
  localDateSchema,
  moneySchema,
  nameInputSchema,
  percentInputSchema,
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
/** What a machine-hour rate is built from; a year is a year of planned work. */
export const machineRateBasisSchema = z.object({
  price: moneySchema,
  salvage: moneySchema,
  lifeYears: quantitySchema,
  interestPercent: quantitySchema,
  floorAreaM2: quantitySchema,
  spaceCostPerM2Year: rateSchema,
  insurancePerYear: moneySchema,
  upkeepPerYear: moneySchema,
  productiveHoursPerYear: quantitySchema,
  powerKw: quantitySchema,
  loadPercent: quantitySchema,
  tariffPerKwh: rateSchema,
  consumablesPerHour: rateSchema,
});
export type MachineRateBasis = z.infer<typeof machineRateBasisSchema>;
export const machineRateSchema = z.object({
  machineRateId: idSchema,
  validFrom: localDateSchema,
  machineHourRate: rateSchema,
  chargeOutRate: rateSchema,
  runningCostPerHour: rateSchema,
  /** Null for a rate that was typed in. */
  basis: machineRateBasisSchema.nullable(),
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

const positive = (schema: z.ZodType<string, string>, words: string) =>
  schema.refine((text) => Number(text) > 0, words);
const decimalInput = (integerDigits: number, places: number, example: string) =>
  z
    .string()
    .trim()
    .regex(new RegExp(`^\\d{1,${integerDigits}}(\\.\\d{1,${places}})?$`), {
      error: `Write a number of 0 or more with at most ${places} decimals, for example ${example}.`,
      abort: true,
    });
export const machineRateBasisInputSchema = z
  .object({
    price: positive(amountInputSchema, 'The price must be above 0.'),
    salvage: amountInputSchema,
    lifeYears: positive(decimalInput(4, 3, '10'), 'The life must be above 0 years.'),
    interestPercent: percentInputSchema,
    floorAreaM2: decimalInput(7, 5, '11.2'),
    spaceCostPerM2Year: rateInputSchema,
    insurancePerYear: amountInputSchema,
    upkeepPerYear: amountInputSchema,
    productiveHoursPerYear: positive(
      decimalInput(4, 2, '1600'),
      'The productive hours must be above 0, else there is nothing to share the cost out over.',
    ).refine((text) => Number(text) <= 8784, 'A year has at most 8,784 hours.'),
    powerKw: decimalInput(7, 3, '7.5'),
    loadPercent: decimalInput(3, 3, '60').refine(
      (text) => Number(text) <= 100,
      'The load is at most 100 percent.',
    ),
    tariffPerKwh: rateInputSchema,
    consumablesPerHour: rateInputSchema,
  })
  .refine(({ salvage, price }) => Number(salvage) <= Number(price), {
    path: ['salvage'],
    message: 'The salvage value cannot be above the price.',
  });
/** The machine-hour rate comes of the basis; the other two are kept from the rates valid before where left out. */
export const machineBuiltRateInputSchema = z.object({
  validFrom: localDateSchema,
  chargeOutRate: rateInputSchema.optional(),
  runningCostPerHour: rateInputSchema.optional(),
  basis: machineRateBasisInputSchema,
});
export type MachineBuiltRateInput = z.infer<typeof machineBuiltRateInputSchema>;

/** What the hours that a machine really ran have carried of its fixed cost, over the days with a built rate. */
export const machineRecoverySchema = z.object({
  /** The period asked for, cut to the days in service that are rolled up; null if none are left. */
  from: localDateSchema.nullable(),
  to: localDateSchema.nullable(),
  /** Days of the period with a rate that was built, and those without. */
  daysCovered: z.number().int(),
  daysWithoutBasis: z.number().int(),
  plannedHours: hoursSchema,
  actualHours: hoursSchema,
  /** Hours on days without a built rate, which are not compared. */
  hoursWithoutBasis: hoursSchema,
  fixedCost: moneySchema,
  absorbed: moneySchema,
  /** absorbed − fixedCost. */
  difference: moneySchema,
  outcome: z.enum(['over', 'under', 'even']),
});
export type MachineRecovery = z.infer<typeof machineRecoverySchema>;

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
  createMachineBuiltRate: endpoint({
    method: 'post',
    path: '/machines/:machineId/built-rates',
    summary: 'Build a machine-hour rate and add it from a day on',
    permission: 'machines.edit',
    params: machineId,
    body: machineBuiltRateInputSchema,
    response: machineSchema,
  }),
  updateMachineBuiltRate: endpoint({
    method: 'patch',
    path: '/machines/:machineId/built-rates/:machineRateId',
    summary: 'Build a machine-hour rate anew',
    permission: 'machines.edit',
    params: rateId,
    body: machineBuiltRateInputSchema,
    response: machineSchema,
  }),
  getMachineRecovery: endpoint({
    method: 'get',
    path: '/machines/:machineId/recovery',
    summary: 'Fixed cost of a period against what the hours really run have carried of it',
    permission: 'machines.money',
    params: machineId,
    query: z
      .object({ from: localDateSchema, to: localDateSchema })
      .refine(({ from, to }) => from <= to, { path: ['to'], message: 'Must not be before the first day.' }),
    response: machineRecoverySchema,
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
