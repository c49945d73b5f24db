import { type FormingMachine, type FormingReference } from '@brakeven/contract';
import { type OwnedOpening, type OwnedPunch, type Press } from '@brakeven/forming';
import { type UnitSystem } from '@brakeven/values';
import { toSizeWords } from './forming-words';

/** An opening of a die, with what a drawing needs; its code is its id, or says that it was typed. */
export interface RackOpening extends OwnedOpening {
  /** The die it is on. */
  dieName: string;
  /** Null where it is not known. */
  shoulderRadiusMm: number | null;
}

/** A punch that stands in the rack. */
export interface RackPunch extends OwnedPunch {
  /** Its id. */
  code: string;
  name: string;
}

/** A press with the tooling kept for it. */
export interface PressTooling extends Press {
  machineId: string;
  code: string;
  name: string;
  punches: readonly RackPunch[];
  /** Narrowest first. */
  openings: readonly RackOpening[];
}

/** The machines that bend: with a rating, a bed or tools, or called a press. */
export function listPresses({ machines, punches, dies }: FormingReference): FormingMachine[] {
  const tools = new Set([...punches, ...dies].map(({ machineId }) => machineId));
  return machines.filter(
    ({ machineId, kind, ratedForceKn, bedLengthMm }) =>
      ratedForceKn !== null || bedLengthMm !== null || tools.has(machineId) || /press|brake/i.test(kind),
  );
}

/** The press to begin with: the strongest of those with a die. */
export function findFirstPress(presses: readonly PressTooling[]): PressTooling | undefined {
  const withDies = presses.filter(({ openings }) => openings.length > 0);
  const [strongest] = [...withDies].sort((a, b) => (b.ratedKn ?? 0) - (a.ratedKn ?? 0));
  return strongest ?? presses[0];
}

/** The presses of the shop, each with its own tooling. */
export function toPresses(reference: FormingReference): PressTooling[] {
  return listPresses(reference).map((machine) => ({
    machineId: machine.machineId,
    code: machine.code,
    name: machine.name,
    ratedKn: toNumber(machine.ratedForceKn),
    bedLengthMm: toNumber(machine.bedLengthMm),
    punches: reference.punches.filter(({ machineId }) => machineId === machine.machineId).map(toPunch),
    openings: reference.dies
      .filter(({ machineId }) => machineId === machine.machineId)
      .flatMap(toOpenings)
      .sort((a, b) => a.openingMm - b.openingMm),
  }));
}

function toPunch(punch: FormingReference['punches'][number]): RackPunch {
  return {
    code: punch.punchId,
    name: punch.name,
    noseRadiusMm: Number(punch.noseRadiusMm),
    angle: toNumber(punch.angle),
    ratedKnPerM: toNumber(punch.forceLimitKnPerM),
  };
}

function toOpenings(die: FormingReference['dies'][number]): RackOpening[] {
  return die.openings.map((opening) => ({
    code: opening.dieOpeningId,
    dieName: die.name,
    openingMm: Number(opening.openingMm),
    dieAngle: toNumber(opening.angle),
    shoulderRadiusMm: toNumber(opening.shoulderRadiusMm),
    lengthMm: toNumber(die.lengthMm),
    ratedKnPerM: toNumber(die.forceLimitKnPerM),
  }));
}

function toNumber(text: string | null): number | null {
  return text === null ? null : Number(text);
}

/** Shoulder radius to compute and draw with; about a twelfth of the opening where nobody has entered it. */
export function shoulderRadiusMm(opening: RackOpening): number {
  return opening.shoulderRadiusMm ?? opening.openingMm * USUAL_SHOULDER_SHARE;
}

const USUAL_SHOULDER_SHARE = 0.08;

/** An opening in a list: its width and its die. */
export function toOpeningWords({ openingMm, dieName }: RackOpening, units: UnitSystem): string {
  return `${toSizeWords(openingMm, units)} · ${dieName}`;
}
