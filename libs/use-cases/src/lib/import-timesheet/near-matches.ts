import { distance } from 'fastest-levenshtein';

/** Something that a spelling can stand for: its number or code, and its name. */
export interface KnownName {
  targetId: string;
  /** An employee's or job's number, an operation's or machine's code. */
  code: string;
  name: string;
}

/** A known name made ready for comparing with many spellings. */
export interface ComparableName {
  known: KnownName;
  /** Code and name as they are compared, and each without anything but letters and digits. */
  forms: readonly string[];
  words: readonly string[];
}

const OFFERS_MAX = 3;
/** Below this share of likeness an offer confuses more than it helps. */
const LIKENESS_MIN = 0.6;
const SPELLING_LENGTH_MAX = 80;

/** Case, width and spaces say nothing about who is meant. */
export function normaliseName(text: string): string {
  return text.normalize('NFKC').trim().replace(/\s+/g, ' ').toLowerCase();
}

/** Prepares a known name once, for all spellings it is compared with. */
export function toComparableName(known: KnownName): ComparableName {
  const [code, name] = [normaliseName(known.code), normaliseName(known.name)];
  const words = toWords(name);
  const sorted = [...words].sort().join(' ');
  return { known, words, forms: [...new Set([code, toBareCode(code), name, sorted])] };
}

/**
 * The known names most like a spelling, best first, at most three: by edit distance over code and name, by their
 * words in any order, with initials and beginnings of words counted ('D. Quill', 'Quill, Dana', 'J1041').
 */
export function findNearMatches(spelling: string, names: readonly ComparableName[]): KnownName[] {
  const given = normaliseName(spelling);
  if (given.length > SPELLING_LENGTH_MAX) return [];
  const words = toWords(given);
  const forms = [...new Set([given, toBareCode(given), [...words].sort().join(' ')])];
  return names
    .map((name) => ({
      known: name.known,
      likeness: Math.max(compareForms(forms, name), compareWords(words, name)),
    }))
    .filter(({ likeness }) => likeness >= LIKENESS_MIN)
    .sort((a, b) => b.likeness - a.likeness)
    .slice(0, OFFERS_MAX)
    .map(({ known }) => known);
}

function compareForms(forms: readonly string[], name: ComparableName): number {
  let best = 0;
  for (const form of forms) for (const other of name.forms) best = Math.max(best, likenessOf(form, other));
  return best;
}

/** Average over the spelling's words of the best they find; a name with more words than that is a little less like. */
function compareWords(words: readonly string[], name: ComparableName): number {
  if (words.length === 0 || words.length > name.words.length) return 0;
  const total = words.reduce(
    (sum, word) => sum + Math.max(0, ...name.words.map((other) => compareWord(word, other))),
    0,
  );
  const completeness = words.length === name.words.length ? 1 : 0.9;
  return (total / words.length) * completeness;
}

function compareWord(word: string, other: string): number {
  const isBeginning = (word.length === 1 || word.length >= 3) && other.startsWith(word);
  return isBeginning && word !== other ? 0.9 : likenessOf(word, other);
}

/** 1 for equal texts, 0 for texts with nothing in common; texts too different in length are not compared. */
function likenessOf(a: string, b: string): number {
  const longer = Math.max(a.length, b.length);
  if (longer === 0 || Math.min(a.length, b.length) / longer < LIKENESS_MIN) return 0;
  return 1 - distance(a, b) / longer;
}

function toWords(text: string): string[] {
  return text.split(/[^\p{L}\p{N}]+/u).filter((word) => word !== '');
}

/** `J-01041` and `j1041` are the same code to whoever types it. */
function toBareCode(code: string): string {
  return code.replace(/[^\p{L}\p{N}]+/gu, '').replace(/(?<!\p{N})0+(?=\p{N})/gu, '');
}
