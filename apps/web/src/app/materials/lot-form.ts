import { FormGroup, Validators } from '@angular/forms';
import { type Material, type SheetLotInput, type StockMove } from '@brakeven/contract';
import { computeLandedLotCost, roundFraction } from '@brakeven/costing';
import { D, moneyText, parseLength, parseMass, parseMoney, toMoney, type UnitSystem } from '@brakeven/values';
import { moreThanNought } from '../forms/more-than-nought';
import { parsedBy } from '../forms/parsed-by';
import { textControl } from '../forms/text-control';
import { parsePieces } from '../jobs/job-form';
import { LENGTH_UNITS, toLengthText, toMillimetres } from '../machines/quantity-text';
import { findFlatWeight, type FlatSize } from './flat-weight';
import { MASS_UNITS, toKilograms, toMassFieldText, toRatePerUnit } from './stock-text';

/** The lot as it stands in the ledger; null for one that is received now. */
export type LotMove = StockMove | null;

/** The fields of a lot as they are typed; a new one starts with the vendor and the sheets of the last. */
export function toLotForm(material: Material, lot: LotMove, today: string, units: UnitSystem) {
  const { lastLot } = material;
  const length = parsedBy(moreThanNought((text) => parseLength(text, LENGTH_UNITS[units])));
  return new FormGroup({
    receivedOn: textControl(lot?.movedOn ?? today, Validators.required),
    number: textControl(lot?.lot?.number, Validators.maxLength(40)),
    vendor: textControl(lot ? lot.lot?.vendor : lastLot?.vendor, Validators.maxLength(200)),
    sheets: textControl(lot?.sheets?.toString(), parsedBy(parsePieces)),
    sheetLengthMm: textControl(
      toLengthText(lot ? lot.lengthMm : (lastLot?.sheetLengthMm ?? null), units),
      length,
    ),
    sheetWidthMm: textControl(
      toLengthText(lot ? lot.widthMm : (lastLot?.sheetWidthMm ?? null), units),
      length,
    ),
    weightKg: textControl(
      toMassFieldText(findTypedWeight(material, lot), units),
      parsedBy(moreThanNought((text) => parseMass(text, MASS_UNITS[units]))),
    ),
    cost: textControl(lot?.lot?.cost, Validators.required, parsedBy(moreThanNought(parseMoney))),
    freight: textControl(lot?.lot?.freight, parsedBy(parseMoney)),
  });
}

export type LotForm = ReturnType<typeof toLotForm>;

/** The weight that somebody wrote, as against one worked out from the sheets. */
function findTypedWeight(material: Material, lot: LotMove): string | null {
  if (!lot) return null;
  const { sheets: count, lengthMm, widthMm, weightKg } = lot;
  return findFlatWeight(material, { count, lengthMm, widthMm }) === weightKg ? null : weightKg;
}

/** What the server takes. Without sheets their size says nothing and is left out. */
export function toLotInput(form: LotForm, lot: LotMove, units: UnitSystem): SheetLotInput {
  const value = form.getRawValue();
  const { count, lengthMm, widthMm } = readSheets(form, lot, units);
  return {
    receivedOn: value.receivedOn,
    number: value.number.trim() || null,
    vendor: value.vendor,
    sheets: count,
    sheetLengthMm: count === null ? null : lengthMm,
    sheetWidthMm: count === null ? null : widthMm,
    weightKg: toKilograms(value.weightKg, units, lot?.weightKg ?? null),
    cost: toMoneyText(value.cost),
    freight: value.freight.trim() === '' ? '0' : toMoneyText(value.freight),
  };
}

/** What the lot will weigh and cost by weight, in words; null as long as that cannot be said. */
export interface LotPreview {
  weightKg: string;
  isWorkedOut: boolean;
  /** Cost and freight per unit of weight of the shop; null without a cost. */
  landedPerUnit: string | null;
}

export function previewLot(
  material: Material,
  form: LotForm,
  lot: LotMove,
  units: UnitSystem,
): LotPreview | null {
  const { weightKg: typed, cost, freight } = form.getRawValue();
  const written = toKilograms(typed, units, lot?.weightKg ?? null);
  const weightKg = written ?? findFlatWeight(material, readSheets(form, lot, units));
  if (weightKg === null || !D(weightKg).gt(0)) return null;
  const [price, carriage] = [parseMoney(cost), parseMoney(freight.trim() === '' ? '0' : freight)];
  const landed =
    price.ok && carriage.ok && price.value.gt(0) ? computeLandedLotCost(price.value, carriage.value) : null;
  const landedPerUnit = landed && toRatePerUnit(roundFraction(landed, D(weightKg), 6).toFixed(), units);
  return { weightKg, isWorkedOut: written === null, landedPerUnit };
}

function readSheets(form: LotForm, lot: LotMove, units: UnitSystem): FlatSize {
  const value = form.getRawValue();
  const sheets = parsePieces(value.sheets);
  return {
    count: sheets.ok ? sheets.value : null,
    lengthMm: toMillimetres(value.sheetLengthMm, units, lot?.lengthMm ?? null),
    widthMm: toMillimetres(value.sheetWidthMm, units, lot?.widthMm ?? null),
  };
}

function toMoneyText(text: string): string {
  const parsed = parseMoney(text);
  return parsed.ok ? moneyText(toMoney(parsed.value)) : text;
}
