import { type Estimate, type EstimateCostFigures, type EstimateLineInput } from '@brakeven/contract';
import { computePriceForMargin, type EstimateCost } from '@brakeven/costing';
import { D, hoursText, moneyText, percentText, rateText, toPercent, toRate } from '@brakeven/values';
import { type CostedLine, type StoredEstimate } from './estimate-cost';

/** An estimate as it is sent, with what it comes to. */
export function toEstimate({ head, lines, cost }: StoredEstimate): Estimate {
  const margin = toPercent(head.marginPercent);
  return {
    estimatedOn: head.estimatedOn,
    scrapAllowancePercent: percentText(toPercent(head.scrapAllowancePercent)),
    marginPercent: percentText(margin),
    lines: lines.map(toLineInput),
    cost: toCostFigures(cost),
    priceForMargin: moneyText(computePriceForMargin(cost.total, margin)),
  };
}

/** What an estimate comes to, as text. */
export function toCostFigures({ figures, hours, total }: EstimateCost): EstimateCostFigures {
  return {
    hours: hoursText(hours),
    labour: moneyText(figures.labour.amount),
    overtime: moneyText(figures.overtime.amount),
    machine: moneyText(figures.machine.amount),
    overhead: moneyText(figures.overhead.amount),
    material: moneyText(figures.material.amount),
    outside: moneyText(figures.outside.amount),
    total: moneyText(total),
  };
}

/** A kept line as it may be saved again, without the database's trailing noughts. */
export function toLineInput(
  line: CostedLine & {
    operationId: string | null;
    machineId: string | null;
    materialId: string | null;
    description: string;
  },
): EstimateLineInput {
  const { description } = line;
  switch (line.kind) {
    case 'operation':
      return {
        kind: 'operation',
        operationId: line.operationId ?? '',
        machineId: line.machineId,
        setupHours: plain(line.setupHours),
        minutesPerPiece: plain(line.minutesPerPiece),
        pieces: line.pieces ?? 0,
        labourRate: rate(line.labourRate),
        machineHourRate: line.machineHourRate === null ? null : rate(line.machineHourRate),
        overheadRate: rate(line.overheadRate),
        description,
      };
    case 'material':
      return {
        kind: 'material',
        materialId: line.materialId ?? '',
        weightKg: plain(line.weightKg),
        pricePerKg: rate(line.pricePerKg),
        description,
      };
    case 'outside':
      return { kind: 'outside', amount: plain(line.amount), description };
  }
}

function rate(text: string | null): string {
  return rateText(toRate(present(text)));
}

function plain(text: string | null): string {
  return D(present(text)).toFixed();
}

/** The table's own check lets no line of a kind be without what the kind needs. */
function present(text: string | null): string {
  if (text === null) throw new Error('A line of an estimate lacks a number of its kind.');
  return text;
}
