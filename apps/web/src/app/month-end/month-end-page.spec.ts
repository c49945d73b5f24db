import { HttpErrorResponse } from '@angular/common/http';
import { signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { MatDialog } from '@angular/material/dialog';
import { provideRouter, Router } from '@angular/router';
import { type MonthEnd, type Role } from '@brakeven/contract';
import { WORKINGS_OPENER } from '@brakeven/ui';
import { of, Subject, throwError } from 'rxjs';
import { MonthsApi } from '../api/months-api';
import { Notifier } from '../shell/notifier';
import { RollupStore } from '../shell/rollup-store';
import { provideSession } from '../testing/fake-session';
import { render } from '../testing/rendered';
import { MonthEndPage } from './month-end-page';
import { makeMonth, MONTHS } from './month-fixture';

describe('MonthEndPage', () => {
  const api = {
    list: jest.fn(),
    get: jest.fn(),
    close: jest.fn(),
    savePayrollHours: jest.fn(),
    reviewRefusals: jest.fn(),
  };
  const rollup = { refresh: jest.fn(), run: jest.fn(), rolledUp: new Subject(), isRunning: signal(false) };
  const answer = (closed: unknown) => ({ afterClosed: () => of(closed) });

  const open = async (month: MonthEnd, role: Role = 'bookkeeper') => {
    jest.resetAllMocks();
    api.list.mockReturnValue(of(MONTHS));
    api.get.mockReturnValue(of(month));
    TestBed.configureTestingModule({
      providers: [
        provideRouter([{ path: 'month-end/:month', children: [] }]),
        provideSession(role),
        { provide: MonthsApi, useValue: api },
        { provide: RollupStore, useValue: rollup },
        { provide: WORKINGS_OPENER, useValue: { open: jest.fn() } },
      ],
    });
    return render(MonthEndPage);
  };

  it('opens with the month that is next to be closed, its totals and who closed what', async () => {
    const page = await open(makeMonth());
    expect(api.get).toHaveBeenCalledWith('2026-11');
    expect(page.text).toContain('November 2026 is ready to be closed');
    expect(page.textsOf('app-month-totals-card tbody tr')).toEqual([
      'Labour $6,000.00 – $100.00 40',
      'Overtime premium $60.50 $60.50 – 5',
      'Cost of the month $6,060.50 $60.50 $100.00',
      'Invoiced $9,000.00 – – 2',
    ]);
    expect(page.text).toContain('October 2026 closed Nov 3, 2026, 3:00 PM by Ines Marlow');
    expect(page.text).toContain('What comes late is posted on Nov 1, 2026.');
  });

  it('closes after a question that says what is left, and shows the month closed', async () => {
    const missingTimesheets = [{ employeeId: 'e1', employee: 'Pia Strand', days: ['2026-11-02'] }];
    const page = await open(makeMonth({ checklist: { ...makeMonth().checklist, missingTimesheets } }));
    const dialog = jest.spyOn(TestBed.inject(MatDialog), 'open').mockReturnValue(answer(true) as never);
    api.close.mockReturnValue(of(makeMonth({ state: 'closed', isNext: false, isLatestClosed: true })));
    await page.press('Close November 2026');
    const [, config] = dialog.mock.calls[0] ?? [];
    expect(JSON.stringify(config?.data)).toContain('Left to look at: days without timesheets.');
    expect(api.close).toHaveBeenCalledWith('2026-11');
    expect(page.text).toContain('November 2026 is closed');
    expect(TestBed.inject(Router).url).toBe('/month-end/2026-11');
    expect(page.all('app-tie-out-card input')).toEqual([]);
  });

  it('stays as it is when the server refuses the close, and says why', async () => {
    const page = await open(makeMonth());
    jest.spyOn(TestBed.inject(MatDialog), 'open').mockReturnValue(answer(true) as never);
    const error = { code: 'month_refused', detail: 'November 2026 cannot be closed.', issues: [] };
    api.close.mockReturnValue(throwError(() => new HttpErrorResponse({ status: 409, error })));
    await page.press('Close November 2026');
    expect(TestBed.inject(Notifier).notice()?.text).toContain('cannot be closed');
    expect(page.text).toContain('Close November 2026');
  });

  it('does not offer a close that would be refused, nor a reopening to a bookkeeper', async () => {
    const message = 'November 2026 is not over yet.';
    const page = await open(makeMonth({ state: 'running', blockers: [{ code: 'running', message }] }));
    expect(page.find('Close November 2026')).toHaveProperty('disabled', true);
    expect(page.text).toContain(message);
    TestBed.resetTestingModule();
    const closed = makeMonth({ state: 'closed', isLatestClosed: true });
    expect((await open(closed)).text).not.toContain('Reopen…');
    TestBed.resetTestingModule();
    expect((await open(closed, 'owner')).text).toContain('Reopen…');
  });

  it('keeps payroll hours as they are typed, and refuses at the field what cannot be read', async () => {
    const page = await open(makeMonth());
    const field = 'input[aria-label="Payroll hours of Pia Strand"]';
    const [row] = makeMonth().tieOut;
    api.savePayrollHours.mockReturnValue(of({ ...row, payrollHours: '168.0000', difference: '-0.5000' }));
    await page.enter(field, 'many');
    expect(api.savePayrollHours).not.toHaveBeenCalled();
    expect(page.text).toContain("'many' is not a number of hours.");
    await page.enter(field, '745');
    expect(page.text).toContain('A month has from 0 to 744 hours.');
    await page.enter(field, '168');
    expect(api.savePayrollHours).toHaveBeenCalledWith('2026-11', 'e1', '168.0000');
    expect(page.textsOf('app-tie-out-card tbody tr')[0]).toContain('−0.50');
    expect(page.text).not.toContain('A month has from');
    await page.enter(field, '');
    expect(api.savePayrollHours).toHaveBeenLastCalledWith('2026-11', 'e1', null);
  });

  it('marks refused rows as reviewed and asks for the month anew', async () => {
    const refusal = {
      importId: 'i1',
      fileName: 'week-45.xlsx',
      importedAt: '2026-11-09T15:00:00.000Z',
      importedBy: 'Ines Marlow',
      refused: 2,
      reviewedAt: null,
      reviewedBy: null,
    };
    const page = await open(makeMonth({ checklist: { ...makeMonth().checklist, refusals: [refusal] } }));
    api.reviewRefusals.mockReturnValue(of(undefined));
    expect(page.find('week-45.xlsx').getAttribute('href')).toBe('/timesheets/i1');
    await page.press('Mark as reviewed: week-45.xlsx');
    expect(api.reviewRefusals).toHaveBeenCalledWith('i1', true);
    expect(api.get).toHaveBeenCalledTimes(2);
  });

  it('shows late lines where they stand', async () => {
    const line = {
      lineId: 'l1',
      postedOn: '2026-11-01',
      workedOn: '2026-10-29',
      category: 'labour' as const,
      label: 'Pia Strand',
      isReversal: true,
      job: '1041',
      jobId: 'j1',
      amount: '-120.00',
    };
    const page = await open(makeMonth({ lateIn: [line], lateInCount: 1 }));
    expect(page.textsOf('app-late-lines-card tbody tr')).toEqual([
      'Oct 29, 2026 Nov 1, 2026 Labour Pia Strand · taken back 1041 −$120.00',
    ]);
  });
});
