import { TestBed } from '@angular/core/testing';
import { provideRouter, Router } from '@angular/router';
import { HttpErrorResponse } from '@angular/common/http';
import { type Machine, type MachineRateBasis, type Role } from '@brakeven/contract';
import { WORKINGS_OPENER } from '@brakeven/ui';
import { of, throwError } from 'rxjs';
import { MachinesApi } from '../api/machines-api';
import { Notifier } from '../shell/notifier';
import { RollupStore } from '../shell/rollup-store';
import { provideSession } from '../testing/fake-session';
import { render } from '../testing/rendered';
import { MachinePage } from './machine-page';

const freight = {
  machineCostItemId: 'c2',
  incurredOn: '2026-02-24',
  kind: 'freight',
  description: 'Flatbed',
  amount: '1840.00',
} as const;
const machine: Machine = {
  machineId: 'm1',
  code: 'P2',
  name: 'Press 2',
  kind: 'Hydraulic press brake',
  inServiceOn: '2026-03-03',
  ratedForceKn: '533.78659',
  bedLengthMm: '1828.8',
  outlay: '33340.00',
  costItems: [
    { ...freight, machineCostItemId: 'c1', kind: 'price', amount: '31500.00', description: '' },
    freight,
  ],
  rates: [
    {
      machineRateId: 'r1',
      validFrom: '2026-03-03',
      machineHourRate: '20.10',
      chargeOutRate: '78.00',
      runningCostPerHour: '4.10',
      basis: null,
    },
  ],
};

describe('MachinePage', () => {
  const api = {
    get: jest.fn(),
    deleteCostItem: jest.fn(),
    addCostItem: jest.fn(),
    deleteRate: jest.fn(),
    addBuiltRate: jest.fn(),
  };
  const rollup = { refresh: jest.fn() };

  beforeEach(() => {
    jest.resetAllMocks();
    api.get.mockReturnValue(of(machine));
  });

  const open = (role: Role) => {
    TestBed.configureTestingModule({
      providers: [
        provideRouter([]),
        provideSession(role),
        { provide: MachinesApi, useValue: api },
        { provide: RollupStore, useValue: rollup },
        { provide: WORKINGS_OPENER, useValue: { open: jest.fn() } },
      ],
    });
    return render(MachinePage, { machineId: 'm1' });
  };

  it('shows the facts in the shop’s units, the landed cost with its total, and the rate that holds', async () => {
    const page = await open('owner');
    expect(page.text).toContain('Rated force 60 US tons');
    expect(page.text).toContain('Outlay $33,340.00');
    expect(page.textsOf('app-machine-rates-card tbody tr')[0]).toContain(
      'Mar 3, 2026 current $20.10 $78.00 $4.10',
    );
    expect(page.find('Its payback').getAttribute('href')).toBe('/payback?machine=P2');
    expect(page.text).toContain('The rating plates decide.');
  });

  it('takes a cost out at one press and puts it back on undo', async () => {
    api.deleteCostItem.mockReturnValue(of({ ...machine, costItems: [], outlay: '0.00' }));
    api.addCostItem.mockReturnValue(of(machine));
    const page = await open('owner');
    await page.press('Take out Freight Flatbed');
    expect(page.text).toContain('Nothing entered');
    expect(rollup.refresh).toHaveBeenCalled();
    TestBed.inject(Notifier).notice()?.action?.run();
    await page.settle();
    const { machineCostItemId: _id, ...input } = freight;
    expect(api.addCostItem).toHaveBeenCalledWith('m1', input);
    expect(page.text).toContain('Outlay $33,340.00');
  });

  it('leaves everything as it is when the server refuses, and says why', async () => {
    const error = { code: 'rate_needed', detail: '38 entries would lose their rate.', issues: [] };
    api.deleteRate.mockReturnValue(throwError(() => new HttpErrorResponse({ status: 409, error })));
    const page = await open('owner');
    await page.press('Take out the rates from Mar 3, 2026');
    expect(TestBed.inject(Notifier).notice()?.text).toContain('38 entries would lose their rate.');
    expect(page.all('app-machine-rates-card tbody tr')).toHaveLength(1);
  });

  it('leads from a built rate to where it is built anew, and puts it back with what it was built from', async () => {
    const [rate] = machine.rates ?? [];
    const basis = { price: '48000.00' } as MachineRateBasis;
    const built = { ...machine, rates: rate ? [{ ...rate, basis }] : [] };
    api.get.mockReturnValue(of(built));
    api.deleteRate.mockReturnValue(of({ ...machine, rates: [] }));
    api.addBuiltRate.mockReturnValue(of(built));
    const page = await open('owner');
    expect(page.find('How the rate from Mar 3, 2026 was built').getAttribute('href')).toBe(
      '/machines/m1/rate?rate=r1',
    );
    const navigate = jest.spyOn(TestBed.inject(Router), 'navigate').mockResolvedValue(true);
    await page.press('Correct the rates from Mar 3, 2026');
    expect(navigate).toHaveBeenCalledWith(['/machines', 'm1', 'rate'], { queryParams: { rate: 'r1' } });
    await page.press('Take out the rates from Mar 3, 2026');
    TestBed.inject(Notifier).notice()?.action?.run();
    expect(api.addBuiltRate).toHaveBeenCalledWith(
      'm1',
      expect.objectContaining({ validFrom: '2026-03-03', basis }),
    );
  });

  it('shows a lead the facts without money, and nothing to change', async () => {
    const { outlay: _outlay, costItems: _items, rates: _rates, ...facts } = machine;
    api.get.mockReturnValue(of(facts));
    const page = await open('lead');
    expect(page.text).toContain('Press 2');
    expect(page.text).not.toContain('$');
    expect(page.all('button')).toHaveLength(0);
  });
});
