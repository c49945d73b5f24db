/** A row that the triggers refuse, with what they tell of it. Weights are kilograms as text. */
export type RowRefusal =
  | { kind: 'stock'; material: string; on: string; job: string | null; missingKg: string }
  | { kind: 'return'; material: string; on: string; job: string; excessKg: string }
  /** An issue of a closed month whose amount, which stays, no longer fits the stock. */
  | { kind: 'closed-issue'; material: string; on: string; job: string }
  /** A machine's day in service moved across work that a closed month holds; `on` is the first of it. */
  | { kind: 'in-service'; machine: string; on: string; closedThrough: string }
  | { kind: 'before-job'; job: string; openedOn: string; on: string; table: DatedTable };

/** Tables whose rows are not dated before their job; `job` where its opening was moved past its rows. */
export type DatedTable = 'material_issue' | 'outside_service' | 'invoice' | 'job';

/** Which rule of the books an error is about; null if it is another error. */
export function findRowRefusal(error: unknown): RowRefusal | null {
  if (typeof error !== 'object' || error === null) return null;
  const { code, detail } = error as { code?: string; detail?: string };
  const read = READERS[code ?? ''];
  return read && detail !== undefined ? read(detail) : null;
}

const READERS: Readonly<Record<string, (detail: string) => RowRefusal>> = {
  BK001: (detail) => {
    const { material, on, job, missingKg } = JSON.parse(detail) as StockDetail & { missingKg: number };
    return { kind: 'stock', material, on, job, missingKg: String(missingKg) };
  },
  BK002: (detail) => {
    const { material, on, job, excessKg } = JSON.parse(detail) as StockDetail & { excessKg: number };
    return { kind: 'return', material, on, job: job ?? '', excessKg: String(excessKg) };
  },
  BK003: (detail) => ({
    kind: 'before-job',
    ...(JSON.parse(detail) as Detail<'before-job'>),
  }),
  BK004: (detail) => ({ kind: 'closed-issue', ...(JSON.parse(detail) as Detail<'closed-issue'>) }),
  BK005: (detail) => ({ kind: 'in-service', ...(JSON.parse(detail) as Detail<'in-service'>) }),
};

type Detail<Kind extends RowRefusal['kind']> = Omit<Extract<RowRefusal, { kind: Kind }>, 'kind'>;

interface StockDetail {
  material: string;
  on: string;
  job: string | null;
}
