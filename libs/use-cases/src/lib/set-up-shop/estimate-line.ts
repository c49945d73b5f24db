import { type RegisterValues } from '@brakeven/database';
import { D, formatLocalDate, toLocalDate } from '@brakeven/values';
import { type SetupFile } from '@brakeven/workbook';
import { NO_LINE_COLUMNS } from '../estimate-jobs/no-line-columns';
import { isStockKnown } from './check-stock';
import { type EstimateDefaults } from './estimate-defaults';
import { type SetupDraft } from './setup-draft';
import { type DecimalColumn, toStoredNumber } from './stored-number';

export type EstimateRow = SetupFile['estimates'][number];

/** What a line is completed with. */
export interface LineSurroundings {
  defaults: EstimateDefaults;
  /** The day of the estimate. */
  on: string;
  job: RegisterValues | undefined;
  /** The line that the shop has in this place, estimated on the same day: what a row leaves blank stays as there. */
  kept: RegisterValues | undefined;
}

/** Cells that say something on rows of a kind; every kind takes a description. */
const CELLS = {
  operation: {
    operation: 'Operation',
    machine: 'Machine',
    setupHours: 'Set-up hours',
    minutesPerPiece: 'Minutes per piece',
    pieces: 'Pieces',
    labourRate: 'Labour rate',
    machineHourRate: 'Machine-hour rate',
    overheadRate: 'Overhead rate',
  },
  material: { material: 'Material', weightKg: 'Weight', pricePerKg: 'Price' },
  outside: { amount: 'Amount' },
} as const satisfies Record<EstimateRow['kind'], Partial<Record<keyof EstimateRow, string>>>;

/** A line as it is kept, but for job and position; null if something of it is refused. */
export function toEstimateLine(
  draft: SetupDraft,
  row: EstimateRow,
  at: LineSurroundings,
): RegisterValues | null {
  if (!checkCells(draft, row)) return null;
  const values = LINES[row.kind](new LineReader(draft, row, at));
  if (values === null) return null;
  return { ...NO_LINE_COLUMNS, ...values, kind: row.kind, description: row.description ?? '' };
}

/** Whether the cells that belong to other kinds are empty; else refused in words. */
function checkCells(draft: SetupDraft, row: EstimateRow): boolean {
  const others = Object.entries(CELLS).filter(([kind]) => kind !== row.kind);
  const filled = others
    .flatMap(([, cells]) => Object.entries(cells) as [keyof EstimateRow, string][])
    .filter(([column]) => row[column] !== null);
  for (const [column, header] of filled) {
    const message = `${header} says nothing on a row of kind ${row.kind}. Empty the cell, or correct the kind.`;
    draft.refuse('estimates', row, column, { code: 'cell_out_of_place', message });
  }
  return filled.length === 0;
}

const LINES = { operation: toOperation, material: toMaterial, outside: toOutside } as const;

function toOperation(read: LineReader): RegisterValues | null {
  const { row, draft, at } = read;
  const operationId =
    row.operation === null ? read.missing('operation') : draft.findOperation('estimates', row, row.operation);
  const setupHours = read.decimal('setupHours', 'hours') ?? '0.0000';
  const minutesPerPiece = read.decimal('minutesPerPiece', 'minutes') ?? '0.0000';
  if (D(setupHours).plus(minutesPerPiece).isZero()) {
    return read.refuse(
      'minutesPerPiece',
      'time_missing',
      'The operation takes no time. Write Set-up hours or Minutes per piece.',
    );
  }
  if (operationId === undefined || operationId === null) return null;
  const ownMachine = draft.tables.operation.get(operationId)?.values['defaultMachineId'] ?? null;
  const machineId = row.machine === null ? ownMachine : draft.findMachine('estimates', row, row.machine);
  if (machineId === undefined) return null;
  const isKept = at.kept?.['operationId'] === operationId && at.kept['machineId'] === machineId;
  const kept = isKept ? at.kept : undefined;
  const pieces = row.pieces ?? kept?.['pieces'] ?? at.job?.['quantity'] ?? null;
  if (pieces === null) {
    return read.refuse(
      'pieces',
      'pieces_missing',
      `Job ${row.job} has no quantity. Write Pieces here, or Quantity on sheet Jobs.`,
    );
  }
  const { defaults, on } = at;
  const labourRate = read.rate(
    'labourRate',
    kept,
    () => defaults.labourRate(on),
    'Nobody who works here has a wage',
  );
  const overheadRate = read.rate(
    'overheadRate',
    kept,
    () => defaults.overheadRate(on),
    'There is no overhead rate',
  );
  const machineHourRate =
    machineId === null
      ? noMachineRate(read)
      : read.rate(
          'machineHourRate',
          kept,
          () => defaults.machineHourRate(String(machineId), on),
          'The machine has no rate',
        );
  if (labourRate === undefined || overheadRate === undefined || machineHourRate === undefined) return null;
  return {
    operationId,
    machineId,
    setupHours,
    minutesPerPiece,
    pieces,
    labourRate,
    machineHourRate,
    overheadRate,
  };
}

