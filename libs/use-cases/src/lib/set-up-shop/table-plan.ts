import { type RegisterRow, type RegisterValue, type RegisterValues } from '@brakeven/database';
import { v7 as newId } from 'uuid';
import { normaliseName } from '../import-timesheet/near-matches';

/** What a row of the workbook does to the shop. */
export type Verdict = 'added' | 'changed' | 'alreadyThere';

/** What is to become of one table: its rows as they are and will be, and what has to be written for that. */
export class TablePlan {
  readonly inserts: RegisterRow[] = [];
  /** Ids of rows whose place others take. */
  readonly voidedIds: string[] = [];
  readonly deletedIds: string[] = [];
  private readonly updates = new Map<string, RegisterRow>();
  private readonly rows = new Map<string, RegisterRow>();
  private readonly idsByKey = new Map<string, string>();
  private readonly idsByLooseKey = new Map<string, string>();
  private readonly statedIds = new Set<string>();

  /** @param keyOf what makes two rows the same, written as one text; case and spaces do not tell rows apart */
  constructor(
    existing: readonly RegisterRow[],
    private readonly keyOf: (values: RegisterValues) => string,
  ) {
    for (const row of existing) this.keep(row);
  }

  /** The id of the row with this key, stored or planned. */
  findId(key: string): string | undefined {
    return this.idsByKey.get(key) ?? this.idsByLooseKey.get(normaliseName(key));
  }

  get(id: string): RegisterRow | undefined {
    return this.rows.get(id);
  }

  /** The row with this key, stored or planned. */
  find(key: string): RegisterRow | undefined {
    return this.rows.get(this.findId(key) ?? '');
  }

  /** All rows as they will be. */
  listRows(): RegisterRow[] {
    return [...this.rows.values()];
  }

  listUpdates(): RegisterRow[] {
    return [...this.updates.values()];
  }

  /** Whether the workbook has stated the row with this key already. */
  hasStated(key: string): boolean {
    const id = this.findId(key);
    return id !== undefined && this.statedIds.has(id);
  }

  /**
   * Takes a row of the workbook in. `stated` are the columns it says something about; `defaults` fill the others
   * of a row that is new, and leave those of a row that is there alone.
   */
  state(
    key: string,
    stated: RegisterValues,
    defaults: RegisterValues = {},
  ): { id: string; verdict: Verdict } {
    const id = this.findId(key);
    const before = id === undefined ? undefined : this.rows.get(id);
    return before
      ? this.change(before, stated)
      : this.add({ id: newId(), values: { ...defaults, ...stated } });
  }

  /** Plans a new row, whatever rows are like it. */
  add(row: RegisterRow): { id: string; verdict: Verdict } {
    this.inserts.push(row);
    this.statedIds.add(row.id);
    this.keep(row);
    return { id: row.id, verdict: 'added' };
  }

  /** Plans what is stated for a row that is there; nothing if it says the same. */
  change(before: RegisterRow, stated: RegisterValues): { id: string; verdict: Verdict } {
    const { id } = before;
    this.statedIds.add(id);
    if (Object.entries(stated).every(([name, value]) => before.values[name] === value)) {
      return { id, verdict: 'alreadyThere' };
    }
    const row = { id, values: { ...before.values, ...stated } };
    this.updates.set(id, row);
    this.keep(row);
    return { id, verdict: 'changed' };
  }

  /**
   * Plans what is stated for a row that costs something: if one of the columns `costing` differs, the row is voided
   * and another takes its place; what is only words is changed where it stands.
   */
  restate(
    before: RegisterRow,
    stated: RegisterValues,
    costing: readonly string[],
  ): { id: string; verdict: Verdict } {
    const isSame = costing.every((name) => !(name in stated) || stated[name] === before.values[name]);
    if (isSame) return this.change(before, stated);
    this.voidedIds.push(before.id);
    this.rows.delete(before.id);
    const { id } = this.add({ id: newId(), values: { ...before.values, ...stated } });
    return { id, verdict: 'changed' };
  }

  /** Plans that a row goes. */
  remove({ id }: RegisterRow): void {
    this.deletedIds.push(id);
    this.rows.delete(id);
  }

  private keep(row: RegisterRow): void {
    const key = this.keyOf(row.values);
    this.rows.set(row.id, row);
    this.idsByKey.set(key, row.id);
    const likeId = this.idsByLooseKey.get(normaliseName(key));
    if (likeId === undefined || !this.rows.has(likeId)) this.idsByLooseKey.set(normaliseName(key), row.id);
  }
}

/** The columns of a row that say something: a blank cell leaves what the shop has. */
export function listStated(values: Readonly<Record<string, RegisterValue | undefined>>): RegisterValues {
  const stated = Object.entries(values).filter(([, value]) => value !== null && value !== undefined);
  return Object.fromEntries(stated) as RegisterValues;
}
