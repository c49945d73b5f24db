import { type Job } from '@brakeven/contract';
import { type GridNote } from '@brakeven/ui';

/** Before a job is finished its margin is what has come of it so far; then invoices may still be to come. */
export function toMarginNote({
  marginIsProvisional,
  isToInvoice,
}: Pick<Job, 'marginIsProvisional' | 'isToInvoice'>): GridNote | null {
  if (isToInvoice) return { severity: 'quiet', text: 'to invoice' };
  return marginIsProvisional ? { severity: 'quiet', text: 'so far' } : null;
}
