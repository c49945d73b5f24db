import { createTestShop, type TestShop } from '@brakeven/test-shop';
import { createDie, deleteDie, updateDie } from './dies';
import { createPunch, deletePunch, updatePunch } from './punches';
import {
  createFormingMaterial,
  deleteFormingMaterial,
  deleteShopGauge,
  getFormingReference,
  updateForceLine,
  updateFormingMaterial,
  updateShopGauge,
} from './reference';
import { readShopGauges, toGaugeFinder, toRuleMaterial } from './shop-materials';

let shop: TestShop;
let machineId: string;
beforeEach(async () => {
  shop = await createTestShop();
  machineId = await shop.addMachine({ ratedForceKn: '533.7865', bedLengthMm: '1828.8' });
});
afterEach(() => shop.close());

const punch = { name: 'P1', noseRadiusMm: '0.8', angle: '85', lengthMm: '835', forceLimitKnPerM: '600' };
const opening = { openingMm: '25.4', angle: '85', shoulderRadiusMm: '2' };
const die = { name: 'D1', lengthMm: '835', forceLimitKnPerM: null, openings: [opening] };
const plate = {
  name: 'Wear plate',
  gaugeSystem: 'steel' as const,
  tensileMinMpa: '1200',
  tensileUsedMpa: '1400',
  tensileSource: 'Mill certificate',
  densityKgM3: '7850',
  densitySource: 'Mill certificate',
  radiusPerOpening: '0.2',
  radiusSource: 'Measured',
};

describe('what bends are computed from', () => {
  it('begins with what is shipped and with presses before other machines', async () => {
    const sawId = await shop.addMachine({ code: 'A1' });
    const reference = await getFormingReference(shop.context('operator'));
    expect(reference.machines.map((machine) => machine.machineId)).toEqual([machineId, sawId]);
    expect(reference).toMatchObject({ forceLinePercent: '80', gauges: [], punches: [], dies: [] });
    expect(reference.materials).toContainEqual(
      expect.objectContaining({ code: 'mild-steel', tensileUsedMpa: '413.68544', origin: 'shipped' }),
    );
    expect(reference.materials.map(({ code }) => code)).not.toContain('wear-plate');
  });

  it('has materials of the shop’s own, and shipped ones as the shop has changed them', async () => {
    const context = shop.context('lead');
    const own = await createFormingMaterial(context, { code: 'wear-plate', ...plate });
    expect(own).toEqual({ code: 'wear-plate', aliases: [], origin: 'own', ...plate });
    await expect(createFormingMaterial(context, { code: 'wear-plate', ...plate })).rejects.toMatchObject({
      code: 'conflict',
      issues: [{ field: 'code' }],
    });
    await expect(createFormingMaterial(context, { code: '304', ...plate })).rejects.toMatchObject({
      code: 'conflict',
    });
    const changed = await updateFormingMaterial(context, { code: 'a36' }, plate);
    expect(changed).toMatchObject({ code: 'a36', origin: 'changed', tensileUsedMpa: '1400' });
    expect(toRuleMaterial(changed).tensileUsed.toNumber()).toBe(1400);
    await deleteFormingMaterial(context, { code: 'a36' });
    await deleteFormingMaterial(context, { code: 'wear-plate' });
    const { materials } = await getFormingReference(context);
    expect(materials.every(({ origin }) => origin === 'shipped')).toBe(true);
    await expect(deleteFormingMaterial(context, { code: 'a36' })).rejects.toMatchObject({
      code: 'not_found',
    });
    await expect(updateFormingMaterial(context, { code: 'cheese' }, plate)).rejects.toMatchObject({
      code: 'not_found',
    });
  });

  it('has gauges as the shop’s chart says', async () => {
    const context = shop.context('lead');
    const key = { system: 'stainless' as const, gauge: 10 };
    const body = { thicknessMm: '3.4036', source: 'Chart on the wall' };
    expect(await updateShopGauge(context, key, body)).toEqual({ ...key, ...body, origin: 'changed' });
    const own = await updateShopGauge(context, { system: 'steel', gauge: 2 }, body);
    expect(own.origin).toBe('own');
    const find = toGaugeFinder(await shop.inShop(readShopGauges));
    expect(find('stainless', 10)).toBeCloseTo(0.134, 10);
    expect(find('steel', 10)).toBe(0.1345);
    await deleteShopGauge(context, key);
    await expect(deleteShopGauge(context, key)).rejects.toMatchObject({ code: 'not_found' });
  });

  it('has the line that the shop keeps below', async () => {
    await updateForceLine(shop.context('owner'), { forceLinePercent: '72.5' });
    expect(await getFormingReference(shop.context())).toMatchObject({ forceLinePercent: '72.5' });
  });
});

