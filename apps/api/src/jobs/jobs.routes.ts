import { ENDPOINTS } from '@brakeven/contract';
import {
  changeJobStatus,
  createJob,
  deleteEstimate,
  draftEstimate,
  exportJobsCsv,
  exportJobsWorkbook,
  getEstimate,
  getEstimateChoices,
  getEstimateWorkings,
  getJob,
  listCustomers,
  listJobLines,
  listJobs,
  listLikeJobs,
  quotePrice,
  saveEstimate,
  toEstimateVersion,
  updateJob,
} from '@brakeven/use-cases';
import { type Api } from '../api';
import { setVersion } from '../middleware/document-version';
import { sendStream } from '../send-stream';

/** Jobs with their figures and cost lines, and customers. */
export function mountJobs({ mount }: Api): void {
  mount(ENDPOINTS.listJobs, ({ context, query }) => listJobs(context, query));
  mount(ENDPOINTS.getJob, ({ context, params }) => getJob(context, params));
  mount(ENDPOINTS.listJobLines, ({ context, params, query }) =>
    listJobLines(context, { ...params, ...query }),
  );
  mount(ENDPOINTS.exportJobsCsv, async ({ context, query, response }) =>
    sendStream(await exportJobsCsv(context, query), 'text/csv; charset=utf-8', response),
  );
  mount(ENDPOINTS.exportJobsWorkbook, async ({ context, query, response }) =>
    sendStream(await exportJobsWorkbook(context, query), ENDPOINTS.exportJobsWorkbook.response, response),
  );
  mount(ENDPOINTS.createJob, ({ context, body }) => createJob(context, body));
  mount(ENDPOINTS.updateJob, ({ context, params, body }) => updateJob(context, params, body));
  mount(ENDPOINTS.changeJobStatus, ({ context, params, body }) => changeJobStatus(context, params, body));
  mount(ENDPOINTS.getEstimate, async ({ context, params, response }) => {
    const answer = await getEstimate(context, params);
    setVersion(response, toEstimateVersion(answer.estimate));
    return answer;
  });
  mount(ENDPOINTS.saveEstimate, async ({ context, params, body, version, response }) => {
    const saved = await saveEstimate(context, { ...params, version }, body);
    setVersion(response, toEstimateVersion(saved));
    return saved;
  });
  mount(ENDPOINTS.deleteEstimate, async ({ context, params, version, response }) => {
    await deleteEstimate(context, { ...params, version });
    setVersion(response, toEstimateVersion(null));
  });
  mount(ENDPOINTS.quotePrice, ({ context, params, body }) => quotePrice(context, params, body));
  mount(ENDPOINTS.getEstimateChoices, ({ context, query }) => getEstimateChoices(context, query));
  mount(ENDPOINTS.listLikeJobs, ({ context, params, query }) =>
    listLikeJobs(context, { ...params, ...query }),
  );
  mount(ENDPOINTS.draftEstimate, ({ context, params, query }) =>
    draftEstimate(context, { ...params, ...query }),
  );
  mount(ENDPOINTS.getEstimateWorkings, ({ context, query }) => getEstimateWorkings(context, query));
  mount(ENDPOINTS.listCustomers, ({ context }) => listCustomers(context));
}
