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
  const { code, constraint } = toFields(error);
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
  const { code, message, errors } = toFields(error);
  if (errors) return errors.some(isUnreachable);
  return (code !== undefined && UNREACHABLE.has(code)) || LOST.test(message ?? '');
}

interface ErrorFields {
  code?: string;
  constraint?: string;
  message?: string;
  /** Of an AggregateError: a name that has several addresses, none of which answers. */
  errors?: unknown[];
}

/** By its fields alone: errors of the runtime itself need not be instances of this module's `Error`. */
function toFields(error: unknown): ErrorFields {
  return typeof error === 'object' && error !== null ? error : {};
}

const NOT_STORABLE: Readonly<Record<string, string>> = {
  '22003': 'A number is too large to be kept.',
  '22007': 'A date cannot be read.',
  '22008': 'A date is outside the years that can be kept.',
  '22021': 'A text holds a character that cannot be kept. Type it anew.',
  '22P05': 'A text holds a character that cannot be kept. Type it anew.',
};

/** Words for a value that the database cannot keep; null if an error is about something else. */
export function findUnstorableValue(error: unknown): string | null {
  const { code } = toFields(error);
  return (code !== undefined && NOT_STORABLE[code]) || null;
}