describe('punches', () => {
  it('are kept for a machine, under a name of their own', async () => {
    const context = shop.context('lead');
    const added = await createPunch(context, { machineId }, punch);
    expect(added).toEqual({ ...punch, machineId, punchId: expect.any(String) });
    const { punchId } = added;
    await expect(createPunch(context, { machineId }, punch)).rejects.toMatchObject({
      code: 'conflict',
      issues: [{ field: 'name' }],
    });
    const otherId = await shop.addMachine();
    await createPunch(context, { machineId: otherId }, punch);
    const change = { ...punch, noseRadiusMm: '1.5', angle: null };
    expect(await updatePunch(context, { punchId }, change)).toMatchObject({
      noseRadiusMm: '1.5',
      angle: null,
    });
    await deletePunch(context, { punchId });
    await expect(updatePunch(context, { punchId }, punch)).rejects.toMatchObject({ code: 'not_found' });
    await expect(createPunch(context, { machineId: punchId }, punch)).rejects.toMatchObject({
      code: 'invalid_input',
      issues: [{ field: 'machineId' }],
    });
  });
});

describe('dies', () => {
  it('keep, change, gain and lose openings', async () => {
    const context = shop.context('lead');
    const added = await createDie(
      context,
      { machineId },
      { ...die, openings: [opening, { ...opening, openingMm: '12' }] },
    );
    expect(added.openings.map(({ openingMm }) => openingMm)).toEqual(['12', '25.4']);
    const [narrow, wide] = added.openings;
    const changed = await updateDie(
      context,
      { dieId: added.dieId },
      {
        ...die,
        openings: [
          { ...opening, dieOpeningId: wide?.dieOpeningId, shoulderRadiusMm: '3' },
          { ...opening, openingMm: '12.7' },
        ],
      },
    );
    expect(changed.openings).toMatchObject([
      { openingMm: '12.7' },
      { dieOpeningId: wide?.dieOpeningId, shoulderRadiusMm: '3' },
    ]);
    const strange = { ...die, openings: [{ ...opening, dieOpeningId: narrow?.dieOpeningId }] };
    await expect(updateDie(context, { dieId: added.dieId }, strange)).rejects.toMatchObject({
      code: 'not_found',
    });
    expect((await getFormingReference(context)).dies).toEqual([changed]);
  });

  it('and punches and materials have to stay while bends refer to them', async () => {
    const context = shop.context('lead');
    const { punchId } = await createPunch(context, { machineId }, punch);
    const { dieId, openings } = await createDie(context, { machineId }, die);
    await createFormingMaterial(context, { code: 'wear-plate', ...plate });
    const dieOpeningId = openings[0]?.dieOpeningId ?? '';
    await shop.inShop((trx) =>
      trx
        .insertInto('trialBend')
        .values({
          shopId: shop.shop.shopId,
          machineId,
          punchId,
          dieOpeningId,
          materialCode: 'wear-plate',
          thicknessMm: '3',
          depthMm: '12',
          measuredAngle: '90',
          bentBy: 'Test',
          bentOn: '2026-01-05',
        })
        .execute(),
    );
    const kept = { code: 'conflict', message: expect.stringContaining('1 trial bend') };
    await expect(deletePunch(context, { punchId })).rejects.toMatchObject(kept);
    await expect(deleteDie(context, { dieId })).rejects.toMatchObject(kept);
    await expect(deleteFormingMaterial(context, { code: 'wear-plate' })).rejects.toMatchObject(kept);
    const without = { ...die, openings: [{ ...opening, openingMm: '50' }] };
    await expect(updateDie(context, { dieId }, without)).rejects.toMatchObject(kept);
    await shop.inShop((trx) => trx.deleteFrom('trialBend').execute());
    await deleteDie(context, { dieId });
    expect((await getFormingReference(context)).dies).toEqual([]);
  });
});
