import { type BendFit, type FitRow, type Objection } from '@brakeven/forming';
import { type Tone } from '@brakeven/ui';
import { type UnitSystem } from '@brakeven/values';
import { toForceBand, toPercentWords, toSizeWords } from '../forming-words';

/** A verdict in a few words, and its tone. */
export interface VerdictTag {
  word: string;
  tone: Tone;
}

const SHORT: Readonly<Record<Objection, VerdictTag>> = {
  thickness_over_opening: { word: 'too thick', tone: 'loss' },
  over_rating: { word: 'over the rating', tone: 'loss' },
  too_long: { word: 'too long', tone: 'loss' },
  angle_too_sharp: { word: 'too sharp', tone: 'loss' },
  flange_too_short: { word: 'short flange', tone: 'loss' },
  over_line: { word: 'over the line', tone: 'plan' },
  no_rating: { word: 'no rating', tone: 'plan' },
  opening_narrow: { word: 'narrow', tone: 'plan' },
  opening_wide: { word: 'wide', tone: 'plan' },
};

/** How an opening does, gravest reason first. */
export function toVerdictTag(row: FitRow, isBest: boolean): VerdictTag {
  const [gravest] = row.objections;
  if (isBest) return { word: gravest ? 'best, with care' : 'use this one', tone: gravest ? 'plan' : 'good' };
  return gravest ? SHORT[gravest.code] : { word: 'fits', tone: 'blue' };
}

/** The answer in a sentence, before anything else is read. */
export function toFitSentence(fit: BendFit, pressName: string | null, units: UnitSystem): string {
  const best = fit.rows.find((row) => row.opening.code === fit.best);
  if (fit.rows.length === 0) return 'Enter a die, or type the openings to compare';
  if (!best)
    return pressName
      ? `It does not fit ${pressName} on any of these openings`
      : 'None of these openings will do';
  const opening = toSizeWords(best.opening.openingMm, units);
  const force = best.force && toForceBand(best.force.lowKn, best.force.highKn, units);
  const share = best.share === null ? '' : `, ${toPercentWords(best.share)} of the rating`;
  const lead = best.verdict === 'fits' ? 'It fits' : 'It can be tried with care';
  return `${lead}: use the ${opening} opening, ${force}${share}`;
}
