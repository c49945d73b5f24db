import { parsePercent, parseRate, percentText, rateText } from '@brakeven/values';

/** A rate as typed ('$28.50') as it travels ('28.50'); what cannot be read goes as it is, for the server to refuse. */
export function toRateText(text: string): string {
  const parsed = parseRate(text);
  return parsed.ok ? rateText(parsed.value) : text;
}

/** A percentage as typed ('28 %') as it travels ('28.00'); likewise. */
export function toPercentText(text: string): string {
  const parsed = parsePercent(text);
  return parsed.ok ? percentText(parsed.value) : text;
}
