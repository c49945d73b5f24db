import { type TrialBendDto } from '@brakeven/contract';
import { type UnitSystem } from '@brakeven/values';
import { toSizeText } from '../forming-words';
import { findFirstPress, type PressTooling } from '../press-tooling';
import { type DepthTexts } from './depth-question';

/** What of the question is the set-up; it is another to begin with after the next trial bend. */
export const SETUP_TEXTS = ['machine', 'punch', 'opening', 'material', 'thickness'] as const;

/** The set-up to begin with: that of the latest trial bend, else the first tools of the strongest press. */
export function toDepthDefaults(
  presses: readonly PressTooling[],
  latest: TrialBendDto | null,
  units: UnitSystem,
): DepthTexts {
  const press = presses.find(({ machineId }) => machineId === latest?.machineId);
  if (press && latest) {
    return {
      machine: press.code,
      punch: latest.punchId,
      opening: latest.dieOpeningId,
      material: latest.materialCode,
      thickness: toSizeText(latest.thicknessMm, units),
      angle: '90',
      reading: '',
    };
  }
  const first = findFirstPress(presses);
  return {
    machine: first?.code ?? '',
    punch: first?.punches[0]?.code ?? '',
    opening: first?.openings[0]?.code ?? '',
    material: 'mild-steel',
    thickness: units === 'us' ? '10 ga' : '3 mm',
    angle: '90',
    reading: '',
  };
}
