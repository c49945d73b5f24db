import { sql } from 'kysely';
import { type SourceColumns } from './entry-pages';
import { type CostLineTable, type InvoiceTable, type MaterialIssueTable } from './tables';

/** Where a page of cost lines goes on: the key of the last line before it. */
export interface LinePosition {
  postedOn: string;
  sourceId: string;
  category: string;
}

/** What a cost line and the row that it was made from say; each kind of row fills its own columns. */
export interface LineFactRow extends SourceColumns, LinePosition {
  category: CostLineTable['category'];
  sourceKind: CostLineTable['sourceKind'];
  workedOn: string;
  quantity: string;
  /** The day in the books of the line that this one takes back; null if it takes none back. */
  takesBackOn: string | null;
  employeeId: string | null;
  employee: string | null;
  operation: string | null;
  machine: string | null;
  materialId: string | null;
  material: string | null;
  issueKind: MaterialIssueTable['kind'] | null;
  sheets: number | null;
  pieces: number | null;
  vendor: string | null;
  invoiceKind: InvoiceTable['kind'] | null;
  invoiceNumber: string | null;
  /** Of the service, the invoice, the issue or the time entry. */
  description: string | null;
}

/**
 * Of a line `l`, with `LINE_FACT_JOINS`. Returns and credit notes count below 0 by themselves; whatever has the
 * other sign takes back a line that was posted before it, in a month that was closed since.
 */
export const LINE_FACTS = sql`
  l.posted_on, l.worked_on, l.source_id, l.source_kind, l.category, l.quantity, l.employee_id, e.name as employee,
  o.name as operation, m.name as machine, s.material_id, a.name as material, s.kind as issue_kind, s.sheets, s.pieces,
  v.vendor, n.kind as invoice_kind, n.number as invoice_number,
  nullif(coalesce(v.description, n.description, s.note, t.note), '') as description,
  t.import_id, i.file_name, i.sheet, t.source_row, t.source_cell,
  case when l.quantity * case when s.kind = 'return' or n.kind = 'credit-note' then -1 else 1 end < 0 then
    coalesce(
      (select max(b.posted_on) from cost_line b
        where b.shop_id = l.shop_id and b.worked_on = l.worked_on and b.source_id = l.source_id
          and b.category = l.category and b.posted_on <> b.worked_on and b.posted_on < l.posted_on),
      l.worked_on)
  end as takes_back_on`;

/** The row that a line `l` was made from, and the names of what it is about; few lines only, for each is looked up. */
export const LINE_FACT_JOINS = sql`
  left join employee e on e.shop_id = l.shop_id and e.employee_id = l.employee_id
  left join operation o on o.shop_id = l.shop_id and o.operation_id = l.operation_id
  left join machine m on m.shop_id = l.shop_id and m.machine_id = l.machine_id
  left join time_entry t on l.source_kind = 'time_entry' and t.shop_id = l.shop_id and t.entry_id = l.source_id
  left join timesheet_import i on i.shop_id = t.shop_id and i.import_id = t.import_id
  left join material_issue s
    on l.source_kind = 'material_issue' and s.shop_id = l.shop_id and s.issue_id = l.source_id
  left join material a on a.shop_id = s.shop_id and a.material_id = s.material_id
  left join outside_service v
    on l.source_kind = 'outside_service' and v.shop_id = l.shop_id and v.outside_service_id = l.source_id
  left join invoice n on l.source_kind = 'invoice' and n.shop_id = l.shop_id and n.invoice_id = l.source_id`;
