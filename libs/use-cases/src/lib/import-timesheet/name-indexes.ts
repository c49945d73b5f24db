import { ALIAS_KINDS, type AliasChoice, type AliasKind, AppError } from '@brakeven/contract';
import { type AliasToSave, type TimesheetRegister } from '@brakeven/database';
import { type KnownName, normaliseName } from './near-matches';
import { createNameIndex, type NameIndex } from './resolve-name';

export type NameIndexes = Record<AliasKind, NameIndex>;

/**
 * Indexes of all names that a timesheet may use. Spellings chosen just now take the place of remembered ones.
 * @throws AppError `invalid_input` if a chosen spelling stands for nothing in this shop
 */
export function createNameIndexes(register: TimesheetRegister, chosen: readonly AliasChoice[]): NameIndexes {
  const known = listKnownNames(register);
  assertTargetsExist(known, chosen);
  const indexOf = (kind: AliasKind) => {
    const spellings = [...register.aliases, ...chosen].filter((alias) => alias.kind === kind);
    const aliases = spellings.map(({ spelling, targetId }) => [normaliseName(spelling), targetId] as const);
    return createNameIndex(kind, known[kind], new Map(aliases));
  };
  return {
    employee: indexOf('employee'),
    job: indexOf('job'),
    operation: indexOf('operation'),
    machine: indexOf('machine'),
  };
}

/** What has to be written to remember the chosen spellings; those remembered already are left out. */
export function listAliasesToSave(
  register: TimesheetRegister,
  chosen: readonly AliasChoice[],
): AliasToSave[] {
  const keyOf = ({ kind, spelling }: Pick<AliasChoice, 'kind' | 'spelling'>) =>
    `${kind}|${normaliseName(spelling)}`;
  const remembered = new Map(register.aliases.map((alias) => [keyOf(alias), alias]));
  const lastChoices = new Map(chosen.map((choice) => [keyOf(choice), choice]));
  return [...lastChoices].flatMap(([key, { kind, spelling, targetId }]) => {
    const before = remembered.get(key);
    if (before?.targetId === targetId) return [];
    return [{ aliasId: before?.aliasId ?? null, kind, spelling: spelling.trim(), targetId }];
  });
}

function listKnownNames(register: TimesheetRegister): Record<AliasKind, KnownName[]> {
  return {
    employee: register.employees.map(({ employeeId, number, name }) => ({
      targetId: employeeId,
      code: number,
      name,
    })),
    job: register.jobs.map(({ jobId, number, title }) => ({ targetId: jobId, code: number, name: title })),
    operation: register.operations.map(({ operationId, code, name }) => ({
      targetId: operationId,
      code,
      name,
    })),
    machine: register.machines.map(({ machineId, code, name }) => ({ targetId: machineId, code, name })),
  };
}

function assertTargetsExist(
  known: Record<AliasKind, readonly KnownName[]>,
  chosen: readonly AliasChoice[],
): void {
  const ids = new Map(
    ALIAS_KINDS.map((kind) => [kind, new Set(known[kind].map(({ targetId }) => targetId))]),
  );
  const issues = chosen.flatMap(({ kind, spelling, targetId }, index) => {
    if (normaliseName(spelling) !== '' && ids.get(kind)?.has(targetId)) return [];
    const message = `What was chosen for '${spelling}' is no ${kind} of this shop. Check the file again and choose anew.`;
    return [{ field: `aliases.${index}`, code: 'alias_target_unknown', message }];
  });
  if (issues[0]) throw new AppError('invalid_input', issues[0].message, { issues });
}
