import { TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { type Employee } from '@brakeven/contract';
import { of } from 'rxjs';
import { PeopleApi } from '../api/people-api';
import { Notifier } from '../shell/notifier';
import { RollupStore } from '../shell/rollup-store';
import { provideSession } from '../testing/fake-session';
import { render } from '../testing/rendered';
import { PeoplePage } from './people-page';

const jo: Employee = {
  employeeId: 'e1',
  number: '104',
  name: 'Jo Alvarez',
  isActive: true,
  rates: [
    { payRateId: 'r2', validFrom: '2026-07-01', wagePerHour: '28.50', burdenPercent: '28.00' },
    { payRateId: 'r1', validFrom: '2025-01-06', wagePerHour: '26.00', burdenPercent: '27.50' },
  ],
  aliases: [{ aliasId: 'a1', spelling: 'J. Alvares' }],
};
const left: Employee = {
  ...jo,
  employeeId: 'e2',
  number: '7',
  name: 'Abel Crane',
  isActive: false,
  aliases: [],
};

describe('PeoplePage', () => {
  const api = {
    listEmployees: jest.fn(),
    listOverheadRates: jest.fn(),
    deletePayRate: jest.fn(),
    addPayRate: jest.fn(),
    deleteAlias: jest.fn(),
  };

  const open = (employees: Employee[]) => {
    jest.resetAllMocks();
    api.listEmployees.mockReturnValue(of(employees));
    api.listOverheadRates.mockReturnValue(of([]));
    TestBed.configureTestingModule({
      providers: [
        provideRouter([]),
        provideSession('bookkeeper'),
        { provide: PeopleApi, useValue: api },
        { provide: RollupStore, useValue: { refresh: jest.fn() } },
      ],
    });
    return render(PeoplePage);
  };

  it('shows what an hour of each costs and how that is made, those who have left last', async () => {
    const page = await open([left, jo]);
    const rows = page.textsOf('app-people-table tbody > tr:first-child');
    expect(rows[0]).toContain(
      '104 ▸ Jo Alvarez also “J. Alvares” $28.50 28 % $36.48 $28.50 × 1.28 Jul 1, 2026',
    );
    expect(rows[1]).toContain('has left');
  });

  it('opens into the rates of all days and the spellings', async () => {
    const page = await open([jo]);
    expect(page.find('▸ Jo Alvarez').getAttribute('aria-expanded')).toBe('false');
    await page.press('▸ Jo Alvarez');
    expect(page.find('▸ Jo Alvarez').getAttribute('aria-expanded')).toBe('true');
    expect(page.textsOf('.detail .sum')).toEqual([
      '$28.50 × 1.28 = $36.48',
      '$26.00 × 1.275 = $33.15',
      '“J. Alvares”',
    ]);
  });

  it('deletes a rate and puts it back on undo', async () => {
    const page = await open([jo]);
    api.deletePayRate.mockReturnValue(of(jo));
    api.addPayRate.mockReturnValue(of(jo));
    await page.press('▸ Jo Alvarez');
    await page.press('Delete the rate from Jan 6, 2025');
    expect(api.deletePayRate).toHaveBeenCalledWith('e1', 'r1');
    TestBed.inject(Notifier).notice()?.action?.run();
    expect(api.addPayRate).toHaveBeenCalledWith('e1', {
      validFrom: '2025-01-06',
      wagePerHour: '26.00',
      burdenPercent: '27.50',
    });
  });

  it('asks before it forgets a spelling', async () => {
    const page = await open([jo]);
    api.deleteAlias.mockReturnValue(of(null));
    await page.press('▸ Jo Alvarez');
    await page.press('Forget J. Alvares');
    expect(api.deleteAlias).not.toHaveBeenCalled();
    [...document.querySelectorAll<HTMLElement>('mat-dialog-container button')].at(-1)?.click();
    await new Promise((resolve) => setTimeout(resolve, 300));
    expect(api.deleteAlias).toHaveBeenCalledWith('a1');
  });

  it('says what to do first in a shop without people and overhead', async () => {
    const page = await open([]);
    expect(page.text).toContain('Nobody yet');
    expect(page.text).toContain('No overhead rate yet');
    expect(page.text).toContain('payroll service');
  });
});
