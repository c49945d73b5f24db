import { type SetupSheet } from '@brakeven/contract';
import { checkFigure, type RangeName } from '@brakeven/forming';
import { type SetupFile, type SetupRowSource } from '@brakeven/workbook';
import { type SetupDraft } from './setup-draft';
import { toStoredNumber } from './stored-number';
import { listStated } from './table-plan';

/** Punches by machine and name; what a row leaves blank stays as the shop has it. */
export function planPunches(draft: SetupDraft, rows: SetupFile['punches']): void {
  for (const row of rows) {
    const machineId = draft.findMachine('punches', row, row.machine);
    if (machineId === undefined) continue;
    const key = `${machineId}|${row.punch}`;
    if (draft.tables.punch.hasStated(key)) {
      draft.refuseTwice('punches', row, 'punch', `Punch ${row.punch} of ${row.machine}`);
      continue;
    }
    const figure = toFigure(draft, 'punches', row);
    const stated = listStated({
      noseRadiusMm: figure('noseRadiusMm', row.noseRadiusMm, 'radiusMm'),
      angle: toAngle(draft, 'punches', row),
      lengthMm: figure('lengthMm', row.lengthMm, 'lengthMm'),
      forceLimitKnPerM: figure('forceLimitKnPerM', row.forceLimitKnPerM, 'ratingKn'),
    });
    const defaults = { machineId, name: row.punch, angle: null, lengthMm: null, forceLimitKnPerM: null };
    draft.count('punches', draft.tables.punch.state(key, stated, defaults).verdict);
  }
}

/** Openings, each with the die that it is on; a die's length and force limit may stand on any of its rows. */
export function planDies(draft: SetupDraft, rows: SetupFile['dies']): void {
  const dies = new Map<string, DieStated>();
  for (const row of rows) {
    const machineId = draft.findMachine('dies', row, row.machine);
    if (machineId === undefined) continue;
    const figure = toFigure(draft, 'dies', row);
    const die = stateDie(draft, dies, row, machineId, {
      lengthMm: figure('lengthMm', row.lengthMm, 'lengthMm'),
      forceLimitKnPerM: figure('forceLimitKnPerM', row.forceLimitKnPerM, 'ratingKn'),
    });
    const openingMm = figure('openingMm', row.openingMm, 'openingMm');
    if (openingMm === null) continue;
    const key = `${die.dieId}|${openingMm}`;
    if (draft.tables.dieOpening.hasStated(key)) {
      draft.refuseTwice('dies', row, 'openingMm', `This opening of die ${row.die}`);
      continue;
    }
    const stated = listStated({
      angle: toAngle(draft, 'dies', row),
      shoulderRadiusMm: figure('shoulderRadiusMm', row.shoulderRadiusMm, 'radiusMm'),
    });
    const defaults = { dieId: die.dieId, openingMm, angle: null, shoulderRadiusMm: null };
    const { verdict } = draft.tables.dieOpening.state(key, stated, defaults);
    draft.count('dies', verdict === 'alreadyThere' && die.isChanged ? 'changed' : verdict);
  }
}

interface DieFigures {
  lengthMm: string | null;
  forceLimitKnPerM: string | null;
}

/** A die as the rows so far have stated it. */
interface DieStated extends DieFigures {
  dieId: string;
  /** Whether the last of them says something else than the shop has. */
  isChanged: boolean;
}

type DieRow = SetupFile['dies'][number];

function stateDie(
  draft: SetupDraft,
  dies: Map<string, DieStated>,
  row: DieRow,
  machineId: string,
  figures: DieFigures,
): DieStated {
  const key = `${machineId}|${row.die}`;
  const existingId = draft.tables.die.findId(key);
  const above = existingId === undefined ? undefined : dies.get(existingId);
  if (above) refuseContradiction(draft, row, above, figures);
  const defaults = { machineId, name: row.die, lengthMm: null, forceLimitKnPerM: null };
  const { id, verdict } = draft.tables.die.state(key, listStated({ ...figures }), defaults);
  const stated: DieStated = {
    dieId: id,
    lengthMm: figures.lengthMm ?? above?.lengthMm ?? null,
    forceLimitKnPerM: figures.forceLimitKnPerM ?? above?.forceLimitKnPerM ?? null,
    isChanged: verdict === 'changed',
  };
  dies.set(id, stated);
  return stated;
}

function refuseContradiction(draft: SetupDraft, row: DieRow, above: DieStated, figures: DieFigures): void {
  for (const [column, words] of [
    ['lengthMm', 'length'],
    ['forceLimitKnPerM', 'force limit'],
  ] as const) {
    const [stated, other] = [figures[column], above[column]];
    if (stated === null || other === null || stated === other) continue;
    const message = `A row above gives die ${row.die} another ${words}. All openings of a die share it: write it once, or alike.`;
    draft.refuse('dies', row, column, { code: 'die_contradicted', message });
  }
}

type ToolSheet = Extract<SetupSheet, 'punches' | 'dies'>;

/** A figure as its column keeps it; null for a blank cell and for one out of range, which is refused in words. */
function toFigure(draft: SetupDraft, list: ToolSheet, row: SetupRowSource) {
  return (column: string, text: string | null, range: RangeName): string | null => {
    const stored = toStoredNumber(draft, row, { list, column, form: 'quantity' }, text);
    const [issue] = stored === null ? [] : checkFigure('This', Number(stored), range);
    if (!issue) return stored;
    draft.refuse(list, row, column, issue);
    return null;
  };
}

function toAngle(
  draft: SetupDraft,
  list: ToolSheet,
  row: SetupRowSource & { angle: string | null },
): string | null {
  return toStoredNumber(draft, row, { list, column: 'angle', form: 'angle' }, row.angle);
}
