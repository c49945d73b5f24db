import { type Machine } from '@brakeven/contract';

/** The machines that can pay anything back: bought for something, or at work. Latest in service first. */
export function listPaybackMachines(machines: readonly Machine[]): Machine[] {
  return machines
    .filter((machine) => machine.inServiceOn !== null || hasOutlay(machine))
    .sort((a, b) => rank(b).localeCompare(rank(a)) || a.code.localeCompare(b.code));
}

/** The machine that the address asks for by its code, otherwise the first that can pay back. */
export function chooseMachine(machines: readonly Machine[], code: string | undefined): Machine | undefined {
  return machines.find((machine) => machine.code === code) ?? machines[0];
}

function hasOutlay({ outlay }: Machine): boolean {
  return outlay !== undefined && /[1-9]/.test(outlay);
}

/** With an outlay before without, then the later in service. */
function rank(machine: Machine): string {
  return `${hasOutlay(machine) ? 1 : 0}${machine.inServiceOn ?? ''}`;
}
