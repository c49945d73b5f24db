import { type Payback } from '@brakeven/contract';

/** A press on its way to even, for specs; parts can be changed. */
export function makePayback(change: Partial<Payback> = {}): Payback {
  return {
    outlay: '38260.00',
    earned: '32180.00',
    operatorLabour: '10200.00',
    running: '1818.00',
    runningCost: '12018.00',
    earnedBack: '20162.00',
    remaining: '18098.00',
    asOf: '2026-11-26',
    breakEven: { date: '2027-05-14', method: 'straight-line' },
    machine: {
      machineId: '0190c6e0-0000-7000-8000-000000000300',
      code: 'Press 2',
      name: 'Press 2',
      kind: 'hydraulic press brake',
      inServiceOn: '2026-03-03',
      ratedForceKn: '533.786594',
      bedLengthMm: '1828.8',
    },
    basis: 'charge-out',
    hours: '378.6000',
    pacePerWeek: '612.44',
    paceDays: 182,
    curve: [
      { on: '2026-03-03', netCash: '-38260.00' },
      { on: '2026-03-27', netCash: '-36900.10' },
      { on: '2026-11-24', netCash: '-18098.00' },
    ],
    month: {
      month: '2026-11',
      hours: '81.5000',
      billableHours: '78.0000',
      chargeOutRate: '85.00',
      earned: '6630.00',
      operatorLabour: '2652.40',
      running: '391.15',
      net: '3586.45',
    },
    topJobs: [
      {
        jobId: '0190c6e0-0000-7000-8000-000000002231',
        number: '2231',
        title: 'Conveyor guards',
        net: '1204.00',
        loss: null,
      },
    ],
    otherJobs: { jobs: 11, net: '831.04' },
    gaps: [],
    ...change,
  };
}
