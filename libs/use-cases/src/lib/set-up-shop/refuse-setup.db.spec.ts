import { getSetupTemplate } from './get-setup-template';
import { importSetup } from './import-setup';
import {
  COUNTS,
  createSetupShop,
  DANA,
  FEBRUARY,
  GUARDS,
  JANUARY,
  NONE,
  NOTHING,
  PRESS_RATE,
  PRICE,
  type SetupShop,
} from './testing/setup-shop';

describe('importSetup, when something stands in the way', () => {
  let shop: SetupShop;
  beforeEach(async () => {
    shop = await createSetupShop();
  });
  afterEach(() => shop.close());

  it('refuses references to nothing, all of them by cell, and writes nothing', async () => {
    const refused = await shop.refuse({
      operations: [{ code: 'FORM', name: 'Forming', machine: 'P9' }],
      machineCosts: [{ ...PRICE, machine: 'P9' }],
      machineRates: [{ ...PRESS_RATE, machine: 'P9' }],
      jobs: [{ ...GUARDS, customer: 'Nobody' }],
    });
    expect(refused.map((problem) => problem.replace(/\d+$/, ''))).toEqual([
      'machine_unknown Machine costs!A',
      'machine_unknown Machine rates!A',
      'machine_unknown Operations!C',
      'customer_unknown Jobs!B',
    ]);
  });

  it('refuses one number with two names, and two rates from one day', async () => {
    expect(await shop.refuse({ people: [DANA, { ...DANA, name: 'Ivo Marsh', rateFrom: FEBRUARY }] })).toEqual(
      [expect.stringContaining('name_differs People!B')],
    );
    expect(await shop.refuse({ people: [DANA, { ...DANA, wagePerHour: '30.00' }] })).toEqual([
      expect.stringContaining('row_twice People!'),
    ]);
    expect(
      await shop.refuse({
        machineRates: [PRESS_RATE, { ...PRESS_RATE, machine: 'Press 2', chargeOutRate: '99.00' }],
      }),
    ).toEqual([expect.stringContaining('row_twice Machine rates!')]);
  });

  it('refuses numbers that cannot be kept', async () => {
    const refused = await shop.refuse({
      overhead: [{ validFrom: JANUARY, ratePerLabourHour: '100000000.00' }],
      jobs: [{ ...GUARDS, quantity: 0 }],
    });
    expect(refused).toEqual([
      expect.stringContaining('number_too_large Overhead!B'),
      expect.stringContaining('quantity_out_of_range Jobs!D'),
    ]);
  });

  it('warns of a person without a wage', async () => {
    const result = await shop.take({
      ...NOTHING,
      people: [{ number: '16', name: 'Olo Reed', rateFrom: null, wagePerHour: null, burdenPercent: null }],
    });
    expect(result.added.people).toBe(1);
    expect(result.problems).toMatchObject([{ code: 'wage_missing', severity: 'warning', sheet: 'People' }]);
  });

  it('changes nothing for an unedited template', async () => {
    const template = await getSetupTemplate(shop.context());
    const file = { name: template.fileName, bytes: template.bytes };
    const result = await importSetup(shop.context(), file, {}, shop.tools);
    expect(result).toEqual({ added: NONE, changed: NONE, alreadyThere: NONE, problems: [] });
  });

  it('sets up only the shop it is meant for', async () => {
    const other = await createSetupShop();
    await shop.take();
    await importSetup(other.context(), await shop.toFile({}), {}, shop.tools);
    expect((await shop.take()).alreadyThere).toEqual(COUNTS);
    const employees = await other.inShop((trx) => trx.selectFrom('employee').select('number').execute());
    expect(employees).toHaveLength(2);
    await other.close();
  });

  it('makes one of two equal imports at once', async () => {
    const both = await Promise.all([shop.take(), shop.take()]);
    expect(both.map(({ added }) => added.people).sort()).toEqual([0, 3]);
  });

  it('writes nothing when it is stopped in the middle', async () => {
    const before = await shop.countEvents();
    const stopping = {
      ...shop.tools,
      onProgress: ({ stage, done }: { stage: string; done: number }) => {
        if (stage === 'writing' && done === 5) throw new Error('the plug is pulled');
      },
    };
    await expect(importSetup(shop.context(), await shop.toFile({}), {}, stopping)).rejects.toThrow(
      'the plug is pulled',
    );
    expect(await shop.countEvents()).toBe(before);
  });
});
