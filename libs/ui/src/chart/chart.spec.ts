import { NO_ERRORS_SCHEMA } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { Chart } from './chart';

describe('Chart', () => {
  const render = async () => {
    // echarts draws on a canvas, which jsdom has not; the browser tests see the drawing.
    TestBed.overrideComponent(Chart, { set: { imports: [], schemas: [NO_ERRORS_SCHEMA], providers: [] } });
    const fixture = TestBed.createComponent(Chart);
    fixture.componentRef.setInput('title', 'Cumulative net cash');
    fixture.componentRef.setInput('summary', 'Even on May 14, 2027.');
    fixture.componentRef.setInput('build', () => ({ series: [] }));
    fixture.componentRef.setInput('table', {
      headers: ['Month', 'Net cash'],
      rows: [['March 2026', '−$38,260.00']],
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
    expect([...element.querySelectorAll('tbody td')].map((cell) => cell.textContent)).toEqual([
      'March 2026',
      '−$38,260.00',
    ]);
    expect(element.querySelector('[role=img]')).toBeNull();
  });
});
