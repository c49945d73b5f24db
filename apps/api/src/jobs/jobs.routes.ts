import { ENDPOINTS } from '@brakeven/contract';
import { createJob, getJob, listCustomers, listJobLines, listJobs, updateJob } from '@brakeven/use-cases';
import { type Api } from '../api';

/** Jobs with their figures and cost lines, and customers. */
export function mountJobs({ mount }: Api): void {
  mount(ENDPOINTS.listJobs, ({ context, query }) => listJobs(context, query));
  mount(ENDPOINTS.getJob, ({ context, params }) => getJob(context, params));
  mount(ENDPOINTS.listJobLines, ({ context, params, query }) =>
    listJobLines(context, { ...params, ...query }),
  );
  mount(ENDPOINTS.createJob, ({ context, body }) => createJob(context, body));
  mount(ENDPOINTS.updateJob, ({ context, params, body }) => updateJob(context, params, body));
  mount(ENDPOINTS.listCustomers, ({ context }) => listCustomers(context));
}
