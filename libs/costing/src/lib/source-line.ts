import { D, type Decimal, type LocalDate, type Money, type Rate, toMoney, toRate } from '@brakeven/values';
import { type CostCategory } from './cost-categories';
import { type CostLine } from './entry-lines';

/** Rows that cost lines are made of. */
export const SOURCE_KINDS = ['time_entry', 'material_issue', 'outside_service', 'invoice'] as const;

/** One kind of row that cost lines are made of. */
export type SourceKind = (typeof SOURCE_KINDS)[number];

/** One row's amount in one category, whatever kind of row it is. */
export interface SourceLine {
  sourceKind: SourceKind;
  sourceId: string;
  /** The date of the row itself. */
  workedOn: LocalDate;
  category: CostCategory;
  /** Null for what went to overhead. */
  jobId: string | null;
  employeeId: string | null;
  machineId: string | null;
  /** Hours, kg, or ±1 for an amount as such. */
  quantity: Decimal;
  rate: Rate;
  rateFactor: Decimal;
  /** Null where no rate of the register was used. */
  rateId: string | null;
  amount: Money;
}

/** Work bought from outside for a job. */
export interface OutsideService {
  outsideServiceId: string;
  jobId: string;
  incurredOn: LocalDate;
  amount: Money;
}

/** An invoice, or a credit note that takes back from one; the amount is positive in both. */
export interface Invoice {
  invoiceId: string;
  jobId: string;
  invoicedOn: LocalDate;
  kind: 'invoice' | 'credit-note';
  amount: Money;
}

const ONE = D(1);

/** A line of a time entry as a line of any row. */
export function toSourceLine(line: CostLine): SourceLine {
  const { entryId, ...shared } = line;
  return { ...shared, sourceKind: 'time_entry', sourceId: entryId };
}

/** The line of an outside service: its amount, once. Rule in words: `RULES.outside`. */
export function toOutsideLine(service: OutsideService): SourceLine {
  const { outsideServiceId, jobId, incurredOn, amount } = service;
  const line = amountLine(jobId, incurredOn, amount, ONE);
  return { ...line, sourceKind: 'outside_service', sourceId: outsideServiceId, category: 'outside' };
}

/** The line of an invoice, below 0 for a credit note. Rule in words: `RULES.invoiced`. */
export function toInvoiceLine({ invoiceId, jobId, invoicedOn, kind, amount }: Invoice): SourceLine {
  const line = amountLine(jobId, invoicedOn, amount, kind === 'invoice' ? ONE : ONE.negated());
  return { ...line, sourceKind: 'invoice', sourceId: invoiceId, category: 'invoiced' };
}

function amountLine(
  jobId: string,
  workedOn: LocalDate,
  amount: Money,
  quantity: Decimal,
): Omit<SourceLine, 'sourceKind' | 'sourceId' | 'category'> {
  return {
    workedOn,
    jobId,
    employeeId: null,
    machineId: null,
    quantity,
    rate: toRate(amount),
    rateFactor: ONE,
    rateId: null,
    amount: toMoney(amount.times(quantity)),
  };
}
