import { type ForceDistribution, type PressRunFilter } from '@brakeven/contract';
import { countRunsByShare, type ForceBin, getForceLinePercent } from '@brakeven/database';
import { inShopOf, type ShopContext } from '../context';
import { toPlainText } from '../quantity-text';

/** How the live press runs of a filter lie by the share of the rating that they used, in tenths. */
export function getForceDistribution(
  context: ShopContext,
  { aboveLine, search, ...filter }: PressRunFilter,
): Promise<ForceDistribution> {
  return inShopOf(context, async (trx) => {
    const bins = await countRunsByShare(trx, {
      ...filter,
      isAboveLine: aboveLine === 'true',
      search: search?.replaceAll('\0', ''),
      show: 'live',
    });
    const total = (of: 'runs' | 'strokes' | 'runsAboveLine' | 'strokesAboveLine') =>
      bins.reduce((sum, bin) => sum + bin[of], 0);
    const shares = bins.flatMap(({ highestShare }) => (highestShare === null ? [] : Number(highestShare)));
    return {
      forceLinePercent: toPlainText(await getForceLinePercent(trx)),
      runs: total('runs'),
      strokes: total('strokes'),
      runsAboveLine: total('runsAboveLine'),
      strokesAboveLine: total('strokesAboveLine'),
      runsWithoutRating: bins.find(({ tenth }) => tenth === null)?.runs ?? 0,
      highestShare: shares.length === 0 ? null : Math.max(...shares),
      bins: Array.from({ length: 11 }, (_, tenth) => toBin(tenth, bins)),
    };
  });
}

const ABOVE_RATING = 10;

function toBin(tenth: number, bins: readonly ForceBin[]): ForceDistribution['bins'][number] {
  const found = bins.find((bin) => bin.tenth === tenth);
  return {
    fromPercent: tenth * 10,
    toPercent: tenth === ABOVE_RATING ? null : (tenth + 1) * 10,
    runs: found?.runs ?? 0,
    strokes: found?.strokes ?? 0,
  };
}
