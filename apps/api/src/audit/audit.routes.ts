import { ENDPOINTS } from '@brakeven/contract';
import { listAuditEvents } from '@brakeven/use-cases';
import { type Api } from '../api';

/** The audit trail. */
export function mountAudit({ mount }: Api): void {
  mount(ENDPOINTS.listAuditEvents, ({ context, query }) => listAuditEvents(context, query));
}
