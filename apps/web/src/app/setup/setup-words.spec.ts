import { type SetupCounts, type SetupResult } from '@brakeven/contract';
import { findSetupVerdict, listSheetCounts } from './setup-words';

const counts = (change: Partial<SetupCounts> = {}): SetupCounts => ({
  people: 0,
  customers: 0,
  operations: 0,
  machines: 0,
  machineCosts: 0,
  machineRates: 0,
  overhead: 0,
  jobs: 0,
  punches: 0,
  dies: 0,
  materials: 0,
  sheetLots: 0,
  issues: 0,
  outsideServices: 0,
  invoices: 0,
  estimates: 0,
  ...change,
});
const result = (change: Partial<SetupResult> = {}): SetupResult => ({
  added: counts(),
  changed: counts(),
  alreadyThere: counts(),
  problems: [],
  ...change,
});
const problem = { code: 'x', message: 'x', sheet: 'People', cell: 'C7' };

describe('listSheetCounts', () => {
  it('lists the sheets that bring something, in their order', () => {
    const listed = listSheetCounts(
      result({ added: counts({ jobs: 3 }), alreadyThere: counts({ people: 2 }) }),
    );
    expect(listed.map(({ sheet, added, alreadyThere }) => [sheet, added, alreadyThere])).toEqual([
      ['People', 0, 2],
      ['Jobs', 3, 0],
    ]);
  });
});

describe('findSetupVerdict', () => {
  it('refuses on one refused cell, not on a warning', () => {
    const added = counts({ people: 1 });
    expect(findSetupVerdict(result({ added, problems: [{ ...problem, severity: 'refused' }] }))).toBe(
      'refused',
    );
    expect(findSetupVerdict(result({ added, problems: [{ ...problem, severity: 'warning' }] }))).toBe(
      'ready',
    );
  });

  it('says when all of it is already there', () => {
    expect(findSetupVerdict(result({ alreadyThere: counts({ people: 9 }) }))).toBe('nothing new');
    expect(findSetupVerdict(result({ changed: counts({ people: 1 }) }))).toBe('ready');
  });
});
