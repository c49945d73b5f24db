import { type MachineRateBasis } from '@brakeven/contract';
import { type MachineHourRateBasis } from '@brakeven/costing';
import { type MachineRateBasisRow } from '@brakeven/database';
import { D, moneyText, rateText, toMoney, toPercent, toRate } from '@brakeven/values';

/** A stored basis as it travels: money to the cent, quantities without the noughts that fill up a column's scale. */
export function toMachineRateBasis(row: Omit<MachineRateBasisRow, 'machineRateId'>): MachineRateBasis {
  return {
    price: moneyText(toMoney(row.price)),
    salvage: moneyText(toMoney(row.salvage)),
    lifeYears: D(row.lifeYears).toFixed(),
    interestPercent: D(row.interestPercent).toFixed(),
    floorAreaM2: D(row.floorAreaM2).toFixed(),
    spaceCostPerM2Year: rateText(toRate(row.spaceCostPerM2Year)),
    insurancePerYear: moneyText(toMoney(row.insurancePerYear)),
    upkeepPerYear: moneyText(toMoney(row.upkeepPerYear)),
    productiveHoursPerYear: D(row.productiveHoursPerYear).toFixed(),
    powerKw: D(row.powerKw).toFixed(),
    loadPercent: D(row.loadPercent).toFixed(),
    tariffPerKwh: rateText(toRate(row.tariffPerKwh)),
    consumablesPerHour: rateText(toRate(row.consumablesPerHour)),
  };
}

/** A basis as the rules of costing compute with it. */
export function toCostedBasis(basis: MachineRateBasis): MachineHourRateBasis {
  return {
    price: toMoney(basis.price),
    salvage: toMoney(basis.salvage),
    lifeYears: D(basis.lifeYears),
    interestPercent: toPercent(basis.interestPercent),
    floorAreaM2: D(basis.floorAreaM2),
    spaceCostPerM2Year: toRate(basis.spaceCostPerM2Year),
    insurancePerYear: toMoney(basis.insurancePerYear),
    upkeepPerYear: toMoney(basis.upkeepPerYear),
    productiveHoursPerYear: D(basis.productiveHoursPerYear),
    powerKw: D(basis.powerKw),
    loadPercent: toPercent(basis.loadPercent),
    tariffPerKwh: toRate(basis.tariffPerKwh),
    consumablesPerHour: toRate(basis.consumablesPerHour),
  };
}
