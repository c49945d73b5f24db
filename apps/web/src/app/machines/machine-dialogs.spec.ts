import { type Type } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { MatDialog } from '@angular/material/dialog';
import { type Machine, type MachineRate } from '@brakeven/contract';
import { firstValueFrom, of } from 'rxjs';
import { MachinesApi } from '../api/machines-api';
import { CostItemDialog } from './cost-item-dialog';
import { MachineDialog } from './machine-dialog';
import { MachineRateDialog } from './machine-rate-dialog';

const machine: Machine = {
  machineId: 'm1',
  code: 'P2',
  name: 'Press 2',
  kind: 'Press brake',
  inServiceOn: null,
  ratedForceKn: '533.78659',
  bedLengthMm: '1828.8',
};
const rate: MachineRate = {
  machineRateId: 'r1',
  validFrom: '2026-03-03',
  machineHourRate: '20.10',
  chargeOutRate: '78.00',
  runningCostPerHour: '4.10',
  basis: null,
};

describe('dialogs of a machine', () => {
  const api = {
    create: jest.fn(),
    update: jest.fn(),
    addCostItem: jest.fn(),
    updateCostItem: jest.fn(),
    addRate: jest.fn(),
    updateRate: jest.fn(),
  };

  beforeEach(() => {
    for (const call of Object.values(api)) call.mockReset().mockReturnValue(of(machine));
    TestBed.configureTestingModule({ providers: [{ provide: MachinesApi, useValue: api }] });
  });

  /** Opens a dialog, types into its fields by label, and saves. */
  const fill = async (type: Type<unknown>, data: unknown, texts: Record<string, string>) => {
    const dialog = TestBed.inject(MatDialog).open(type, {
      data,
      enterAnimationDuration: 0,
      exitAnimationDuration: 0,
    });
    TestBed.tick();
    await new Promise((resolve) => setTimeout(resolve, 10));
    const fields = [...document.querySelectorAll('mat-form-field')];
    for (const [label, text] of Object.entries(texts)) {
      const field = fields.find((one) => one.querySelector('mat-label')?.textContent === label);
      const input = field?.querySelector<HTMLInputElement | HTMLSelectElement>('input, select');
      if (!input) throw new Error(`There is no field '${label}'.`);
      input.value = text;
      input.dispatchEvent(new Event(input.tagName === 'SELECT' ? 'change' : 'input'));
    }
    document.querySelector<HTMLButtonElement>('button[type=submit]')?.click();
    TestBed.tick();
    const words = document.querySelector('mat-dialog-container')?.textContent ?? '';
    const closed = firstValueFrom(dialog.afterClosed());
    dialog.close();
    TestBed.tick();
    await closed;
    return words;
  };

  it('keep forces and lengths in kilonewtons and millimetres, whatever unit was typed', async () => {
    const typed = {
      Code: 'P3',
      Name: 'Press 3',
      Kind: 'Press brake',
      'Rated force': '100 tonnes',
      'Bed length': '10 ft',
    };
    await fill(MachineDialog, { machine: null, units: 'us' }, typed);
    expect(api.create).toHaveBeenCalledWith({
      code: 'P3',
      name: 'Press 3',
      kind: 'Press brake',
      inServiceOn: null,
      ratedForceKn: '980.665',
      bedLengthMm: '3048',
    });
  });

  it('change only what was changed', async () => {
    await fill(MachineDialog, { machine, units: 'us' }, { 'In service from': '2026-03-03' });
    const { machineId: _id, ...facts } = machine;
    expect(api.update).toHaveBeenCalledWith('m1', { ...facts, inServiceOn: '2026-03-03' });
  });

  it('take an amount as people write it', async () => {
    const data = { machineId: 'm1', item: null, today: '2026-12-01' };
    await fill(CostItemDialog, data, { Kind: 'freight', Amount: '$1,840' });
    expect(api.addCostItem).toHaveBeenCalledWith('m1', {
      incurredOn: '2026-12-01',
      kind: 'freight',
      description: '',
      amount: '1840.00',
    });
  });

  it('save no amount that cannot be read', async () => {
    const words = await fill(
      CostItemDialog,
      { machineId: 'm1', item: null, today: '2026-12-01' },
      { Amount: 'a lot' },
    );
    expect(api.addCostItem).not.toHaveBeenCalled();
    expect(words).toContain("'a lot' is not an amount");
  });

  it('begin new rates with those of today, and correct the one that is meant', async () => {
    const data = { machineId: 'm1', rate: null, current: rate, today: '2026-12-01' };
    await fill(MachineRateDialog, data, { 'Charge-out rate': '85' });
    expect(api.addRate).toHaveBeenCalledWith('m1', {
      validFrom: '2026-12-01',
      machineHourRate: '20.10',
      chargeOutRate: '85.00',
      runningCostPerHour: '4.10',
    });
    await fill(MachineRateDialog, { ...data, rate }, { From: '2026-03-10' });
    expect(api.updateRate).toHaveBeenCalledWith(
      'm1',
      'r1',
      expect.objectContaining({ validFrom: '2026-03-10' }),
    );
  });
});
