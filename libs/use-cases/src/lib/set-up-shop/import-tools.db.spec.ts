import { type SetupData } from '@brakeven/workbook';
import { getFormingReference } from '../manage-tooling/reference';
import { createSetupShop, NONE, type SetupShop } from './testing/setup-shop';

const GOOSENECK = {
  machine: 'P2',
  punch: 'Gooseneck',
  noseRadiusMm: '0.8',
  angle: '88',
  lengthMm: '835',
  forceLimitKnPerM: '600',
};
const BLOCK = {
  machine: 'P2',
  die: 'Block',
  openingMm: '25.4',
  angle: '85',
  shoulderRadiusMm: '2.5',
  lengthMm: '835',
  forceLimitKnPerM: '583.756117488',
};
const SIXTEEN = { ...BLOCK, openingMm: '16', lengthMm: null, forceLimitKnPerM: null };
const TOOLS: Partial<SetupData> = {
  punches: [GOOSENECK, { ...GOOSENECK, punch: 'Sharp', noseRadiusMm: '0', angle: null, lengthMm: null }],
  dies: [SIXTEEN, BLOCK, { ...BLOCK, die: 'Wide', openingMm: '50.8', shoulderRadiusMm: null }],
};

let shop: SetupShop;
beforeEach(async () => {
  shop = await createSetupShop();
});
afterEach(() => shop.close());

describe('importSetup with tools', () => {
  it('writes punches, and dies with all of their openings', async () => {
    const result = await shop.take(TOOLS);
    expect(result.problems).toEqual([]);
    expect(result.added).toMatchObject({ punches: 2, dies: 3 });
    const { punches, dies } = await getFormingReference(shop.context());
    expect(punches).toMatchObject([
      { name: 'Gooseneck', noseRadiusMm: '0.8', angle: '88', lengthMm: '835', forceLimitKnPerM: '600' },
      { name: 'Sharp', noseRadiusMm: '0', angle: null, lengthMm: null },
    ]);
    expect(dies).toMatchObject([
      {
        name: 'Block',
        lengthMm: '835',
        // 20 US tons per foot.
        forceLimitKnPerM: '583.75612',
        openings: [
          { openingMm: '16', angle: '85', shoulderRadiusMm: '2.5' },
          { openingMm: '25.4', angle: '85', shoulderRadiusMm: '2.5' },
        ],
      },
      { name: 'Wide', openings: [{ openingMm: '50.8', shoulderRadiusMm: null }] },
    ]);
  });

  it('adds nothing the second time, and changes what differs', async () => {
    await shop.take(TOOLS);
    const again = await shop.take(TOOLS);
    expect(again.added).toEqual(NONE);
    expect(again.changed).toEqual(NONE);
    expect(again.alreadyThere).toMatchObject({ punches: 2, dies: 3 });
    const changed = await shop.take({
      punches: [{ ...GOOSENECK, angle: '86', lengthMm: null }],
      dies: [
        { ...SIXTEEN, shoulderRadiusMm: '3' },
        { ...BLOCK, lengthMm: '1200' },
      ],
    });
    expect(changed.changed).toMatchObject({ punches: 1, dies: 2 });
    const { punches, dies } = await getFormingReference(shop.context());
    expect(punches[0]).toMatchObject({ angle: '86', lengthMm: '835' });
    expect(dies[0]).toMatchObject({
      lengthMm: '1200',
      openings: [{ shoulderRadiusMm: '3' }, { shoulderRadiusMm: '2.5' }],
    });
  });

  it.each<[string, Partial<SetupData>, string]>([
    [
      'a machine that is not there',
      { punches: [{ ...GOOSENECK, machine: 'P9' }] },
      'machine_unknown Punches!A2',
    ],
    ['a punch twice', { punches: [GOOSENECK, GOOSENECK] }, 'row_twice Punches!A3'],
    ['an opening out of range', { dies: [{ ...BLOCK, openingMm: '1001' }] }, 'out_of_range Dies!C2'],
    ['an opening twice', { dies: [BLOCK, BLOCK] }, 'row_twice Dies!A3'],
    [
      'a die with two lengths',
      { dies: [BLOCK, { ...SIXTEEN, lengthMm: '900' }] },
      'die_contradicted Dies!F3',
    ],
    ['an angle that is none', { dies: [{ ...BLOCK, angle: '180' }] }, 'angle_unreadable Dies!D2'],
  ])('is refused whole for %s', async (_, data, problem) => {
    expect(await shop.refuse(data)).toEqual([problem]);
  });
});
