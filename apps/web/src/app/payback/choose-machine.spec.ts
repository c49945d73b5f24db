import { type Machine } from '@brakeven/contract';
import { chooseMachine, listPaybackMachines } from './choose-machine';

const machine = (code: string, inServiceOn: string | null, outlay?: string): Machine => ({
  machineId: code,
  code,
  name: code,
  kind: 'press brake',
  inServiceOn,
  ratedForceKn: null,
  bedLengthMm: null,
  outlay,
});

describe('the machine that payback is shown for', () => {
  const old = machine('P1', '2012-05-01', '0.00');
  const young = machine('P2', '2026-03-03', '38260.00');
  const saw = machine('SAW', null, '0.00');
  const ordered = machine('P3', null, '0.50');

  it('is one with a cost before one without, the later in service first', () => {
    expect(listPaybackMachines([old, saw, ordered, young]).map(({ code }) => code)).toEqual([
      'P2',
      'P3',
      'P1',
    ]);
  });

  it('is the one the address names, else the first', () => {
    expect(chooseMachine([young, old], 'P1')).toBe(old);
    expect(chooseMachine([young, old], 'gone')).toBe(young);
    expect(chooseMachine([], undefined)).toBeUndefined();
  });
});
