import { type AliasKind } from '@brakeven/contract';
import { quoted } from '@brakeven/values';
import { groupBy } from '../group-by';
import {
  type ComparableName,
  findNearMatches,
  type KnownName,
  normaliseName,
  toComparableName,
} from './near-matches';

/** A name that may be meant, for the person to choose. */
export interface NameOffer {
  targetId: string;
  label: string;
}

/** What a spelling stands for, or why that cannot be said. */
export type NameResolution =
  { found: true; targetId: string } | { found: false; code: string; message: string; offers: NameOffer[] };

/** The names of one kind, ready for looking up. */
export interface NameIndex {
  kind: AliasKind;
  byCode: ReadonlyMap<string, readonly KnownName[]>;
  byName: ReadonlyMap<string, readonly KnownName[]>;
  aliases: ReadonlyMap<string, string>;
  comparable: readonly ComparableName[];
  /** A timesheet says the same few names over and over. */
  resolved: Map<string, NameResolution>;
  /** Spellings for which near matches were looked for. */
  searches: number;
}

/** A file whose names are all unknown has the wrong column mapped; offers for all of them would help nobody. */
const SEARCHES_MAX = 100;

const WORDS: Record<AliasKind, { noun: string; where: string; isNamed: boolean }> = {
  employee: { noun: 'employee', where: 'under People & rates', isNamed: true },
  job: { noun: 'job', where: 'under Jobs', isNamed: false },
  operation: { noun: 'operation', where: 'under Shop', isNamed: true },
  machine: { noun: 'machine', where: 'under Machines', isNamed: true },
};

/** Makes an index of one kind of names; `aliases` go from normalised spelling to what it stands for. */
export function createNameIndex(
  kind: AliasKind,
  known: readonly KnownName[],
  aliases: ReadonlyMap<string, string>,
): NameIndex {
  return {
    kind,
    byCode: groupBy(known, ({ code }) => normaliseName(code)),
    // A job's title is no name for it: two jobs may well be called 'Trench covers'.
    byName: WORDS[kind].isNamed ? groupBy(known, ({ name }) => normaliseName(name)) : new Map(),
    aliases,
    comparable: known.map(toComparableName),
    resolved: new Map(),
    searches: 0,
  };
}

/**
 * Says what a spelling stands for: a number or code first, then a name that only one has, then a remembered
 * spelling. Case and spaces do not matter. Of nothing that fits the nearest are offered, of several all.
 */
export function resolveName(index: NameIndex, spelling: string): NameResolution {
  const key = normaliseName(spelling);
  const before = index.resolved.get(key);
  if (before) return before;
  const resolution = lookUp(index, spelling, key);
  index.resolved.set(key, resolution);
  return resolution;
}

/** How a known name is shown: '12 · Dana Quill'. */
export function toNameLabel({ code, name }: KnownName): string {
  return name === '' || name === code ? code : `${code} · ${name}`;
}

function lookUp(index: NameIndex, spelling: string, key: string): NameResolution {
  const coded = index.byCode.get(key) ?? [];
  const exact = coded.find(({ code }) => code === spelling.trim());
  if (exact) return { found: true, targetId: exact.targetId };
  const fitting = coded.length > 0 ? coded : (index.byName.get(key) ?? []);
  const targetId = fitting.length === 1 ? fitting[0]?.targetId : index.aliases.get(key);
  if (targetId !== undefined) return { found: true, targetId };
  return fitting.length > 1 ? toAmbiguous(index, spelling, fitting) : toUnknown(index, spelling);
}

function toAmbiguous(index: NameIndex, spelling: string, fitting: readonly KnownName[]): NameResolution {
  const { noun } = WORDS[index.kind];
  const labels = fitting.map(toNameLabel).join(', ');
  const message = `More than one ${noun} is called ${quoted(spelling)}: ${labels}. Choose which one is meant, or write the number or code in the sheet.`;
  return { found: false, code: `${index.kind}_ambiguous`, message, offers: fitting.map(toOffer) };
}

function toUnknown(index: NameIndex, spelling: string): NameResolution {
  const { noun, where } = WORDS[index.kind];
  index.searches += 1;
  const near = index.searches <= SEARCHES_MAX ? findNearMatches(spelling, index.comparable) : [];
  const choose = near.length > 0 ? `Choose the ${noun} that is meant` : 'Correct the spelling';
  const message = `No ${noun} is known as ${quoted(spelling)}. ${choose}, or add it ${where}, and check again.`;
  return { found: false, code: `${index.kind}_unknown`, message, offers: near.map(toOffer) };
}

function toOffer(known: KnownName): NameOffer {
  return { targetId: known.targetId, label: toNameLabel(known) };
}
