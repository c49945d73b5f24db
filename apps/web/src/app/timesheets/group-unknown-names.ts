import { type AliasChoice, type AliasKind, type TimesheetProblem } from '@brakeven/contract';

/** A spelling that stands for nobody or nothing known, with every place it stands in. */
export interface UnknownName {
  kind: AliasKind;
  spelling: string;
  offers: { targetId: string; label: string }[];
  /** Rows of the sheet, in order. */
  rows: number[];
  firstCell: string;
}

/** What has been chosen for a spelling, with the words to show. */
export interface ChosenName extends AliasChoice {
  label: string;
}

/** Gathers the problems that are about the same spelling, so that it is settled once for all its rows. */
export function groupUnknownNames(problems: readonly TimesheetProblem[]): UnknownName[] {
  const names = new Map<string, UnknownName>();
  for (const { alias, cell, row } of problems) {
    if (!alias) continue;
    const key = `${alias.kind}\n${alias.spelling}`;
    const name = names.get(key) ?? { ...alias, offers: [...alias.offers], rows: [], firstCell: cell };
    if (row !== null && !name.rows.includes(row)) name.rows.push(row);
    names.set(key, name);
  }
  return [...names.values()];
}

/** Puts a choice in the place of an earlier one for the same spelling. */
export function withChosenName(chosen: readonly ChosenName[], name: ChosenName): ChosenName[] {
  return [...withoutChosenName(chosen, name), name];
}

/** Takes the choice for a spelling back. */
export function withoutChosenName(
  chosen: readonly ChosenName[],
  { kind, spelling }: Pick<ChosenName, 'kind' | 'spelling'>,
): ChosenName[] {
  return chosen.filter((other) => other.kind !== kind || other.spelling !== spelling);
}
