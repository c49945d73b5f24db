import {
  addDays,
  forceText,
  type LocalDate,
  lengthText,
  toForce,
  toLength,
  toLocalDate,
} from '@brakeven/values';
import { type SetupData } from '@brakeven/workbook';
import { type PlannedJob } from './plan-jobs';
import {
  CUSTOMERS,
  type DemoMachine,
  MACHINES,
  OPERATIONS,
  PEOPLE,
  PRESS_COSTS,
  PRESS_WEEK,
  WEEKS,
} from './story';

const LONG_AGO = toLocalDate('2018-05-14');
/** Weeks into the history at which raises and the new overhead rate came. */
const RAISE_WEEK = 22;

/**
 * The demo shop's set-up workbook.
 *
 * @param firstMonday the Monday of the history's first week
 * @param options.isHistory jobs as they stood while the work was done (open) instead of as they stand today
 */
export function buildSetup(
  firstMonday: LocalDate,
  jobs: readonly PlannedJob[],
  options: { isHistory: boolean },
): Partial<SetupData> {
  const inWeek = (week: number, day = 0): LocalDate => addDays(firstMonday, week * 7 + day);
  const pressOn = inWeek(PRESS_WEEK, 1);
  const ratesFrom = addDays(firstMonday, -60);
  return {
    people: PEOPLE.flatMap((person) => [
      {
        number: person.number,
        name: person.name,
        rateFrom: ratesFrom,
        wagePerHour: person.wagePerHour,
        burdenPercent: person.burdenPercent,
      },
      ...(person.raisedTo
        ? [
            {
              number: person.number,
              name: person.name,
              rateFrom: inWeek(RAISE_WEEK),
              wagePerHour: person.raisedTo,
              burdenPercent: person.burdenPercent,
            },
          ]
        : []),
    ]),
    customers: CUSTOMERS.map((name) => ({ name })),
    operations: OPERATIONS.map(({ code, name, machine }) => ({ code, name, machine })),
    machines: MACHINES.map((machine) => toSetupMachine(machine, pressOn)),
    machineCosts: PRESS_COSTS.map(({ daysBefore, kind, description, amount }) => ({
      machine: 'P2',
      date: addDays(pressOn, -daysBefore),
      kind,
      description,
      amount,
    })),
    machineRates: MACHINES.map(({ code, machineHourRate, chargeOutRate, runningCostPerHour }) => ({
      machine: code,
      validFrom: ratesFrom,
      machineHourRate,
      chargeOutRate,
      runningCostPerHour,
    })),
    overhead: [
      { validFrom: ratesFrom, ratePerLabourHour: '21.40' },
      { validFrom: inWeek(RAISE_WEEK), ratePerLabourHour: '22.15' },
    ],
    jobs: jobs.map((job) => ({
      number: job.number,
      customer: job.customer,
      title: job.title,
      quantity: job.quantity,
      openedOn: inWeek(job.openedWeek),
      dueOn: job.isBillable ? inWeek(Math.min(job.dueWeek, WEEKS + 6), 4) : null,
      quotedPrice: job.quotedPrice,
      isBillable: job.isBillable,
      status: options.isHistory ? 'open' : job.statusNow,
    })),
  };
}

function toSetupMachine(machine: DemoMachine, pressOn: LocalDate): SetupData['machines'][number] {
  return {
    code: machine.code,
    name: machine.name,
    kind: machine.kind,
    inServiceOn: machine.inServiceWeek === null ? LONG_AGO : pressOn,
    ratedForceKn: machine.ratedForceTons && forceText(toForce(machine.ratedForceTons, 'US ton')),
    bedLengthMm: machine.bedLengthIn && lengthText(toLength(machine.bedLengthIn, 'in')),
  };
}
