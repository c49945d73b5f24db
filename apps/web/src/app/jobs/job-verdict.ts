import { type Figure, type FigureRef, type JobDetail } from '@brakeven/contract';
import { type Tone } from '@brakeven/ui';
import { D } from '@brakeven/values';

/** A piece of a sentence: words, or an amount that opens. */
export type SentencePart = string | { value: string; ref: FigureRef };

/** What a job came to, in a headline and a sentence. */
export interface JobVerdict {
  tone: Tone;
  headline: SentencePart[];
  sentence: SentencePart[];
}

/** The verdict on a job; null where no money is sent. */
export function toJobVerdict(job: JobDetail): JobVerdict | null {
  if (job.total === undefined || job.margin === undefined) return null;
  if (!job.isBillable && !hasMoney(job.invoiced)) return toInternal(job);
  switch (job.status) {
    case 'quoted':
      return toQuoted(job);
    case 'lost':
    case 'cancelled':
      return toGivenUp(job);
    case 'open':
      return toOpen(job);
    case 'finished':
    case 'invoiced':
      return toEnded(job);
  }
}

function toInternal(job: JobDetail): JobVerdict {
  return {
    tone: 'plain',
    headline: ['The shop’s own work cost ', figure(job, 'job.total', job.total)],
    sentence: [...toAgainstEstimate(job), ' It is not billable, so that nothing comes in for it.'],
  };
}

function toQuoted(job: JobDetail): JobVerdict {
  if (!job.estimate) {
    return { tone: 'plan', headline: ['Quoted, not estimated'], sentence: [NO_ESTIMATE] };
  }
  const estimate = figure(job, 'estimate.total', job.estimate);
  if (!job.quotedPrice) {
    return {
      tone: 'plan',
      headline: ['Estimated to cost ', estimate],
      sentence: ['No price is quoted yet.'],
    };
  }
  const margin = D(job.quotedPrice).minus(job.estimate);
  return {
    tone: margin.lt(0) ? 'loss' : 'plan',
    headline: ['Quoted at ', figure(job, 'job.quotedPrice', job.quotedPrice)],
    sentence: [
      'It is estimated to cost ',
      estimate,
      margin.lt(0)
        ? ': more than the price that is quoted.'
        : `, which would leave ${toShare(margin.toFixed(2), job.quotedPrice)} of the price.`,
    ],
  };
}

function toGivenUp(job: JobDetail): JobVerdict {
  const words = job.status === 'lost' ? 'Lost to somebody else' : 'Cancelled';
  const spent = hasMoney(job.total)
    ? ['Work on it had cost ', figure(job, 'job.total', job.total), ' by then.']
    : ['Nothing had been spent on it.'];
  return { tone: hasMoney(job.total) ? 'loss' : 'plain', headline: [words], sentence: spent };
}

function toOpen(job: JobDetail): JobVerdict {
  if (!hasMoney(job.total)) {
    const estimated = job.estimate
      ? ['It is estimated to cost ', figure(job, 'estimate.total', job.estimate), '.']
      : [NO_ESTIMATE];
    return { tone: 'blue', headline: ['Nothing is spent yet'], sentence: estimated };
  }
  const isOver = job.variance ? D(job.variance).gt(0) : false;
  const income = hasMoney(job.invoiced)
    ? [' ', figure(job, 'job.invoiced', job.invoiced), ' is invoiced.']
    : [' Nothing is invoiced yet.'];
  return {
    tone: isOver ? 'loss' : 'blue',
    headline: [figure(job, 'job.total', job.total), ' spent so far'],
    sentence: [...toSpentOfEstimate(job), ...income],
  };
}

function toEnded(job: JobDetail): JobVerdict {
  if (!hasMoney(job.invoiced)) {
    return {
      tone: 'plan',
      headline: ['Done, and not invoiced'],
      sentence: ['It cost ', figure(job, 'job.total', job.total), '. ', ...toAgainstEstimate(job)],
    };
  }
  if (job.isToInvoice && job.quotedPrice) return toPartInvoiced(job, job.quotedPrice);
  const margin = D(job.margin ?? 0);
  const share = toShare(margin.abs().toFixed(2), job.invoiced ?? '0');
  return {
    tone: margin.lt(0) ? 'loss' : 'good',
    headline: [margin.lt(0) ? 'Lost ' : 'Made ', figure(job, 'job.margin', margin.abs().toFixed(2))],
    sentence: [`That is ${share} of what was invoiced. `, ...toAgainstEstimate(job)],
  };
}

function toPartInvoiced(job: JobDetail, quotedPrice: string): JobVerdict {
  const [invoiced, quoted] = [
    figure(job, 'job.invoiced', job.invoiced),
    figure(job, 'job.quotedPrice', quotedPrice),
  ];
  return {
    tone: 'plan',
    headline: ['Done, and ', invoiced, ' of ', quoted, ' invoiced'],
    sentence: ['It cost ', figure(job, 'job.total', job.total), '. ', ...toAgainstEstimate(job)],
  };
}

/** What was spent of the estimate, while the job runs. */
function toSpentOfEstimate(job: JobDetail): SentencePart[] {
  if (!job.estimate || !job.variance) return [NO_ESTIMATE];
  if (D(job.variance).gt(0)) {
    return ['It is already ', figure(job, 'estimate.variance', job.variance), ' above its estimate.'];
  }
  const estimate = figure(job, 'estimate.total', job.estimate);
  if (!hasMoney(job.estimate)) return ['Its estimate is ', estimate, '.'];
  return [`That is ${toShare(job.total ?? '0', job.estimate)} of the `, estimate, ' estimated.'];
}

/** How the cost of a job that is done stands to its estimate. */
function toAgainstEstimate(job: JobDetail): SentencePart[] {
  if (!job.estimate || !job.variance) return ['It was not estimated.'];
  const variance = D(job.variance);
  if (variance.isZero()) return ['It cost just what was estimated.'];
  return [
    'It cost ',
    figure(job, 'estimate.variance', variance.abs().toFixed(2)),
    variance.gt(0) ? ' more than estimated.' : ' less than estimated.',
  ];
}

const NO_ESTIMATE = 'There is no estimate to hold it against.';

function figure({ jobId }: JobDetail, name: Figure, value: string | undefined): SentencePart {
  return { value: value ?? '0.00', ref: { figure: name, jobId } };
}

function hasMoney(amount: string | null | undefined): boolean {
  return amount !== null && amount !== undefined && !D(amount).isZero();
}

/** A share for the eye, in whole percent; under one percent says so. */
function toShare(part: string, whole: string): string {
  if (D(whole).isZero()) return 'all';
  const percent = D(part).times(100).div(D(whole));
  return percent.gt(0) && percent.lt(1) ? 'less than 1 %' : `${percent.toFixed(0)} %`;
}
