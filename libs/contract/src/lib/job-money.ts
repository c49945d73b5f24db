import { z } from 'zod';
import { endpoint } from './endpoint';
import { materialIssueSchema } from './materials';
import {
  codeInputSchema,
  idSchema,
  instantSchema,
  localDateSchema,
  moneySchema,
  positiveAmountInputSchema,
  weightSchema,
} from './schema-values';

const voided = { voidedAt: instantSchema.nullable(), voidedBy: z.string().nullable() };
const textInputSchema = z.string().trim().max(300, 'At most 300 characters.').default('');

export const outsideServiceSchema = z.object({
  outsideServiceId: idSchema,
  jobId: idSchema,
  incurredOn: localDateSchema,
  vendor: z.string(),
  description: z.string(),
  amount: moneySchema,
  ...voided,
});
export type OutsideService = z.infer<typeof outsideServiceSchema>;
export const outsideServiceInputSchema = z.object({
  incurredOn: localDateSchema,
  vendor: textInputSchema,
  description: textInputSchema,
  amount: positiveAmountInputSchema,
});
export type OutsideServiceInput = z.input<typeof outsideServiceInputSchema>;

export const INVOICE_KINDS = ['invoice', 'credit-note'] as const;
export type InvoiceKind = (typeof INVOICE_KINDS)[number];
export const invoiceSchema = z.object({
  invoiceId: idSchema,
  jobId: idSchema,
  kind: z.enum(INVOICE_KINDS),
  number: z.string(),
  invoicedOn: localDateSchema,
  description: z.string(),
  /** Above 0, for a credit note too. */
  amount: moneySchema,
  ...voided,
});
export type Invoice = z.infer<typeof invoiceSchema>;
export const invoiceInputSchema = z.object({
  kind: z.enum(INVOICE_KINDS),
  number: codeInputSchema,
  invoicedOn: localDateSchema,
  description: textInputSchema,
  amount: positiveAmountInputSchema,
});
export type InvoiceInput = z.input<typeof invoiceInputSchema>;

/** Latest first, those voided among them; the total is of those that count. */
export const outsideServiceListSchema = z.object({
  items: z.array(outsideServiceSchema),
  total: moneySchema,
});
export type OutsideServiceList = z.infer<typeof outsideServiceListSchema>;
/** Likewise; invoices less credit notes. */
export const invoiceListSchema = z.object({ items: z.array(invoiceSchema), total: moneySchema });
export type InvoiceList = z.infer<typeof invoiceListSchema>;
/** Likewise; issues less returns. The total is absent for those without `materials.money`. */
export const jobMaterialListSchema = z.object({
  items: z.array(materialIssueSchema),
  weightKg: weightSchema,
  total: moneySchema.optional(),
});
export type JobMaterialList = z.infer<typeof jobMaterialListSchema>;

const jobId = z.object({ jobId: idSchema });
const outsideServiceId = z.object({ outsideServiceId: idSchema });
const invoiceId = z.object({ invoiceId: idSchema });
export const jobMoneyEndpoints = {
  listJobMaterial: endpoint({
    method: 'get',
    path: '/jobs/:jobId/material-issues',
    summary: 'Material issued to a job, and returned',
    permission: 'materials.view',
    params: jobId,
    response: jobMaterialListSchema,
  }),
  listOutsideServices: endpoint({
    method: 'get',
    path: '/jobs/:jobId/outside-services',
    summary: 'Outside services on a job',
    permission: 'jobs.money',
    params: jobId,
    response: outsideServiceListSchema,
  }),
  createOutsideService: endpoint({
    method: 'post',
    path: '/jobs/:jobId/outside-services',
    summary: 'Add an outside service',
    permission: 'jobs.edit',
    params: jobId,
    body: outsideServiceInputSchema,
    response: outsideServiceSchema,
  }),
  updateOutsideService: endpoint({
    method: 'patch',
    path: '/outside-services/:outsideServiceId',
    summary: 'Correct an outside service: it is voided and another takes its place',
    permission: 'jobs.edit',
    params: outsideServiceId,
    body: outsideServiceInputSchema,
    response: outsideServiceSchema,
  }),
  voidOutsideService: endpoint({
    method: 'post',
    path: '/outside-services/:outsideServiceId/void',
    summary: 'Void an outside service',
    permission: 'jobs.edit',
    params: outsideServiceId,
    response: null,
  }),
  restoreOutsideService: endpoint({
    method: 'post',
    path: '/outside-services/:outsideServiceId/restore',
    summary: 'Take back the voiding of an outside service',
    permission: 'jobs.edit',
    params: outsideServiceId,
    response: null,
  }),
  listInvoices: endpoint({
    method: 'get',
    path: '/jobs/:jobId/invoices',
    summary: 'Invoices and credit notes of a job',
    permission: 'jobs.money',
    params: jobId,
    response: invoiceListSchema,
  }),
  createInvoice: endpoint({
    method: 'post',
    path: '/jobs/:jobId/invoices',
    summary: 'Add an invoice or a credit note',
    permission: 'jobs.edit',
    params: jobId,
    body: invoiceInputSchema,
    response: invoiceSchema,
  }),
  updateInvoice: endpoint({
    method: 'patch',
    path: '/invoices/:invoiceId',
    summary: 'Correct an invoice or a credit note: it is voided and another takes its place',
    permission: 'jobs.edit',
    params: invoiceId,
    body: invoiceInputSchema,
    response: invoiceSchema,
  }),
  voidInvoice: endpoint({
    method: 'post',
    path: '/invoices/:invoiceId/void',
    summary: 'Void an invoice or a credit note',
    permission: 'jobs.edit',
    params: invoiceId,
    response: null,
  }),
  restoreInvoice: endpoint({
    method: 'post',
    path: '/invoices/:invoiceId/restore',
    summary: 'Take back the voiding of an invoice or a credit note',
    permission: 'jobs.edit',
    params: invoiceId,
    response: null,
  }),
};
