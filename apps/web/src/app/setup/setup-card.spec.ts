import { TestBed } from '@angular/core/testing';
import { type SetupCounts, type SetupResult } from '@brakeven/contract';
import { HttpErrorResponse } from '@angular/common/http';
import { of, throwError } from 'rxjs';
import { ShopApi } from '../api/shop-api';
import { render } from '../testing/rendered';
import { SetupCard } from './setup-card';

const none: SetupCounts = {
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
};
const good: SetupResult = {
  added: { ...none, people: 9, jobs: 12 },
  changed: none,
  alreadyThere: none,
  problems: [],
};
const problem = {
  code: 'date_unreadable',
  message: 'No date.',
  sheet: 'People',
  cell: 'C7',
  severity: 'refused',
} as const;

describe('SetupCard', () => {
  const api = { checkSetup: jest.fn(), importSetup: jest.fn(), setupTemplateUrl: '/api/setup/template' };
  let imported: number;

  const drop = async () => {
    const page = await render(SetupCard, {}, { imported: () => (imported += 1) });
    const event = Object.assign(new Event('drop', { cancelable: true }), {
      dataTransfer: { files: [new File(['x'], 'set-up.xlsx')] },
    });
    page.element.querySelector('.zone')?.dispatchEvent(event);
    await page.settle();
    return page;
  };

  beforeEach(() => {
    imported = 0;
    api.checkSetup.mockReset();
    api.importSetup.mockReset();
    TestBed.configureTestingModule({ providers: [{ provide: ShopApi, useValue: api }] });
  });

  it('checks first, says what importing would do, and imports at a second press', async () => {
    api.checkSetup.mockReturnValue(of(good));
    api.importSetup.mockReturnValue(of(good));
    const page = await drop();
    expect(page.text).toContain('Everything is right. Nothing is written yet.');
    expect(page.textsOf('tbody tr')).toEqual(['People 9 0 0', 'Jobs 12 0 0']);
    expect(api.importSetup).not.toHaveBeenCalled();
    await page.press('Import all of it');
    expect(page.text).toContain('It is in.');
    expect(imported).toBe(1);
  });

  it('names the cells that are wrong and offers no import', async () => {
    api.checkSetup.mockReturnValue(of({ ...good, problems: [problem] }));
    const page = await drop();
    expect(page.text).toContain('Nothing is written yet. Correct the cells below');
    expect(page.textsOf('tbody tr')[0]).toContain('C7');
    expect(page.all('button.primary')).toHaveLength(0);
  });

  it('says when there is nothing new', async () => {
    api.checkSetup.mockReturnValue(of({ ...good, added: none, alreadyThere: { ...none, people: 9 } }));
    const page = await drop();
    expect(page.text).toContain('All of it is already there.');
    expect(page.all('button.primary')).toHaveLength(0);
  });

  it('keeps the check when the import fails', async () => {
    api.checkSetup.mockReturnValue(of(good));
    api.importSetup.mockReturnValue(throwError(() => new HttpErrorResponse({ status: 0 })));
    const page = await drop();
    await page.press('Import all of it');
    expect(page.text).toContain('The server cannot be reached');
    expect(page.find('Import all of it')).toBeTruthy();
    expect(imported).toBe(0);
  });
});
