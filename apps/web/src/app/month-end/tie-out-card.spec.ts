import { TestBed } from '@angular/core/testing';
import { type MonthTieOut } from '@brakeven/contract';
import { WORKINGS_OPENER } from '@brakeven/ui';
import { render } from '../testing/rendered';
import { TieOutCard } from './tie-out-card';

const pia: MonthTieOut = {
  employeeId: 'e1',
  employee: 'Pia Strand',
  hours: '168.5000',
  overtimeHours: '4.2500',
  costedHours: '168.5000',
  payrollHours: '168.0000',
  difference: '-0.5000',
};
const jon: MonthTieOut = {
  ...pia,
  employeeId: 'e2',
  employee: 'Jon Reyes',
  payrollHours: null,
  difference: null,
};

describe('TieOutCard', () => {
  const opener = { open: jest.fn() };
  const month = { from: '2026-11-01', to: '2026-11-30' };

  beforeEach(() => {
    opener.open.mockReset();
    TestBed.configureTestingModule({ providers: [{ provide: WORKINGS_OPENER, useValue: opener }] });
  });

  it('opens the workings of an employee’s hours and of the month’s', async () => {
    const card = await render(TieOutCard, { rows: [pia], ...month });
    await card.press('Overtime, Pia Strand: 4.25\u00a0h');
    await card.press('Difference, Pia Strand: −0.50\u00a0h');
    await card.press('In the costs: 168.50\u00a0h');
    expect(opener.open.mock.calls).toEqual([
      [{ figure: 'hours.overtime', ...month, employeeId: 'e1' }],
      [{ figure: 'hours.difference', ...month, employeeId: 'e1' }],
      [{ figure: 'hours.costed', ...month }],
    ]);
  });

  it('has no difference to open while payroll hours are missing', async () => {
    const card = await render(TieOutCard, { rows: [pia, jon], ...month });
    expect(card.textsOf('tbody tr')[1]).toMatch(/ – –$/);
    expect(card.textsOf('tfoot tr')[0]).toMatch(/ 168.00 h –$/);
    expect(card.all('button').filter((button) => /Difference/.test(button.ariaLabel ?? ''))).toHaveLength(1);
  });
});
