import fc from 'fast-check';
import { createTimesheetShop, toCsv, type TimesheetShop } from './testing/timesheet-shop';
import { undoImport } from './undo-import';

/** Rows that can be told apart, and rows that can not. */
const rowArbitrary = fc
  .tuple(
    fc.constantFrom('2026-02-23', '2026-02-24'),
    fc.constantFrom('FORM', 'WELD'),
    fc.constantFrom('', 'P2'),
    fc.constantFrom('0.25', '0.5'),
  )
  .map(([day, operation, machine, hours]) => ({
    text: `${day},12,J-1041,${operation},${machine},${hours},,,`,
    key: `${day} 12 J-1041 ${operation} ${machine || '-'} ${Number(hours).toFixed(4)}`,
  }));

type Row = { text: string; key: string };
type Step = { kind: 'import'; rows: Row[] } | { kind: 'undo'; nth: number };

const stepArbitrary: fc.Arbitrary<Step> = fc.oneof(
  {
    weight: 3,
    arbitrary: fc.record({
      kind: fc.constant('import' as const),
      rows: fc.array(rowArbitrary, { maxLength: 12 }),
    }),
  },
  { weight: 1, arbitrary: fc.record({ kind: fc.constant('undo' as const), nth: fc.nat(5) }) },
);

/** What a shop must hold, kept in the plainest way: each import with the keys it added. */
class Model {
  private readonly imports = new Map<string, string[]>();

  list(): string[] {
    return [...this.imports.values()].flat().sort();
  }

  findImport(nth: number): string | undefined {
    return [...this.imports.keys()][nth];
  }

  /** Keys of a file beyond those that are held. */
  findNew(rows: readonly Row[]): string[] {
    const held = this.list();
    return rows.flatMap(({ key }) => {
      const index = held.indexOf(key);
      if (index === -1) return [key];
      held.splice(index, 1);
      return [];
    });
  }

  add(importId: string, keys: string[]): void {
    this.imports.set(importId, keys);
  }

  undo(importId: string): string[] {
    const keys = this.imports.get(importId) ?? [];
    this.imports.delete(importId);
    return keys;
  }
}

async function runStep(shop: TimesheetShop, model: Model, step: Step): Promise<void> {
  if (step.kind === 'undo') {
    const importId = model.findImport(step.nth);
    if (importId === undefined) return;
    const keys = model.undo(importId);
    const hours = keys.reduce((total, key) => total + Number(key.split(' ').at(-1)), 0);
    expect(await undoImport(shop.bookkeeper, { importId })).toEqual({
      entriesVoided: keys.length,
      hoursVoided: hours.toFixed(4),
    });
    return;
  }
  const fresh = model.findNew(step.rows);
  const imported = await shop.take(toCsv(step.rows.map(({ text }) => text)));
  expect(imported).toMatchObject({
    rowsRead: step.rows.length,
    entriesAdded: fresh.length,
    alreadyThere: step.rows.length - fresh.length,
    refused: 0,
  });
  expect(imported.importId === null).toBe(fresh.length === 0);
  if (imported.importId !== null) model.add(imported.importId, fresh);
}

describe('importing and undoing in any order', () => {
  it('holds what a plain list of the imports holds, and every file twice is every file once', async () => {
    await fc.assert(
      fc.asyncProperty(fc.array(stepArbitrary, { minLength: 1, maxLength: 8 }), async (steps) => {
        const shop = await createTimesheetShop();
        const model = new Model();
        try {
          for (const step of steps) {
            await runStep(shop, model, step);
            if (step.kind === 'import') await runStep(shop, model, step);
            expect(await shop.listEntries()).toEqual(model.list());
          }
        } finally {
          await shop.close();
        }
      }),
      { numRuns: 12 },
    );
  }, 60_000);
});
