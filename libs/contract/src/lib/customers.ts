import { z } from 'zod';
import { endpoint } from './endpoint';
import { invoiceSchema } from './job-money';
import { idSchema, localDateSchema, moneySchema, nameInputSchema } from './schema-values';

/** Sums over a customer's jobs, as rolled up. */
export const customerFiguresSchema = z.object({
  jobs: z.number().int(),
  openJobs: z.number().int(),
  total: moneySchema,
  invoiced: moneySchema,
  /** invoiced − total */
  margin: moneySchema,
  /** True while it is true of one job that has cost or brought something. */
  marginIsProvisional: z.boolean(),
  workInProgress: moneySchema,
  lastWorkedOn: localDateSchema.nullable(),
});
export type CustomerFigures = z.infer<typeof customerFiguresSchema>;

export const customerSchema = customerFiguresSchema.extend({
  /** Null for the jobs that have no customer. */
  customerId: idSchema.nullable(),
  name: z.string().nullable(),
});
export type Customer = z.infer<typeof customerSchema>;
export const customerListSchema = z.object({
  items: z.array(customerSchema),
  totals: customerFiguresSchema,
});
export type CustomerList = z.infer<typeof customerListSchema>;

/** A customer with what was invoiced, latest first; its jobs are listed by `listJobs`. */
export const customerDetailSchema = customerSchema.extend({
  customerId: idSchema,
  name: z.string(),
  invoices: z.array(invoiceSchema.extend({ job: z.string() })),
});
export type CustomerDetail = z.infer<typeof customerDetailSchema>;

export const customerInputSchema = z.object({ name: nameInputSchema });
export type CustomerInput = z.infer<typeof customerInputSchema>;

const customerId = z.object({ customerId: idSchema });
export const customerEndpoints = {
  listCustomerFigures: endpoint({
    method: 'get',
    path: '/customers/figures',
    summary: 'Customers with what their jobs cost and brought',
    permission: 'jobs.money',
    response: customerListSchema,
  }),
  getCustomer: endpoint({
    method: 'get',
    path: '/customers/:customerId',
    summary: 'A customer with figures and invoices',
    permission: 'jobs.money',
    params: customerId,
    response: customerDetailSchema,
  }),
  renameCustomer: endpoint({
    method: 'patch',
    path: '/customers/:customerId',
    summary: 'Rename a customer',
    permission: 'jobs.edit',
    params: customerId,
    body: customerInputSchema,
    response: customerDetailSchema,
  }),
};
