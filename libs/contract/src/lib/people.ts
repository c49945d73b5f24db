import { z } from 'zod';
import { endpoint } from './endpoint';
import {
  codeInputSchema,
  idSchema,
  localDateSchema,
  nameInputSchema,
  percentInputSchema,
  rateInputSchema,
  rateSchema,
} from './schema-values';

export const payRateSchema = z.object({
  payRateId: idSchema,
  validFrom: localDateSchema,
  wagePerHour: rateSchema,
  burdenPercent: rateSchema,
});
export type PayRate = z.infer<typeof payRateSchema>;
export const employeeSchema = z.object({
  employeeId: idSchema,
  number: z.string(),
  name: z.string(),
  isActive: z.boolean(),
  /** Latest first. */
  rates: z.array(payRateSchema),
  /** Other spellings found in timesheets and confirmed. */
  aliases: z.array(z.object({ aliasId: idSchema, spelling: z.string() })),
});
export type Employee = z.infer<typeof employeeSchema>;

export const payRateInputSchema = z.object({
  validFrom: localDateSchema,
  wagePerHour: rateInputSchema,
  burdenPercent: percentInputSchema,
});
export type PayRateInput = z.infer<typeof payRateInputSchema>;
export const employeeCreateSchema = z.object({
  number: codeInputSchema,
  name: nameInputSchema,
  rate: payRateInputSchema,
});
export type EmployeeCreate = z.infer<typeof employeeCreateSchema>;
export const employeePatchSchema = z
  .object({ number: codeInputSchema, name: nameInputSchema, isActive: z.boolean() })
  .partial();
export type EmployeePatch = z.infer<typeof employeePatchSchema>;

export const overheadRateSchema = z.object({
  overheadRateId: idSchema,
  validFrom: localDateSchema,
  ratePerLabourHour: rateSchema,
});
export type OverheadRate = z.infer<typeof overheadRateSchema>;
export const overheadRateInputSchema = z.object({
  validFrom: localDateSchema,
  ratePerLabourHour: rateInputSchema,
});
export type OverheadRateInput = z.infer<typeof overheadRateInputSchema>;

export const operationSchema = z.object({
  operationId: idSchema,
  code: z.string(),
  name: z.string(),
  defaultMachineId: idSchema.nullable(),
  defaultMachine: z.string().nullable(),
});
export type Operation = z.infer<typeof operationSchema>;
export const operationInputSchema = z.object({
  code: codeInputSchema,
  name: nameInputSchema,
  defaultMachineId: idSchema.nullable().default(null),
});
export type OperationInput = z.infer<typeof operationInputSchema>;

const employeeId = z.object({ employeeId: idSchema });
const payRateId = z.object({ employeeId: idSchema, payRateId: idSchema });
const overheadRateId = z.object({ overheadRateId: idSchema });
export const peopleEndpoints = {
  listEmployees: endpoint({
    method: 'get',
    path: '/employees',
    summary: 'Employees with their pay rates',
    permission: 'people.view',
    response: z.array(employeeSchema),
  }),
  createEmployee: endpoint({
    method: 'post',
    path: '/employees',
    summary: 'Add an employee with a first rate',
    permission: 'people.edit',
    body: employeeCreateSchema,
    response: employeeSchema,
  }),
  updateEmployee: endpoint({
    method: 'patch',
    path: '/employees/:employeeId',
    summary: 'Change number, name, active',
    permission: 'people.edit',
    params: employeeId,
    body: employeePatchSchema,
    response: employeeSchema,
  }),
  createPayRate: endpoint({
    method: 'post',
    path: '/employees/:employeeId/rates',
    summary: 'Add a rate from a day on',
    permission: 'people.edit',
    params: employeeId,
    body: payRateInputSchema,
    response: employeeSchema,
  }),
  updatePayRate: endpoint({
    method: 'patch',
    path: '/employees/:employeeId/rates/:payRateId',
    summary: 'Correct a rate',
    permission: 'people.edit',
    params: payRateId,
    body: payRateInputSchema,
    response: employeeSchema,
  }),
  deletePayRate: endpoint({
    method: 'delete',
    path: '/employees/:employeeId/rates/:payRateId',
    summary: 'Take a rate out, if no entry would lose its wage',
    permission: 'people.edit',
    params: payRateId,
    response: employeeSchema,
  }),
  deleteAlias: endpoint({
    method: 'delete',
    path: '/aliases/:aliasId',
    summary: 'Forget a spelling',
    permission: 'people.edit',
    params: z.object({ aliasId: idSchema }),
    response: null,
  }),
  listOverheadRates: endpoint({
    method: 'get',
    path: '/overhead-rates',
    summary: 'Overhead rates, latest first',
    permission: 'people.view',
    response: z.array(overheadRateSchema),
  }),
  createOverheadRate: endpoint({
    method: 'post',
    path: '/overhead-rates',
    summary: 'Add an overhead rate',
    permission: 'people.edit',
    body: overheadRateInputSchema,
    response: overheadRateSchema,
  }),
  updateOverheadRate: endpoint({
    method: 'patch',
    path: '/overhead-rates/:overheadRateId',
    summary: 'Correct an overhead rate',
    permission: 'people.edit',
    params: overheadRateId,
    body: overheadRateInputSchema,
    response: overheadRateSchema,
  }),
  deleteOverheadRate: endpoint({
    method: 'delete',
    path: '/overhead-rates/:overheadRateId',
    summary: 'Take an overhead rate out',
    permission: 'people.edit',
    params: overheadRateId,
    response: null,
  }),
  listOperations: endpoint({
    method: 'get',
    path: '/operations',
    summary: 'Operations',
    permission: 'shop.view',
    response: z.array(operationSchema),
  }),
  createOperation: endpoint({
    method: 'post',
    path: '/operations',
    summary: 'Add an operation',
    permission: 'shop.edit',
    body: operationInputSchema,
    response: operationSchema,
  }),
  updateOperation: endpoint({
    method: 'patch',
    path: '/operations/:operationId',
    summary: 'Change an operation',
    permission: 'shop.edit',
    params: z.object({ operationId: idSchema }),
    body: operationInputSchema,
    response: operationSchema,
  }),
};
