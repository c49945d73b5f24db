import { type CategoryVariance } from '@brakeven/contract';
import { type ShopFormat } from '@brakeven/ui';
import { D, type Decimal, formatHours, formatMass, formatMoney, massIn, toMass } from '@brakeven/values';

/** Why a category cost more or less than estimated, in words; empty where it did not. */
export function toVarianceWords(one: CategoryVariance, format: ShopFormat): string {
  if (D(one.variance).isZero()) return D(one.actual).isZero() ? '' : 'as estimated';
  if (D(one.actual).isZero()) return 'nothing spent';
  if (D(one.estimate).isZero() && one.category !== 'overtime') return 'not in the estimate';
  if (one.category === 'overtime') return 'overtime is not estimated';
  const words = [toQuantityWords(one, format), toRateWords(one, format)].filter((text) => text !== '');
  return words.join('; ');
}

function toQuantityWords(
  { category, estimatedQuantity, actualQuantity }: CategoryVariance,
  format: ShopFormat,
) {
  if (estimatedQuantity === null || actualQuantity === null) return '';
  const more = D(actualQuantity).minus(estimatedQuantity);
  if (more.isZero()) return '';
  const isMass = category === 'material';
  const amount = isMass
    ? formatMass(toMass(more.abs(), 'kg'), format.units)
    : `${formatHours(more.abs().toFixed(2))}\u00a0h`;
  return `${amount} ${more.gt(0) ? 'more' : 'less'}`;
}

function toRateWords(one: CategoryVariance, format: ShopFormat): string {
  if (one.category === 'outside') return D(one.variance).gt(0) ? 'dearer' : 'cheaper';
  const [before, now] = [
    toRate(one.estimate, one, 'estimatedQuantity', format),
    toRate(one.actual, one, 'actualQuantity', format),
  ];
  if (!before || !now) return '';
  const more = now.minus(before);
  if (more.abs().lt('0.005')) return '';
  const rate = `${formatMoney(more.abs().toFixed(2), format.currency)} per ${toUnit(one, format)}`;
  return `${rate} ${more.gt(0) ? 'dearer' : 'cheaper'}`;
}

function toUnit({ category }: CategoryVariance, { units }: ShopFormat): string {
  if (category !== 'material') return 'hour';
  return units === 'us' ? 'lb' : 'kg';
}

/** Amount ÷ quantity, only for the eye. */
function toRate(
  amount: string,
  one: CategoryVariance,
  side: 'estimatedQuantity' | 'actualQuantity',
  { units }: ShopFormat,
): Decimal | null {
  const quantity = one[side];
  if (quantity === null || !D(quantity).gt(0)) return null;
  const inPounds = one.category === 'material' && units === 'us';
  return D(amount).div(inPounds ? massIn(toMass(quantity, 'kg'), 'lb') : D(quantity));
}
