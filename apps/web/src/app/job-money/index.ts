/*
 * The dated rows of a job, as cards to stand on its page. Load them lazily, for example
 *   `const { InvoicesCard } = await import('../job-money');` or a `@defer` block.
 *
 *   <app-material-issues-card [jobId]="job.jobId" (changed)="reload()" />    MaterialIssuesCard, `materials.view`
 *   <app-outside-services-card [jobId]="job.jobId" (changed)="reload()" />   OutsideServicesCard, `jobs.money`
 *   <app-invoices-card [jobId]="job.jobId" (changed)="reload()" />           InvoicesCard, `jobs.money`
 *
 * Each asks for its own rows, hides what the role may not do, and emits `changed` once something was entered,
 * corrected, voided or put back and the costs are rolled up. Leave out the cards whose permission is missing.
 */
export { InvoicesCard } from './invoices-card';
export { MaterialIssuesCard } from './material-issues-card';
export { OutsideServicesCard } from './outside-services-card';
