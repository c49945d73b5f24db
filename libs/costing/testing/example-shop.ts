import { toHours, toLocalDate, toPercent, toRate } from '@brakeven/values';
import {
  type CostedEntry,
  type MachineRate,
  type OverheadRate,
  type PayRate,
  type RateBook,
} from '../src/index';

/** An entry of the example shop: Ana forms 7.5 h on the press for a billable job on 2 March 2026. */
export function entryOf(
  changes: Partial<Omit<CostedEntry, 'hours' | 'workedOn'>> & { hours?: string; workedOn?: string } = {},
): CostedEntry {
  return {
    entryId: 'entry-1',
    employeeId: 'ana',
    jobId: 'job-1',
    isBillable: true,
    machineId: 'press',
    ...changes,
    workedOn: toLocalDate(changes.workedOn ?? '2026-03-02'),
    hours: toHours(changes.hours ?? '7.5'),
  };
}

/** A wage and burden from a date on. */
export function payRateOf(id: string, validFrom: string, wage: string, burden: string): PayRate {
  return {
    id,
    validFrom: toLocalDate(validFrom),
    wagePerHour: toRate(wage),
    burdenPercent: toPercent(burden),
  };
}

/** A machine's three rates from a date on: machine-hour, charge-out, running cost. */
export function machineRateOf(id: string, validFrom: string, rates: [string, string, string]): MachineRate {
  const [machineHour, chargeOut, running] = rates;
  return {
    id,
    validFrom: toLocalDate(validFrom),
    machineHourRate: toRate(machineHour),
    chargeOutRate: toRate(chargeOut),
    runningCostPerHour: toRate(running),
  };
}

/** An overhead rate from a date on. */
export function overheadRateOf(id: string, validFrom: string, rate: string): OverheadRate {
  return { id, validFrom: toLocalDate(validFrom), ratePerLabourHour: toRate(rate) };
}

/** The rates of the example shop; the press is in service from 16 February 2026, the saw never was. */
export function bookOf(changes: Partial<RateBook> = {}): RateBook {
  return {
    payRates: new Map([
      [
        'ana',
        [
          payRateOf('pay-ana-1', '2026-01-01', '24.00', '30'),
          payRateOf('pay-ana-2', '2026-03-09', '25.35', '31.5'),
        ],
      ],
      ['ben', [payRateOf('pay-ben', '2026-01-01', '19.75', '28.25')]],
    ]),
    machineRates: new Map([
      ['press', [machineRateOf('rate-press', '2026-01-01', ['18.40', '95.00', '6.25'])]],
      ['saw', [machineRateOf('rate-saw', '2026-01-01', ['4.10', '40.00', '1.05'])]],
    ]),
    overheadRates: [overheadRateOf('overhead', '2026-01-01', '12.80')],
    inServiceOn: new Map([
      ['press', toLocalDate('2026-02-16')],
      ['saw', null],
    ]),
    ...changes,
  };
}
