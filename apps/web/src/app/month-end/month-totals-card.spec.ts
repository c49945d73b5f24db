import { TestBed } from '@angular/core/testing';
import { type FigureRef, type MonthTotal } from '@brakeven/contract';
import { WORKINGS_OPENER } from '@brakeven/ui';
import { findClosedFigures } from '../testing/closed-figures';
import { MonthTotalsCard } from './month-totals-card';

const total = (category: MonthTotal['category'], amount: string, toOverhead = '0.00', late = '0.00') =>
  ({ category, amount, toOverhead, late, lines: 3 }) satisfies MonthTotal;

describe('MonthTotalsCard', () => {
  const opened: FigureRef[] = [];

  const render = async (totals: MonthTotal[]) => {
    TestBed.configureTestingModule({
      providers: [{ provide: WORKINGS_OPENER, useValue: { open: (ref: FigureRef) => opened.push(ref) } }],
    });
    const fixture = TestBed.createComponent(MonthTotalsCard);
    for (const [name, value] of Object.entries({ totals, from: '2026-04-01', to: '2026-04-30' }))
      fixture.componentRef.setInput(name, value);
    await fixture.whenStable();
    return fixture.nativeElement as HTMLElement;
  };

  it('adds the cost up, and opens each amount for the days of the month', async () => {
    const element = await render([
      total('labour', '100.10', '0.00', '-20.00'),
      total('overtime', '7.05', '7.05'),
      total('invoiced', '900.00'),
    ]);
    expect(element.querySelector('tr.total')?.textContent).toContain('$107.15');
    expect(findClosedFigures(element)).toEqual([]);
    element.querySelectorAll<HTMLElement>('button.figure').forEach((button) => button.click());
    const days = { from: '2026-04-01', to: '2026-04-30' };
    expect(opened).toEqual([
      { figure: 'books.labour', ...days },
      { figure: 'books.labour', part: 'late', ...days },
      { figure: 'books.overtime', ...days },
      { figure: 'books.overtime', part: 'overhead', ...days },
      { figure: 'books.cost', ...days },
      { figure: 'books.cost', part: 'overhead', ...days },
      { figure: 'books.cost', part: 'late', ...days },
      { figure: 'books.invoiced', ...days },
    ]);
  });
});
