import { HttpErrorResponse } from '@angular/common/http';
import { TestBed } from '@angular/core/testing';
import { MatDialog, type MatDialogRef } from '@angular/material/dialog';
import { provideRouter, Router } from '@angular/router';
import { type Machine, type MachineRate, type MachineRecovery } from '@brakeven/contract';
import { firstValueFrom, type Observable, of, throwError } from 'rxjs';
import { MachinesApi } from '../api/machines-api';
import { RollupStore } from '../shell/rollup-store';
import { provideSession } from '../testing/fake-session';
import { render, type Rendered } from '../testing/rendered';
import { RateBuilderPage } from './rate-builder-page';

const built: MachineRate = {
  machineRateId: 'r2',
  validFrom: '2026-03-03',
  machineHourRate: '6.97',
  chargeOutRate: '78.00',
  runningCostPerHour: '4.10',
  basis: {
    price: '48000.00',
    salvage: '6000.00',
    lifeYears: '10',
    interestPercent: '6',
    floorAreaM2: '11.14836',
    spaceCostPerM2Year: '107.639151',
    insurancePerYear: '300.00',
    upkeepPerYear: '900.00',
    productiveHoursPerYear: '1600',
    powerKw: '7.5',
    loadPercent: '60',
    tariffPerKwh: '0.14',
    consumablesPerHour: '1.20',
  },
};
const machine: Machine = {
  machineId: 'm1',
  code: 'P2',
  name: 'Press 2',
  kind: 'Press brake',
  inServiceOn: '2026-03-03',
  ratedForceKn: null,
  bedLengthMm: null,
  outlay: '33340.00',
  costItems: [],
  rates: [built],
};
const recovery: MachineRecovery = {
  from: '2026-03-03',
  to: '2026-11-30',
  daysCovered: 273,
  daysWithoutBasis: 0,
  plannedHours: '1196.7100',
  actualHours: '900.0000',
  hoursWithoutBasis: '0.0000',
  fixedCost: '6148.11',
  absorbed: '4623.75',
  difference: '-1524.36',
  outcome: 'under',
};

describe('RateBuilderPage', () => {
  const api = { get: jest.fn(), addBuiltRate: jest.fn(), updateBuiltRate: jest.fn(), getRecovery: jest.fn() };
  let page: Rendered<RateBuilderPage>;

  const open = async (one: Machine, rate?: string) => {
    jest.resetAllMocks();
    api.get.mockReturnValue(of(one));
    api.getRecovery.mockReturnValue(of(recovery));
    api.addBuiltRate.mockReturnValue(of(one));
    api.updateBuiltRate.mockReturnValue(of(one));
    TestBed.configureTestingModule({
      providers: [
        provideRouter([]),
        provideSession('owner'),
        { provide: MachinesApi, useValue: api },
        { provide: RollupStore, useValue: { refresh: jest.fn() } },
      ],
    });
    jest.spyOn(TestBed.inject(Router), 'navigate').mockResolvedValue(true);
    page = await render(RateBuilderPage, { machineId: 'm1', rate });
  };

  const type = async (label: string, text: string) => {
    const field = page.all('mat-form-field').find((one) => one.textContent?.includes(label));
    const input = field?.querySelector('input');
    if (!input) throw new Error(`There is no field '${label}'.`);
    input.value = text;
    input.dispatchEvent(new Event('input'));
    await page.settle();
  };

  it('begins with the landed cost, and shows no rate before it can', async () => {
    await open({ ...machine, rates: [] });
    const price = page.all('mat-form-field').find((one) => one.textContent?.includes('Price'));
    expect(price?.querySelector('input')?.value).toBe('33340.00');
    expect(page.text).toContain('Fill in the fields');
    await page.press('Save the rate');
    expect(api.addBuiltRate).not.toHaveBeenCalled();
    expect(page.text).toContain('Fill this in.');
  });

  it('shows the rate with its parts as it is typed, and saves what it was built from', async () => {
    await open(machine);
    expect(page.text).toContain('$6.97 an hour');
    expect(page.textsOf('app-rate-parts tbody tr')[0]).toMatch(/^Depreciation .*\$2\.625 37\.7 %$/);
    await type('Planned productive hours', '800');
    expect(page.text).toContain('$12.11 an hour');
    await page.press('Save the rate');
    const [, body] = api.addBuiltRate.mock.calls[0];
    expect(body).toMatchObject({
      chargeOutRate: '78.00',
      runningCostPerHour: '4.10',
      basis: { ...built.basis, productiveHoursPerYear: '800' },
    });
  });

  it('builds the rate of the address anew, and takes the running cost from it on request', async () => {
    await open(machine, 'r2');
    expect(page.text).toContain('Build the rate anew');
    await page.press('Take it as running cost');
    await page.press('Save the rate');
    expect(api.updateBuiltRate).toHaveBeenCalledWith('m1', 'r2', {
      validFrom: '2026-03-03',
      chargeOutRate: '78.00',
      runningCostPerHour: '2.3925',
      basis: built.basis,
    });
  });

  it('asks before changes are left that are not saved, and not once they are', async () => {
    await open(machine, 'r2');
    const ask = jest.spyOn(TestBed.inject(MatDialog), 'open');
    ask.mockReturnValue({ afterClosed: () => of(false) } as MatDialogRef<unknown>);
    const { canLeave } = page.fixture.componentInstance;
    expect(canLeave()).toBe(true);
    await page.press('Take it as running cost');
    expect(await firstValueFrom(canLeave() as Observable<boolean>)).toBe(false);
    await page.press('Save the rate');
    expect(canLeave()).toBe(true);
    expect(ask).toHaveBeenCalledTimes(1);
  });

  it('stays filled and says why when the server refuses', async () => {
    await open(machine);
    const message = 'There are already rates from this day on. Correct those.';
    const error = {
      code: 'conflict',
      detail: message,
      issues: [{ field: 'validFrom', code: 'taken', message }],
    };
    api.addBuiltRate.mockReturnValue(throwError(() => new HttpErrorResponse({ status: 409, error })));
    await page.press('Save the rate');
    expect(page.text).toContain(message);
    expect(TestBed.inject(Router).navigate).not.toHaveBeenCalled();
  });

  it('holds hours really run against the planned ones', async () => {
    await open(machine);
    expect(page.text).toContain('Under-recovered: $1,524.36 of the machine’s fixed cost');
    expect(page.text).toContain('Planned 1,196.71 h');
    expect(page.text).toContain('Really run 900.00 h');
    api.getRecovery.mockReturnValue(of({ ...recovery, daysCovered: 0 }));
    await page.press('Last 12 months');
    expect(page.text).toContain('Nothing to compare yet');
  });
});
