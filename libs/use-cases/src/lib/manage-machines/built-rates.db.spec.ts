import { type MachineRateBasis } from '@brakeven/contract';
import { createTestShop, type TestShop } from '@brakeven/test-shop';
import { runRollup } from '../roll-up-costs/run-rollup';
import { createMachineBuiltRate, getMachineRate, updateMachineBuiltRate } from './built-rates';
import { createMachineRate, deleteMachineRate, updateMachineRate } from './machine-costs';
import { getMachineRecovery } from './machine-recovery';

let shop: TestShop;
let machineId: string;
beforeEach(async () => {
  shop = await createTestShop();
  machineId = await shop.addMachine({ code: 'P2', inServiceOn: '2026-01-05' });
});
afterEach(() => shop.close());

const now = () => new Date('2026-06-30T18:00:00Z');
const context = () => shop.context('owner', { now });

/** Of a year 4,200 + 1,620 + 1,200 + 300 + 900 = 8,220 over 1,600 h = 5.1375; of an hour 7.5 × 60 % × 0.14 = 0.63 + 1.20. */
const basis: MachineRateBasis = {
  price: '48000.00',
  salvage: '6000.00',
  lifeYears: '10',
  interestPercent: '6',
  floorAreaM2: '20',
  spaceCostPerM2Year: '60.00',
  insurancePerYear: '300.00',
  upkeepPerYear: '900.00',
  productiveHoursPerYear: '1600',
  powerKw: '7.5',
  loadPercent: '60',
  tariffPerKwh: '0.14',
  consumablesPerHour: '1.20',
};
const typed = {
  validFrom: '2026-01-01',
  machineHourRate: '18',
  chargeOutRate: '95.5',
  runningCostPerHour: '4.125',
};

describe('a machine-hour rate that is built', () => {
  it('is kept with what it was built from, and keeps the other rates of before', async () => {
    await createMachineRate(context(), { machineId }, typed);
    const { rates } = await createMachineBuiltRate(
      context(),
      { machineId },
      { validFrom: '2026-03-01', basis },
    );
    expect(rates?.[0]).toEqual({
      machineRateId: expect.any(String),
      validFrom: '2026-03-01',
      machineHourRate: '6.97',
      chargeOutRate: '95.50',
      runningCostPerHour: '4.125',
      basis,
    });
    expect(rates?.[1]).toMatchObject({
      ...typed,
      machineHourRate: '18.00',
      chargeOutRate: '95.50',
      basis: null,
    });
  });

  it('asks for the other rates where none hold before', async () => {
    const build = createMachineBuiltRate(context(), { machineId }, { validFrom: '2026-03-01', basis });
    await expect(build).rejects.toMatchObject({
      code: 'invalid_input',
      issues: [{ field: 'chargeOutRate' }, { field: 'runningCostPerHour' }],
    });
    expect(await shop.inShop((trx) => trx.selectFrom('machineRate').selectAll().execute())).toEqual([]);
  });

  it('is refused where rates from that day are there, and leaves nothing of itself', async () => {
    await createMachineRate(context(), { machineId }, typed);
    const build = createMachineBuiltRate(context(), { machineId }, { validFrom: typed.validFrom, basis });
    await expect(build).rejects.toMatchObject({ code: 'conflict', issues: [{ field: 'validFrom' }] });
    expect(await shop.inShop((trx) => trx.selectFrom('machineRateBasis').selectAll().execute())).toEqual([]);
  });

  it('can be opened again and built anew', async () => {
    const first = await createMachineBuiltRate(
      context(),
      { machineId },
      { validFrom: '2026-03-01', chargeOutRate: '95', runningCostPerHour: '4', basis },
    );
    const machineRateId = first.rates?.[0]?.machineRateId ?? '';
    const more = { ...basis, productiveHoursPerYear: '1000' };
    const again = await updateMachineBuiltRate(
      context(),
      { machineId, machineRateId },
      { validFrom: '2026-03-02', chargeOutRate: '98', basis: more },
    );
    expect(again.rates).toMatchObject([
      {
        validFrom: '2026-03-02',
        machineHourRate: '10.05',
        chargeOutRate: '98.00',
        runningCostPerHour: '4.00',
        basis: more,
      },
    ]);
  });

  it('counts as typed in once another rate is typed over it, and goes with its basis', async () => {
    const build = { validFrom: '2026-03-01', chargeOutRate: '95', runningCostPerHour: '4', basis };
    const { rates } = await createMachineBuiltRate(context(), { machineId }, build);
    const ids = { machineId, machineRateId: rates?.[0]?.machineRateId ?? '' };
    const same = {
      validFrom: '2026-03-01',
      machineHourRate: '6.970',
      chargeOutRate: '99',
      runningCostPerHour: '4',
    };
    expect((await updateMachineRate(context(), ids, same)).rates).toMatchObject([{ basis }]);
    const other = { ...same, machineHourRate: '7' };
    expect((await updateMachineRate(context(), ids, other)).rates).toMatchObject([{ basis: null }]);
    await updateMachineBuiltRate(context(), ids, build);
    expect((await deleteMachineRate(context(), ids)).rates).toEqual([]);
  });

  it('is told to programs with its parts, which add up to it before rounding', async () => {
    await createMachineRate(context(), { machineId }, typed);
    expect(await getMachineRate(context(), 'P2')).toMatchObject({ machineHourRate: '18.00', parts: null });
    await createMachineBuiltRate(context(), { machineId }, { validFrom: '2026-03-01', basis });
    expect(await getMachineRate(context(), 'P2')).toEqual({
      machine: 'P2',
      validFrom: '2026-03-01',
      machineHourRate: '6.97',
      chargeOutRate: '95.50',
      runningCostPerHour: '4.125',
      parts: {
        depreciation: '2.625',
        interest: '1.0125',
        space: '0.75',
        insurance: '0.1875',
        upkeep: '0.5625',
        power: '0.63',
        consumables: '1.20',
      },
    });
    await expect(getMachineRate(context(), 'P9')).rejects.toMatchObject({ code: 'not_found' });
  });
});

