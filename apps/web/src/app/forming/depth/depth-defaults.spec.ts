import { type TrialBendDto } from '@brakeven/contract';
import { sampleReference } from '../../testing/sample-reference';
import { toPresses } from '../press-tooling';
import { toDepthDefaults } from './depth-defaults';

const presses = toPresses(sampleReference());
const latest: TrialBendDto = {
  trialBendId: 'trial-1',
  machineId: 'm2',
  machine: 'Press 2',
  punchId: 'punch-1',
  punch: 'Long punch',
  noseRadiusMm: '1.5875',
  dieOpeningId: 'opening-3',
  die: 'Four-way block',
  openingMm: '31.75',
  shoulderRadiusMm: '2',
  materialCode: 's275jr',
  material: 'S275JR',
  thicknessMm: '4',
  stripWidthMm: null,
  depthMm: '10',
  measuredAngle: '92',
  isFullLength: false,
  bentBy: 'Jory Vance',
  bentOn: '2026-03-02',
  voidedAt: null,
  voidedBy: null,
};

describe('toDepthDefaults', () => {
  it('begins with the set-up of the latest trial bend', () => {
    expect(toDepthDefaults(presses, latest, 'us')).toMatchObject({
      machine: 'P2',
      punch: 'punch-1',
      opening: 'opening-3',
      material: 's275jr',
      thickness: '4 mm',
    });
  });

  it.each([
    ['nobody has bent yet', null],
    ['the press is gone', { ...latest, machineId: 'm9' }],
  ])('begins with the first tools of the strongest press when %s', (_, trial) => {
    expect(toDepthDefaults(presses, trial, 'metric')).toMatchObject({
      machine: 'P2',
      opening: 'opening-1',
      material: 'mild-steel',
      thickness: '3 mm',
    });
  });
});
