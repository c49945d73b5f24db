import {
  AppError,
  type Die,
  type DieOpening,
  type FormingMachine,
  type Issue,
  type Punch,
} from '@brakeven/contract';
import { listMachineRows, type ShopTransaction } from '@brakeven/database';
import { toPlainText } from '../quantity-text';
import { readDies } from './dies';
import { readPunches } from './punches';

/** A press with what is set up in it. */
export interface SetupTools {
  machine: FormingMachine;
  punch: Punch | null;
  die: Die;
  opening: DieOpening;
}

/** Which press, and what in it; a press run need not name its punch. */
export interface SetupKeys {
  machineId: string;
  punchId: string | null;
  dieOpeningId: string;
}

/**
 * Reads a press and the tools named with it.
 * @throws AppError `invalid_input` naming each field: no such machine, tool, or a tool of another machine
 */
export async function readSetupTools(trx: ShopTransaction, keys: SetupKeys): Promise<SetupTools> {
  const issues: Issue[] = [];
  const add = (field: string, message: string) => issues.push({ field, code: 'unknown', message });
  const [row] = await listMachineRows(trx, keys.machineId);
  if (!row) add('machineId', 'There is no such machine. Choose one of the list.');
  const punches = await readPunches(trx);
  const punch = punches.find(({ punchId }) => punchId === keys.punchId) ?? null;
  if (keys.punchId !== null && punch?.machineId !== keys.machineId) {
    add('punchId', 'There is no such punch on this machine. Choose one of its punches.');
  }
  const die = (await readDies(trx)).find(({ openings }) =>
    openings.some(({ dieOpeningId }) => dieOpeningId === keys.dieOpeningId),
  );
  const opening = die?.openings.find(({ dieOpeningId }) => dieOpeningId === keys.dieOpeningId);
  if (die?.machineId !== keys.machineId) {
    add('dieOpeningId', 'There is no such opening on this machine. Choose an opening of its dies.');
  }
  if (issues.length > 0 || !row || !die || !opening) {
    throw new AppError('invalid_input', issues.map(({ message }) => message).join(' '), { issues });
  }
  return { machine: toFormingMachine(row), punch, die, opening };
}

/** A machine without money and dates, as forming needs it. */
export function toFormingMachine(row: Awaited<ReturnType<typeof listMachineRows>>[number]): FormingMachine {
  const { machineId, code, name, kind, ratedForceKn, bedLengthMm } = row;
  return {
    machineId,
    code,
    name,
    kind,
    ratedForceKn: toPlainText(ratedForceKn),
    bedLengthMm: toPlainText(bedLengthMm),
  };
}