function noMachineRate({ row, refuse }: LineReader): null | undefined {
  if (row.machineHourRate === null) return null;
  refuse(
    'machineHourRate',
    'cell_out_of_place',
    'The operation runs on no machine. Write the Machine, or empty this cell.',
  );
  return undefined;
}

function toMaterial(read: LineReader): RegisterValues | null {
  const { row, draft, at } = read;
  const materialId =
    row.material === null ? read.missing('material') : draft.findMaterial('estimates', row, row.material);
  const weightKg = row.weightKg === null ? read.missing('weightKg') : read.decimal('weightKg', 'weight');
  if (materialId === undefined || materialId === null || weightKg === null) return null;
  const kept = at.kept?.['materialId'] === materialId ? at.kept : undefined;
  // What is wrong with the stock has been said; that it has no average then would be news of the same.
  if (row.pricePerKg === null && !kept && !isStockKnown(draft)) return null;
  const average = () => at.defaults.pricePerKg(materialId, at.on);
  const pricePerKg = read.rate('pricePerKg', kept, average, `No ${row.material} had come in`);
  return pricePerKg === undefined ? null : { materialId, weightKg, pricePerKg };
}

function toOutside(read: LineReader): RegisterValues | null {
  const amount = read.row.amount === null ? read.missing('amount') : read.decimal('amount', 'money');
  return amount === null ? null : { amount };
}

type Column = Exclude<keyof EstimateRow, 'row' | 'cells'>;

/** Reads the cells of one line. */
class LineReader {
  constructor(
    readonly draft: SetupDraft,
    readonly row: EstimateRow,
    readonly at: LineSurroundings,
  ) {}

  readonly refuse = (column: Column, code: string, message: string): null => {
    this.draft.refuse('estimates', this.row, column, { code, message });
    return null;
  };

  missing(column: keyof typeof MISSING): null {
    return this.refuse(column, 'cell_missing', `A row of kind ${this.row.kind} needs ${MISSING[column]}.`);
  }

  decimal(
    column: 'setupHours' | 'minutesPerPiece' | 'weightKg' | 'amount',
    form: DecimalColumn['form'],
  ): string | null {
    return toStoredNumber(this.draft, this.row, { list: 'estimates', column, form }, this.row[column]);
  }

  /** As stated, else as the shop has it, else that of the day; undefined if there is none, which is refused. */
  rate(
    column: 'labourRate' | 'machineHourRate' | 'overheadRate' | 'pricePerKg',
    kept: RegisterValues | undefined,
    ofTheDay: () => string | null,
    why: string,
  ): string | undefined {
    const stated = this.row[column];
    if (stated !== null) {
      return (
        toStoredNumber(this.draft, this.row, { list: 'estimates', column, form: 'rate' }, stated) ?? undefined
      );
    }
    const rate = kept?.[column] ?? ofTheDay();
    if (typeof rate === 'string') return rate;
    this.refuse(
      column,
      'rate_missing',
      `${why} on ${formatLocalDate(toLocalDate(this.at.on))}. Write it here, or correct Estimated on.`,
    );
    return undefined;
  }
}

const MISSING = {
  operation: 'an Operation',
  material: 'a Material',
  weightKg: 'a Weight',
  amount: 'an Amount',
} as const;
