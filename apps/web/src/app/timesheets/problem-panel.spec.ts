import { TestBed } from '@angular/core/testing';
import { type TimesheetProblem } from '@brakeven/contract';
import { provideRouter } from '@angular/router';
import { of } from 'rxjs';
import { render } from '../testing/rendered';
import { sampleProblem, sampleUnknownName } from '../testing/sample-check';
import { type ChosenName } from './group-unknown-names';
import { KnownNames } from './known-names';
import { ProblemPanel } from './problem-panel';

const settled = { kind: 'employee', spelling: 'Bo', targetId: 'e-105', label: '105 Bo Tran' } as const;

describe('ProblemPanel', () => {
  let heard: unknown[];
  const listen = {
    nameChosen: (name: ChosenName) => heard.push(name),
    takenBack: (name: ChosenName) => heard.push(name),
    shown: (problem: TimesheetProblem) => heard.push(problem.cell),
  };

  beforeEach(() => {
    heard = [];
    const known = { search: () => of([{ targetId: 'e-107', label: '107 Rosa Lindqvist' }]) };
    TestBed.configureTestingModule({
      providers: [provideRouter([]), { provide: KnownNames, useValue: known }],
    });
  });

  it('settles a spelling once for all the rows it stands in', async () => {
    const problems = [sampleUnknownName(6), sampleUnknownName(9), sampleProblem(7)];
    const page = await render(ProblemPanel, { problems, chosen: [] }, listen);
    expect(page.textsOf('.name')).toHaveLength(1);
    expect(page.textsOf('.name')[0]).toContain('employee, 2 rows, first in B6');
    await page.press('104 · Jo Alvarez');
    expect(heard).toEqual([
      { kind: 'employee', spelling: 'J. Alvares', targetId: 'e-104', label: '104 · Jo Alvarez' },
    ]);
  });

  it('lists what is settled, takes it back, and keeps the keyboard in the panel', async () => {
    const page = await render(ProblemPanel, { problems: [], chosen: [settled] }, listen);
    expect(page.text).toContain('“Bo” is 105 Bo Tran');
    page.find('Take back: Bo is 105 Bo Tran').focus();
    await page.press('Take back: Bo is 105 Bo Tran');
    expect(document.activeElement).toBe(page.element);
    expect(heard).toEqual([settled]);
  });

  it('leads from each other problem to its cell', async () => {
    const warning = sampleProblem(8, { severity: 'warning', cell: 'C8', message: 'Job 2218 is invoiced.' });
    const page = await render(ProblemPanel, { problems: [sampleProblem(7), warning], chosen: [] }, listen);
    await page.press('C8 Warning: Job 2218 is invoiced.');
    expect(heard).toEqual(['C8']);
  });

  it('offers each order that reads all text dates, with what the first would be', async () => {
    const offers = [
      { dateFormat: 'MM/DD/YYYY', text: '02/03/2026', date: '2026-02-03' },
      { dateFormat: 'DD/MM/YYYY', text: '02/03/2026', date: '2026-03-02' },
    ];
    const date = sampleProblem(5, { code: 'date_unreadable', cell: 'A5', field: 'date' });
    const problems = [date, sampleProblem(7)];
    const unreadDates = { cells: ['A5'], offers };
    const page = await render(
      ProblemPanel,
      { problems, chosen: [], unreadDates },
      {
        ...listen,
        dateFormatChosen: (format: string | null) => heard.push(format),
      },
    );
    expect(page.text).toContain('1 date written as text, first in A5. More than one order reads them all');
    expect(page.textsOf('.offer')).toEqual([
      'Text dates are written MM/DD/YYYY 02/03/2026 is Feb 3, 2026',
      'Text dates are written DD/MM/YYYY 02/03/2026 is Mar 2, 2026',
    ]);
    expect(page.textsOf('.cells li')).toHaveLength(1);
    await page.press('Text dates are written DD/MM/YYYY');
    expect(heard).toEqual(['DD/MM/YYYY']);
  });

  it('leaves text dates among the cells to correct when no order reads them all', async () => {
    const problems = [sampleProblem(5, { code: 'date_unreadable', cell: 'A5', field: 'date' })];
    const unreadDates = { cells: ['A5'], offers: [] };
    const page = await render(ProblemPanel, { problems, chosen: [], unreadDates }, listen);
    expect(page.text).not.toContain('Dates to settle');
    expect(page.textsOf('.cells .cell')).toEqual(['A5']);
  });

  it('searches all that is known when no near match is right', async () => {
    const page = await render(ProblemPanel, { problems: [sampleUnknownName(6)], chosen: [] }, listen);
    await page.press('Another…');
    expect(page.element.querySelector('input')?.placeholder).toBe('Search all employees');
    await new Promise((resolve) => setTimeout(resolve, 200));
    await page.settle();
    expect(page.text).toContain('Not in the list? Add it under People & rates');
  });
});
