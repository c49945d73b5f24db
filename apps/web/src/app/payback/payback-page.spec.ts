import { NO_ERRORS_SCHEMA } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { type FigureRef, type Machine, type Payback } from '@brakeven/contract';
import { Chart, WORKINGS_OPENER } from '@brakeven/ui';
import { NEVER, of, throwError } from 'rxjs';
import { MachinesApi } from '../api/machines-api';
import { PaybackApi } from '../api/payback-api';
import { RollupStore } from '../shell/rollup-store';
import { findClosedFigures } from '../testing/closed-figures';
import { makePayback } from './payback-fixture';
import { PaybackPage } from './payback-page';

const COST_ITEMS = [
  { machineCostItemId: 'c1', incurredOn: '2026-02-10', kind: 'price', description: '', amount: '36000.00' },
  {
    machineCostItemId: 'c2',
    incurredOn: '2026-02-17',
    kind: 'freight',
    description: 'By rail',
    amount: '2260.00',
  },
];

describe('PaybackPage', () => {
  const opened: FigureRef[] = [];

  const render = async (payback: Payback | Error, machines?: Partial<Machine>[]) => {
    const known = makePayback().machine;
    const list = (machines ?? [{ ...known, outlay: '38260.00' }]) as Machine[];
    const answer = payback instanceof Error ? throwError(() => payback) : of(payback);
    TestBed.configureTestingModule({
      providers: [
        provideRouter([]),
        {
          provide: MachinesApi,
          useValue: { list: () => of(list), get: () => of({ ...known, costItems: COST_ITEMS }) },
        },
        { provide: PaybackApi, useValue: { getPayback: () => answer } },
        { provide: RollupStore, useValue: { rolledUp: NEVER } },
        { provide: WORKINGS_OPENER, useValue: { open: (ref: FigureRef) => opened.push(ref) } },
      ],
    });
    // The drawing needs a canvas; its option has a spec of its own.
    TestBed.overrideComponent(Chart, {
      set: { imports: [], providers: [], template: '', schemas: [NO_ERRORS_SCHEMA] },
    });
    const fixture = TestBed.createComponent(PaybackPage);
    await fixture.whenStable();
    const element = fixture.nativeElement as HTMLElement;
    const textOf = (selector: string) =>
      element.querySelector(selector)?.textContent?.replace(/\s+/g, ' ').trim();
    return { element, textOf };
  };

  beforeEach(() => (opened.length = 0));

  it('gives the verdict first, in figures that open', async () => {
    const { element, textOf } = await render(makePayback());
    expect(textOf('h1')).toContain('Press 2 has earned back $20,162.00 of $38,260.00');
    expect(textOf('.lead')).toContain('At the straight-line pace of the last 26 weeks, $612.44 net a week');
    expect(textOf('.lead')).toContain('breaks even on May 14, 2027');
    element.querySelectorAll<HTMLElement>('h1 button').forEach((button) => button.click());
    expect(opened.map(({ figure }) => figure)).toEqual(['payback.earnedBack', 'payback.outlay']);
  });

  it('opens every amount of money and hours, whatever the verdict', async () => {
    for (const method of ['straight-line', 'reached', 'not-at-this-pace'] as const) {
      const date = method === 'not-at-this-pace' ? null : '2026-10-02';
      const { element } = await render(makePayback({ breakEven: { date, method } }));
      opened.length = 0;
      const figures = element.querySelectorAll<HTMLElement>('button.figure');
      figures.forEach((figure) => figure.click());
      expect(findClosedFigures(element)).toEqual([]);
      expect(opened).toHaveLength(figures.length);
      expect(opened.map(({ figure }) => figure)).toEqual(
        expect.arrayContaining(['payback.costItem', 'payback.otherJobs', 'payback.billableHours']),
      );
      TestBed.resetTestingModule();
    }
  });

  it('finds amounts that do not open, so that finding none says something', () => {
    const page = document.createElement('div');
    page.innerHTML = '<p>It netted $612.44 over 7.50 h.</p><button class="figure">$1.00</button>';
    expect(findClosedFigures(page)).toEqual(['It netted $612.44 over 7.50 h.']);
  });

  it('says when it has paid for itself', async () => {
    const { textOf } = await render(makePayback({ breakEven: { date: '2026-10-02', method: 'reached' } }));
    expect(textOf('h1')).toContain('Press 2 has paid for itself');
    expect(textOf('.lead')).toContain('Even since October 2, 2026.');
  });

  it('says plainly that it never will at this pace', async () => {
    const never = makePayback({
      breakEven: { date: null, method: 'not-at-this-pace' },
      pacePerWeek: '-12.00',
    });
    expect((await render(never)).textOf('.lead')).toContain(
      'Not at this pace. Over the last 26 weeks it netted −$12.00',
    );
  });

  it('does not judge before anything is rolled up', async () => {
    const none = {
      breakEven: { date: null, method: 'no-data' },
      asOf: null,
      curve: [],
      month: null,
      topJobs: [],
    } as const;
    const { element, textOf } = await render(makePayback({ ...none, curve: [], topJobs: [] }));
    expect(textOf('h1')).toContain('too early to tell');
    expect(element.querySelector('app-chart')).toBeNull();
  });

  it('opens each line of the month for that month only', async () => {
    const { element } = await render(makePayback());
    element.querySelector<HTMLElement>('app-month-card tr:nth-child(2) button')?.click();
    expect(opened).toEqual([
      {
        figure: 'payback.operatorLabour',
        machineId: makePayback().machine.machineId,
        from: '2026-11-01',
        to: '2026-11-30',
      },
    ]);
    expect(element.querySelector('app-month-card tr:nth-child(2)')?.textContent).toContain('−$2,652.40');
  });

  it('names rates that are missing and what to do', async () => {
    const gap = {
      category: 'labour',
      subject: 'Jon Reyes',
      entries: 2,
      firstDay: '2026-03-02',
      lastDay: '2026-03-02',
    } as const;
    const { element, textOf } = await render(makePayback({ gaps: [gap] }));
    expect(textOf('.remark')).toContain('Jon Reyes has no wage for 2 entries');
    expect(element.querySelector('.remark a')?.getAttribute('href')).toBe('/people');
  });

  it('says what to do when there is no machine, and what happened when it fails', async () => {
    expect((await render(makePayback(), [])).textOf('app-empty-state')).toContain(
      'No machine is in service yet',
    );
    TestBed.resetTestingModule();
    expect((await render(new Error('down'))).textOf('[role=alert]')).toContain('Nothing was changed');
  });
});
