import { type TestShop } from '@brakeven/test-shop';
import fc from 'fast-check';
import { runRollup } from './run-rollup';
import { computeExpectedCosts } from './testing/expected-costs';
import { applyChange, createBareShop, someChanges } from './testing/random-shop';
import { readStoredCosts, type StoredCosts, toStoredCosts } from './testing/stored-costs';

const RUNS = Number(process.env['FC_DB_RUNS'] ?? 25);
const now = () => new Date('2026-06-30T12:00:00Z');

async function computedCosts(shop: TestShop): Promise<StoredCosts> {
  return toStoredCosts(await computeExpectedCosts(shop));
}

describe('the rollup of random shops', () => {
  it('equals costing to the cent after any changes, incremental and full alike', async () => {
    let lines = 0;
    let gaps = 0;
    const property = fc.asyncProperty(someChanges, async (changes) => {
      const { shop, register } = await createBareShop();
      try {
        for (const change of changes) {
          await applyChange(shop, register, change);
          if (change.kind === 'rollUp') await runRollup(shop.context('owner', { now }), {});
        }
        await runRollup(shop.context('owner', { now }), {});
        const incremental = await readStoredCosts(shop);
        expect(incremental).toEqual(await computedCosts(shop));
        await runRollup(shop.context('owner', { now }), { full: true });
        expect(await readStoredCosts(shop)).toEqual(incremental);
        lines += incremental.lines.length;
        gaps += incremental.gaps.length;
      } finally {
        await shop.close();
      }
    });
    await fc.assert(property, { numRuns: RUNS });
    // Shops without lines would prove nothing.
    expect(lines).toBeGreaterThan(RUNS);
    expect(gaps).toBeGreaterThan(RUNS);
  }, 300_000);
});
