import { createTestShop, type TestShop } from '@brakeven/test-shop';
import { runCli, runJson } from './run-cli';

jest.setTimeout(60_000);

let shop: TestShop;
beforeAll(async () => {
  shop = await createTestShop();
  const jobId = await shop.addJob({ number: '1042', openedOn: '2026-03-01' });
  const materialId = await shop.addMaterial({ name: 'Mild steel 11 ga', grade: 'A1011 CS' });
  const weightKg = '453.59237';
  await shop.addLot({
    materialId,
    number: 'MM-7',
    receivedOn: '2026-03-02',
    weightKg,
    cost: '900',
    freight: '100',
  });
  await shop.addIssue({ materialId, jobId, issuedOn: '2026-03-04', weightKg: '45.359237' });
});
afterAll(() => shop.close());

const at = () => ['--shop', shop.shop.name];

describe('materials at the command line', () => {
  it('are listed with stock and value', async () => {
    const { code, json } = await runJson('materials', 'list', ...at());
    expect(code).toBe(0);
    expect(json).toMatchObject({
      materials: [{ name: 'Mild steel 11 ga', stockKg: '408.233133', stockValue: '900.00' }],
    });
    const { stdout } = await runCli(['materials', 'list', ...at()]);
    expect(stdout).toMatch(/Mild steel 11 ga\s+A1011 CS\s+900 lb\s+900\.00\s+2026-03-02/);
  });

  it('show their ledger, move by move, by name in any case', async () => {
    const { code, json } = await runJson('materials', 'ledger', 'mild steel 11 GA', ...at());
    expect(code).toBe(0);
    expect(json).toMatchObject({
      material: { name: 'Mild steel 11 ga' },
      moves: [
        { kind: 'lot', lot: { number: 'MM-7' }, amount: '1000.00', balanceKg: '453.59237' },
        { kind: 'issue', job: { number: '1042' }, amount: '-100.00', balanceAmount: '900.00' },
      ],
    });
    const { stdout } = await runCli(['materials', 'ledger', 'Mild steel 11 ga', ...at()]);
    expect(stdout).toMatch(/2026-03-04\s+issue\s+1042\s+−100 lb\s+-100\.00\s+900 lb\s+900\.00/);
  });

  it('are refused if there is none of the name', async () => {
    const { code, json } = await runJson('materials', 'ledger', 'Unobtainium', ...at());
    expect(code).toBe(1);
    expect(json).toMatchObject({
      error: { code: 'not_found', message: expect.stringContaining('Unobtainium') },
    });
  });
});
