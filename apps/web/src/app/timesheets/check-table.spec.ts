import { TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { NEVER } from 'rxjs';
import { render } from '../testing/rendered';
import { sampleCheck, sampleProblem, sampleRow, sampleUnknownName } from '../testing/sample-check';
import { CheckTable } from './check-table';
import { type ChosenName } from './group-unknown-names';
import { KnownNames } from './known-names';

const check = sampleCheck({
  rowsRead: 4,
  entriesReady: 2,
  refused: 2,
  rows: [sampleRow(7, { state: 'refused' }), sampleRow(5), sampleRow(6, { state: 'refused' }), sampleRow(8)],
  problems: [sampleUnknownName(6), sampleProblem(7)],
});
const rowNumbers = '.row-number:not(td)';

describe('CheckTable', () => {
  beforeEach(() => {
    Element.prototype.scrollIntoView = jest.fn();
    TestBed.configureTestingModule({
      providers: [provideRouter([]), { provide: KnownNames, useValue: { search: () => NEVER } }],
    });
  });

  it('begins with the rows that have problems, each cell marked in words and its words below', async () => {
    const page = await render(CheckTable, { check });
    expect(page.textsOf(`tbody ${rowNumbers}`)).toEqual(['6', '7']);
    expect(page.textsOf('.wrong')).toEqual(['✕ Refused: Jo Alvarez', '✕ Refused: 7.5']);
    expect(page.textsOf('.problem .cell')).toEqual(['B6', 'E7']);
    expect(page.all('.wrong')[1]?.getAttribute('aria-describedby')).toBe('problem-E7-hours_unreadable');
    expect(page.element.querySelector('#problem-E7-hours_unreadable')?.textContent).toContain("'7:90'");
  });

  it('shows all rows in the order of the sheet when asked', async () => {
    const page = await render(CheckTable, { check });
    await page.press('All rows · 4');
    expect(page.textsOf(`tbody ${rowNumbers}`)).toEqual(['5', '6', '7', '8']);
    expect(page.find('All rows · 4').getAttribute('aria-pressed')).toBe('true');
  });

  it('goes from problem to problem by button and by key, round the end', async () => {
    const page = await render(CheckTable, { check });
    await page.press('↓ Next');
    expect(page.textsOf('[role=status]')).toContain('Problem 1 of 2 problems');
    page.element.dispatchEvent(new KeyboardEvent('keydown', { key: 'ArrowDown', altKey: true }));
    await page.settle();
    expect(page.textsOf('.current .cell')).toEqual(['E7']);
    await page.press('↓ Next');
    expect(page.textsOf('.current .cell')).toEqual(['B6']);
  });

  it('brings a problem into view whatever is filtered', async () => {
    const page = await render(CheckTable, { check });
    await page.press('Ready · 2');
    expect(page.textsOf(`tbody ${rowNumbers}`)).toEqual(['5', '8']);
    page.fixture.componentInstance.show(sampleProblem(7));
    await page.settle();
    expect(page.textsOf('.current .cell')).toEqual(['E7']);
  });

  it('takes the choice of a near match where the name stands', async () => {
    const chosen: ChosenName[] = [];
    const page = await render(CheckTable, { check }, { nameChosen: (name: ChosenName) => chosen.push(name) });
    await page.press('104 · Jo Alvarez');
    expect(chosen).toEqual([
      { kind: 'employee', spelling: 'J. Alvares', targetId: 'e-104', label: '104 · Jo Alvarez' },
    ]);
  });

  it('draws a hundred rows at a time', async () => {
    const rows = Array.from({ length: 230 }, (_, index) => sampleRow(index + 5));
    const page = await render(CheckTable, { check: sampleCheck({ rows, rowsRead: 230 }) });
    expect(page.all(`tbody ${rowNumbers}`)).toHaveLength(100);
    await page.press('Show 100 more of 130');
    expect(page.all(`tbody ${rowNumbers}`)).toHaveLength(200);
  });
});
