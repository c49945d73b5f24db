import { type Decimal, type DecimalInput, D } from '@brakeven/values';
import { roundFraction } from './round-fraction';

/**
 * Indicators of ISO 22400-2:2014 that a shop's own rows can give, each one part ÷ whole, with the standard's letters
 * in brackets. Setting up counts as busy time; breaks do not count as presence.
 */
export const INDICATORS = {
  workerEfficiency: { part: 'hours worked on jobs (APWT)', whole: 'hours present without breaks (APAT)' },
  allocationRatio: {
    part: 'hours the machine was busy (AUBT)',
    whole: 'hours from start to end of the job (AOET)',
  },
  allocationEfficiency: { part: 'hours the machine was busy (AUBT)', whole: 'planned busy hours (PBT)' },
  utilizationEfficiency: { part: 'hours of making parts (APT)', whole: 'hours the machine was busy (AUBT)' },
  setupRatio: { part: 'hours of setting up (AUST)', whole: 'hours of making parts and setting up (AUPT)' },
  qualityRatio: { part: 'good pieces (GQ)', whole: 'pieces produced (PQ)' },
  scrapRatio: { part: 'scrapped pieces (SQ)', whole: 'pieces produced (PQ)' },
  plannedScrapRatio: { part: 'scrapped pieces (SQ)', whole: 'planned scrap (PSQ)' },
  fallOffRatio: { part: 'scrapped pieces (SQ)', whole: 'pieces produced by the first operation (PQ)' },
} as const;

/** The name of an indicator. */
export type IndicatorName = keyof typeof INDICATORS;

/**
 * One indicator: part ÷ whole, six decimals, half-up. Null if the whole is 0, since there is nothing to take a share
 * of. Source: ISO 22400-2:2014.
 * @throws RangeError if either is below 0.
 */
export function computeIndicator(
  name: IndicatorName,
  part: DecimalInput,
  whole: DecimalInput,
): Decimal | null {
  const [numerator, denominator] = [D(part), D(whole)];
  if (numerator.lt(0)) throw new RangeError(`Give ${INDICATORS[name].part} of 0 or more.`);
  if (denominator.lt(0)) throw new RangeError(`Give ${INDICATORS[name].whole} of 0 or more.`);
  return denominator.isZero() ? null : roundFraction(numerator, denominator, 6);
}
