import { type Generated } from 'kysely';
import { type Instant, type InstantOrNull, type Json, type Numeric } from './table-columns';

/** A material of the shop's own, or one that is shipped with figures of the shop's own. */
export interface FormingMaterialTable {
  shopId: string;
  code: string;
  name: string;
  gaugeSystem: 'steel' | 'galvanized' | 'stainless' | 'aluminium';
  tensileMinMpa: Numeric | null;
  tensileUsedMpa: Numeric;
  tensileSource: string;
  densityKgM3: Numeric;
  densitySource: string;
  radiusPerOpening: Numeric;
  radiusSource: string;
}

export interface ShopGaugeTable {
  shopId: string;
  system: FormingMaterialTable['gaugeSystem'];
  gauge: number;
  thicknessMm: Numeric;
  source: string;
}

export interface PunchTable {
  shopId: string;
  punchId: Generated<string>;
  machineId: string;
  name: string;
  noseRadiusMm: Numeric;
  angle: Numeric | null;
  lengthMm: Numeric | null;
  forceLimitKnPerM: Numeric | null;
}

export interface DieTable {
  shopId: string;
  dieId: Generated<string>;
  machineId: string;
  name: string;
  lengthMm: Numeric | null;
  forceLimitKnPerM: Numeric | null;
}

export interface DieOpeningTable {
  shopId: string;
  dieOpeningId: Generated<string>;
  dieId: string;
  openingMm: Numeric;
  angle: Numeric | null;
  shoulderRadiusMm: Numeric | null;
}

export interface TrialBendTable {
  shopId: string;
  trialBendId: Generated<string>;
  machineId: string;
  punchId: string;
  dieOpeningId: string;
  materialCode: string;
  thicknessMm: Numeric;
  stripWidthMm: Numeric | null;
  /** The reading of the ram; it grows as the ram goes down, its zero is the machine's own. */
  depthMm: Numeric;
  /** Inside angle in degrees. */
  measuredAngle: Numeric;
  isFullLength: Generated<boolean>;
  bentBy: string;
  bentOn: string;
  createdAt: Instant;
  voidedAt: InstantOrNull;
  voidedBy: string | null;
}

export interface DepthCardTable {
  shopId: string;
  machineId: string;
  /** Inside angles in degrees. */
  angles: Json<number[]>;
}

export interface DepthCardSheetTable {
  shopId: string;
  machineId: string;
  position: number;
  materialCode: string;
  thicknessMm: Numeric;
  punchId: string;
  dieOpeningId: string;
}

export interface PressRunTable {
  shopId: string;
  pressRunId: Generated<string>;
  jobId: string;
  machineId: string;
  punchId: string | null;
  dieOpeningId: string;
  materialCode: string;
  thicknessMm: Numeric;
  bendLengthMm: Numeric;
  strokes: number;
  pieces: number;
  /** As computed when the run was logged. */
  forceLowKn: Numeric;
  forceHighKn: Numeric;
  /** As the press's gauge showed it. */
  highestForceKn: Numeric | null;
  runOn: string;
  isGood: Generated<boolean>;
  note: string | null;
  entryId: string | null;
  loggedBy: string;
  loggedByUserId: string | null;
  createdAt: Instant;
  voidedAt: InstantOrNull;
  voidedBy: string | null;
  /** The first row that this one took the place of. */
  corrects: string | null;
}
