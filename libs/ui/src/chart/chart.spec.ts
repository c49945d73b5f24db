import { NO_ERRORS_SCHEMA } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { type FigureRef } from '@brakeven/contract';
import { Figure } from '../figure/figure';
import { WORKINGS_OPENER } from '../workings-opener';
import { Chart } from './chart';

describe('Chart', () => {
  const opened: FigureRef[] = [];

  const render = async () => {
    // echarts draws on a canvas, which jsdom has not; the browser tests see the drawing.
    TestBed.overrideComponent(Chart, {
      set: { imports: [Figure], schemas: [NO_ERRORS_SCHEMA], providers: [] },
    });
    TestBed.configureTestingModule({
      providers: [{ provide: WORKINGS_OPENER, useValue: { open: (ref: FigureRef) => opened.push(ref) } }],
    });
    const fixture = TestBed.createComponent(Chart);
    fixture.componentRef.setInput('title', 'Cumulative net cash');
    fixture.componentRef.setInput('summary', 'Even on May 14, 2027.');
    fixture.componentRef.setInput('build', () => ({ series: [] }));
    fixture.componentRef.setInput('table', {
      headers: ['Month', 'Net cash'],
      rows: [
        ['March 2026', '−$38,260.00'],
        ['April 2026', { value: '-36900.10', ref: { figure: 'payback.netCash' } }],
      ],
    });
    await fixture.whenStable();
    return { fixture, element: fixture.nativeElement as HTMLElement };
  };

  it('says in words what it draws', async () => {
    const { element } = await render();
    const drawing = element.querySelector('[role=img]');
    expect(drawing?.getAttribute('aria-label')).toBe('Cumulative net cash. Even on May 14, 2027.');
  });

  it('shows its numbers as a table on demand', async () => {
    const { fixture, element } = await render();
    const toggle = element.querySelector('button');
    toggle?.click();
    await fixture.whenStable();
    expect(toggle?.getAttribute('aria-pressed')).toBe('true');
    expect([...element.querySelectorAll('tbody td')].map((cell) => cell.textContent.trim())).toEqual([
      'March 2026',
      '−$38,260.00',
      'April 2026',
      '−$36,900.10',
    ]);
    element.querySelector<HTMLElement>('td button')?.click();
    expect(opened).toEqual([{ figure: 'payback.netCash' }]);
    expect(element.querySelector('[role=img]')).toBeNull();
  });
});
