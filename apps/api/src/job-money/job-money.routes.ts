import { ENDPOINTS } from '@brakeven/contract';
import {
  createInvoice,
  createOutsideService,
  listInvoices,
  listJobMaterial,
  listOutsideServices,
  restoreInvoice,
  restoreOutsideService,
  updateInvoice,
  updateOutsideService,
  voidInvoice,
  voidOutsideService,
} from '@brakeven/use-cases';
import { type Api } from '../api';
import { loggingRollup } from '../rollup/logging-rollup';

/** The dated rows of a job: material, outside services, invoices and credit notes. */
export function mountJobMoney({ mount }: Api): void {
  mount(ENDPOINTS.listJobMaterial, ({ context, params }) => listJobMaterial(context, params));
  mount(ENDPOINTS.listOutsideServices, ({ context, params }) => listOutsideServices(context, params));
  mount(ENDPOINTS.createOutsideService, ({ context, params, body, request }) =>
    createOutsideService(context, params, body, loggingRollup(request)),
  );
  mount(ENDPOINTS.updateOutsideService, ({ context, params, body, request }) =>
    updateOutsideService(context, params, body, loggingRollup(request)),
  );
  mount(ENDPOINTS.voidOutsideService, ({ context, params, request }) =>
    voidOutsideService(context, params, loggingRollup(request)),
  );
  mount(ENDPOINTS.restoreOutsideService, ({ context, params, request }) =>
    restoreOutsideService(context, params, loggingRollup(request)),
  );
  mount(ENDPOINTS.listInvoices, ({ context, params }) => listInvoices(context, params));
  mount(ENDPOINTS.createInvoice, ({ context, params, body, request }) =>
    createInvoice(context, params, body, loggingRollup(request)),
  );
  mount(ENDPOINTS.updateInvoice, ({ context, params, body, request }) =>
    updateInvoice(context, params, body, loggingRollup(request)),
  );
  mount(ENDPOINTS.voidInvoice, ({ context, params, request }) =>
    voidInvoice(context, params, loggingRollup(request)),
  );
  mount(ENDPOINTS.restoreInvoice, ({ context, params, request }) =>
    restoreInvoice(context, params, loggingRollup(request)),
  );
}
