/** A statement that the database refused because of a constraint. */
export interface ConstraintViolation {
  kind: 'unique' | 'reference' | 'check';
  /** Name of the constraint, such as `employee_shop_id_number_key`. */
  constraint: string;
}

const KINDS: Readonly<Record<string, ConstraintViolation['kind']>> = {
  '23505': 'unique',
  '23503': 'reference',
  '23514': 'check',
};

/** Which constraint an error is about; null if it is another error. */
export function findConstraintViolation(error: unknown): ConstraintViolation | null {
  if (!(error instanceof Error)) return null;
  const { code, constraint } = error as { code?: string; constraint?: string };
  const kind = KINDS[code ?? ''];
  return kind && constraint ? { kind, constraint } : null;
}

const UNREACHABLE = new Set([
  'ECONNREFUSED',
  'ECONNRESET',
  'ENOTFOUND',
  'EHOSTUNREACH',
  'ETIMEDOUT',
  'EPIPE',
  '28P01',
  '28000',
  '3D000',
  '53300',
  '57P01',
  '57P02',
  '57P03',
]);
const LOST =
  /timeout exceeded when trying to connect|Connection terminated|SASL|server closed the connection/i;

/** Whether an error means that the database cannot be reached, or not as this user. */
export function isUnreachable(error: unknown): boolean {
  if (error instanceof AggregateError) return error.errors.some(isUnreachable);
  if (!(error instanceof Error)) return false;
  const { code } = error as { code?: string };
  return (code !== undefined && UNREACHABLE.has(code)) || LOST.test(error.message);
}
