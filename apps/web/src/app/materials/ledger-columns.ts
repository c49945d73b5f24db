import { type StockMove, type StockMoveKind } from '@brakeven/contract';
import { type GridAction, type GridColumn } from '@brakeven/ui';
import { formatLength, toLength, type UnitSystem } from '@brakeven/values';
import { MASS_UNITS, toMassWords, toPriceWords } from './stock-text';

export const MOVE_WORDS: Readonly<Record<StockMoveKind, string>> = {
  lot: 'Received',
  issue: 'Issued',
  return: 'Returned',
};

/** What the columns depend on besides the rows. */
export interface LedgerView {
  units: UnitSystem;
  currency: string;
  withMoney: boolean;
  /** Voided moves have no value and no balance. */
  isVoided: boolean;
  actionsOf: ((move: StockMove) => readonly GridAction[]) | null;
}

/** The columns of a material's ledger. */
export function toLedgerColumns(view: LedgerView): GridColumn<StockMove>[] {
  const { units, withMoney, isVoided, actionsOf } = view;
  return [
    ...toWordColumns(units),
    ...(isVoided ? VOIDED : []),
    ...(withMoney && !isVoided ? toMoneyColumns(view) : []),
    ...(isVoided ? [] : toBalanceColumns(view)),
    ...(actionsOf ? [toActionColumn(actionsOf)] : []),
  ];
}

/** Sheets or pieces with their size: '10 sheets, 120 in × 48 in'. Empty for a weight as given. */
export function toSizeWords(
  move: Pick<StockMove, 'sheets' | 'pieces' | 'lengthMm' | 'widthMm'>,
  units: UnitSystem,
): string {
  const { sheets, pieces, lengthMm, widthMm } = move;
  const count = sheets ?? pieces;
  if (count === null) return '';
  const one = sheets === null ? 'piece' : 'sheet';
  const words = `${count.toLocaleString('en-US')} ${count === 1 ? one : `${one}s`}`;
  if (lengthMm === null || widthMm === null) return words;
  const [length, width] = [lengthMm, widthMm].map((mm) => formatLength(toLength(mm, 'mm'), units));
  return `${words}, ${length} × ${width}`;
}

function toWordColumns(units: UnitSystem): GridColumn<StockMove>[] {
  return [
    { id: 'movedOn', header: 'Date', kind: 'date', value: (move) => move.movedOn, width: 104 },
    {
      id: 'kind',
      header: 'Move',
      value: (move) => MOVE_WORDS[move.kind],
      tone: (move) => (move.kind === 'lot' ? 'blue' : null),
      width: 92,
    },
    {
      id: 'of',
      header: 'Lot or job',
      value: toSubject,
      href: (move) => (move.job ? `/jobs/${move.job.jobId}` : null),
      minWidth: 140,
      flex: 1,
    },
    {
      id: 'size',
      header: 'How much',
      value: (move) => [toSizeWords(move, units), move.note].filter(Boolean).join(' · '),
      minWidth: 176,
      flex: 2,
    },
    {
      id: 'weight',
      header: 'Weight',
      kind: 'number',
      value: (move) => toMassWords(move.weightKg, units),
      width: 102,
    },
  ];
}

function toSubject({ lot, job }: StockMove): string {
  if (job) return `${job.number} ${job.title}`;
  return [lot?.number, lot?.vendor].filter(Boolean).join(' · ');
}

function toMoneyColumns(view: LedgerView): GridColumn<StockMove>[] {
  return [
    {
      id: 'average',
      header: `Per ${MASS_UNITS[view.units]}`,
      kind: 'number',
      value: ({ averagePerKg }) => toPriceWords(averagePerKg, view),
      width: 92,
    },
    {
      id: 'amount',
      header: 'Amount',
      kind: 'money',
      value: (move) => move.amount,
      figure: (move) => (move.kind === 'lot' ? null : { figure: 'stock.issue', issueId: move.moveId }),
      width: 102,
    },
  ];
}

function toBalanceColumns({ units, withMoney }: LedgerView): GridColumn<StockMove>[] {
  const stock: GridColumn<StockMove> = {
    id: 'balance',
    header: 'Stock then',
    kind: 'number',
    value: ({ balanceKg }) => (balanceKg === null ? null : toMassWords(balanceKg, units)),
    width: 102,
  };
  const value: GridColumn<StockMove> = {
    id: 'value',
    header: 'Value then',
    kind: 'money',
    value: (move) => move.balanceAmount,
    width: 102,
  };
  return withMoney ? [stock, value] : [stock];
}

const VOIDED: readonly GridColumn<StockMove>[] = [
  { id: 'voidedBy', header: 'Voided by', value: (move) => move.voidedBy, minWidth: 120, flex: 1 },
];

function toActionColumn(actions: (move: StockMove) => readonly GridAction[]): GridColumn<StockMove> {
  return { id: 'actions', header: '', value: () => null, actions, width: 146 };
}
