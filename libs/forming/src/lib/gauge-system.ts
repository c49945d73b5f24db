import { type GaugeSystem } from './gauges';
import { findMaterial } from './materials';

/** Words of a grade or a name that settle the gauge system, the telling ones first: galvanized steel is galvanized. */
const WORDS: readonly (readonly [RegExp, GaugeSystem])[] = [
  [/galv|\ba-?653\b/i, 'galvanized'],
  [/stainless|\b(?:30[14]|316|321|4[013]0)l?\b/i, 'stainless'],
  [/alumini?um|\b[13567]\d{3}-[hto]\d*/i, 'aluminium'],
  [/steel|\ba-?(?:36|1011|1008|572)\b|\bs(?:235|275|355)/i, 'steel'],
];

/**
 * The gauge system that a material's gauges are of, from its grade and its name: those of a shipped material first,
 * then telling words such as `galv`. Null if none of the texts says what it is made of.
 */
export function findGaugeSystem(texts: readonly string[]): GaugeSystem | null {
  const shipped = texts.map((text) => findMaterial(text)).find((material) => material !== undefined);
  if (shipped) return shipped.gaugeSystem;
  const joined = texts.join(' ');
  return WORDS.find(([words]) => words.test(joined))?.[1] ?? null;
}
