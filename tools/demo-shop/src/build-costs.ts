import {
  addDays,
  D,
  densityText,
  type LocalDate,
  lengthText,
  massIn,
  rateText,
  toDensity,
  toLength,
  toMass,
  toMoney,
  moneyText,
  toRate,
  toStress,
} from '@brakeven/values';
import { type SetupData } from '@brakeven/workbook';
import { KIND_COSTS, MATERIALS } from './cost-story';
import { type PlannedCosts } from './plan-costs';
import { planEstimate, SCRAP_ALLOWANCE_PERCENT, WANTED_MARGIN_PERCENT } from './plan-estimates';
import { type PlannedJob } from './plan-jobs';

type Costs = Pick<
  SetupData,
  'materials' | 'sheetLots' | 'issues' | 'outsideServices' | 'invoices' | 'estimates'
>;

/** Of so many jobs one has no estimate. */
const UNESTIMATED_EVERY = 11;
const FIRST_INVOICE = 6101;

/**
 * The sheets of the demo shop's workbook that say what jobs cost.
 *
 * @param options.isHistory without the lot whose papers came late
 */
export function buildCosts(
  firstMonday: LocalDate,
  jobs: readonly PlannedJob[],
  { lots, issues, services, invoices }: PlannedCosts,
  { isHistory }: { isHistory: boolean },
): Costs {
  const on = (day: number): LocalDate => addDays(firstMonday, day);
  return {
    materials: buildMaterials(),
    sheetLots: lots
      .filter(({ isBackdated }) => !(isHistory && isBackdated))
      .map(({ number, day, material, sheets, weight, dollars, freight }) => ({
        ...{ lot: number, material: MATERIALS[material].name, receivedOn: on(day), sheets },
        vendor: MATERIALS[material].vendor,
        sheetLengthMm: toMm(MATERIALS[material].sheetIn?.[0]),
        sheetWidthMm: toMm(MATERIALS[material].sheetIn?.[1]),
        weightKg: sheets === null ? weight.toFixed() : null,
        ...{ cost: toText(dollars), freight: toText(freight) },
      })),
    issues: issues.map(({ day, job, kind, material, pieces, weight, note }) => ({
      ...{ date: on(day), job: job.number, material: MATERIALS[material].name, kind, note },
      ...{ sheets: null, pieces },
      blankLengthMm: pieces === null ? null : toMm(KIND_COSTS[job.title]?.blankIn?.[0]),
      blankWidthMm: pieces === null ? null : toMm(KIND_COSTS[job.title]?.blankIn?.[1]),
      weightKg: pieces === null ? weight.toFixed() : null,
    })),
    outsideServices: services.map(({ day, job, vendor, description, dollars }) => ({
      ...{ date: on(day), job: job.number, vendor, description, amount: toText(dollars) },
    })),
    invoices: invoices.map(({ day, job, kind, dollars, description }, index) => ({
      ...{ number: String(FIRST_INVOICE + index), date: on(day), job: job.number },
      ...{ kind, description, amount: toText(dollars) },
    })),
    estimates: jobs
      .filter((_job, index) => index % UNESTIMATED_EVERY !== 0)
      .flatMap((job) => buildEstimate(job, on(job.openedWeek * 7 - 6))),
  };
}

function buildMaterials(): Costs['materials'] {
  return Object.values(MATERIALS).map((material) => ({
    name: material.name,
    grade: material.grade,
    form: material.form,
    thickness: material.thickness,
    densityKgM3: material.density && densityText(toDensity(material.density, 'g/cm³')),
    tensileStrengthMpa: toStress(material.strengthKsi, 'ksi').toFixed(3),
    recoveryPricePerKg: perKg(Number(material.recoveryPerLb)),
  }));
}

const BLANK_LINE = {
  estimatedOn: null,
  operation: null,
  machine: null,
  setupHours: null,
  minutesPerPiece: null,
  pieces: null,
  labourRate: null,
  machineHourRate: null,
  overheadRate: null,
  material: null,
  weightKg: null,
  pricePerKg: null,
  description: null,
  amount: null,
  scrapAllowancePercent: null,
  marginPercent: null,
} as const;

/** Rates are those of the day, pieces those of the job: both are left to the import. */
function buildEstimate(job: PlannedJob, estimatedOn: LocalDate): Costs['estimates'] {
  const estimate = planEstimate(job);
  const costs = KIND_COSTS[job.title];
  if (!estimate || !costs) return [];
  const line = { ...BLANK_LINE, job: job.number };
  const lines: Costs['estimates'] = [
    ...estimate.operations.map(({ operation, machine, setupHours, minutesPerPiece }) => ({
      ...{ ...line, kind: 'operation' as const, operation, machine },
      ...{ setupHours: setupHours.toFixed(4), minutesPerPiece: minutesPerPiece.toFixed(1) },
    })),
    {
      ...{ ...line, kind: 'material', material: MATERIALS[costs.material].name },
      ...{ weightKg: toMass(estimate.pounds, 'lb').toFixed(), pricePerKg: perKg(estimate.dollarsPerLb) },
    },
    ...(estimate.outside
      ? [
          {
            ...{ ...line, kind: 'outside' as const, description: estimate.outside.description },
            amount: toText(estimate.outside.dollars),
          },
        ]
      : []),
  ];
  const head = {
    estimatedOn,
    scrapAllowancePercent: SCRAP_ALLOWANCE_PERCENT.toFixed(2),
    marginPercent: WANTED_MARGIN_PERCENT.toFixed(2),
  };
  return lines.map((one, index) => (index === 0 ? { ...one, ...head } : one));
}

const toText = (dollars: number): string => moneyText(toMoney(dollars));
const toMm = (inches: string | undefined): string | null =>
  inches === undefined ? null : lengthText(toLength(inches, 'in'));
const KG_PER_LB = massIn(toMass(1, 'lb'), 'kg');
const perKg = (dollarsPerLb: number): string => rateText(toRate(D(dollarsPerLb).div(KG_PER_LB)));
