import { getClosedThrough } from '@brakeven/database';
import { type TestShop } from '@brakeven/test-shop';
import fc from 'fast-check';
import { runRollup } from './run-rollup';
import { computeExpectedCosts } from './testing/expected-costs';
import { applyChange } from './testing/apply-change';
import { someChanges } from './testing/random-changes';
import { createBareShop, createRatedShop } from './testing/random-shop';
import { readClosedLines, readStoredCosts, type StoredCosts, toStoredCosts } from './testing/stored-costs';

const RUNS = Number(process.env['FC_DB_RUNS'] ?? 25);
const now = () => new Date('2026-06-30T12:00:00Z');

async function computedCosts(shop: TestShop): Promise<StoredCosts> {
  return toStoredCosts(await computeExpectedCosts(shop));
}

/** What was in the books when each month was closed, until it is reopened. */
async function keepClosed(shop: TestShop, closed: Map<string, string>): Promise<void> {
  const through = await shop.inShop(getClosedThrough);
  for (const month of closed.keys()) if (through === null || month > through) closed.delete(month);
  if (through !== null && !closed.has(through)) closed.set(through, await readClosedLines(shop, through));
}

describe('the rollup of random shops', () => {
  it('equals costing to the cent after any changes, incremental and full alike', async () => {
    const seen = { lines: 0, gaps: 0, overtime: 0, material: 0, late: 0, closed: 0 };
    const property = fc.asyncProperty(fc.boolean(), someChanges, async (isRated, changes) => {
      const { shop, register } = await (isRated ? createRatedShop() : createBareShop());
      const rollUp = (full = false) => runRollup(shop.context('owner', { now }), { full });
      const closed = new Map<string, string>();
      try {
        for (const change of changes) {
          if (change.kind === 'closeMonth' || change.kind === 'rollUp') await rollUp();
          await applyChange(shop, register, change);
          await keepClosed(shop, closed);
        }
        await rollUp();
        const incremental = await readStoredCosts(shop);
        expect(incremental).toEqual(await computedCosts(shop));
        await rollUp(true);
        expect(await readStoredCosts(shop)).toEqual(incremental);
        for (const [month, books] of closed) expect(await readClosedLines(shop, month)).toBe(books);
        seen.lines += incremental.lines.length;
        seen.gaps += incremental.gaps.length;
        seen.overtime += countWord(incremental.lines, 'overtime');
        seen.material += countWord(incremental.lines, 'material');
        seen.late += incremental.lines.filter(isLate).length;
        seen.closed += closed.size;
      } finally {
        await shop.close();
      }
    });
    await fc.assert(property, { numRuns: RUNS });
    // Shops without lines, or without any of what is special, would prove nothing.
    expect(seen.lines).toBeGreaterThan(RUNS);
    expect(seen.gaps).toBeGreaterThan(RUNS);
    for (const kind of ['overtime', 'material', 'late', 'closed'] as const)
      expect(seen[kind]).toBeGreaterThan(3);
  }, 600_000);
});

const countWord = (lines: readonly string[], word: string): number =>
  lines.filter((line) => line.includes(` ${word} `)).length;

function isLate(line: string): boolean {
  const [postedOn, workedOn] = line.split(' ');
  return postedOn !== workedOn;
}