describe('recovery of fixed cost', () => {
  const addHours = async (days: readonly [workedOn: string, hours: string][]) => {
    const ids = {
      employeeId: await shop.addEmployee(),
      jobId: await shop.addJob(),
      operationId: await shop.addOperation(),
    };
    await shop.addEntries(days.map(([workedOn, hours]) => ({ ...ids, machineId, workedOn, hours })));
    await runRollup(context(), {});
  };

  it('holds hours really run against the planned ones, over the days with a built rate', async () => {
    await createMachineRate(context(), { machineId }, { ...typed, validFrom: '2026-02-01' });
    await createMachineBuiltRate(context(), { machineId }, { validFrom: '2026-03-01', basis });
    await addHours([
      ['2026-02-27', '8'],
      ['2026-03-02', '12'],
      ['2026-03-03', '12.5'],
      ['2026-03-31', '10'],
      ['2026-04-01', '5'],
    ]);
    const march = await getMachineRecovery(context(), { machineId, from: '2026-02-27', to: '2026-03-31' });
    // 8,220 × 31 ÷ 365 = 698.137; 34.5 × 5.1375 = 177.24375; 1,600 × 31 ÷ 365 = 135.89.
    expect(march).toEqual({
      from: '2026-02-27',
      to: '2026-03-31',
      daysCovered: 31,
      daysWithoutBasis: 2,
      plannedHours: '135.8900',
      actualHours: '34.5000',
      hoursWithoutBasis: '8.0000',
      fixedCost: '698.14',
      absorbed: '177.24',
      difference: '-520.90',
      outcome: 'under',
    });
  });

  it('leaves out days before service and days not rolled up', async () => {
    await createMachineBuiltRate(
      context(),
      { machineId },
      { validFrom: '2026-01-01', chargeOutRate: '95', runningCostPerHour: '4', basis },
    );
    const year = { machineId, from: '2026-01-01', to: '2026-12-31' };
    expect(await getMachineRecovery(context(), year)).toMatchObject({ from: null, daysCovered: 0 });
    await addHours([['2026-01-07', '20']]);
    expect(await getMachineRecovery(context(), year)).toMatchObject({
      from: '2026-01-05',
      to: '2026-01-07',
      daysCovered: 3,
      actualHours: '20.0000',
      outcome: 'over',
    });
  });
});
