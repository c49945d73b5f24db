import { ApplicationRef, type ComponentRef } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { type FigureRef, type SourceCell, type Workings } from '@brakeven/contract';
import { WorkingsDrawer } from './workings-drawer';

const source: SourceCell = {
  importId: '0190c6e0-0000-7000-8000-000000000002',
  fileName: 'Week 47.xlsx',
  sheet: 'Hours',
  row: 7,
  cell: 'F7',
};

const workings: Workings = {
  figure: { figure: 'payback.earnedBack' },
  title: 'Earned back by Press 2',
  unit: 'money',
  amount: '40.08',
  rule: 'Earned − operator.',
  inputs: [{ label: 'Charge-out rate', value: '$85.00', validFrom: '2026-03-01', figure: null }],
  parts: [
    { label: 'Earned', amount: '90.00', figure: { figure: 'payback.earned' } },
    { label: 'Operator', amount: '-49.92', figure: { figure: 'payback.operatorLabour' } },
  ],
  lineCount: 1,
  lines: [
    {
      lineId: '1',
      on: '2026-11-02',
      postedOn: '2026-12-01',
      isLate: true,
      takesBackOn: null,
      category: 'labour',
      label: 'Jon Reyes',
      detail: null,
      job: '2231',
      operation: 'Form',
      machine: 'Press 2',
      quantity: '1.5000',
      unit: 'hours',
      rate: '26.00',
      rateFactor: '1.28',
      rateValidFrom: '2026-03-01',
      amount: '-49.92',
      figure: { figure: 'overtime.week' },
      source,
    },
  ],
  nextCursor: 'more',
};

describe('WorkingsDrawer', () => {
  let drawer: ComponentRef<WorkingsDrawer>;
  let element: HTMLElement;
  const events: unknown[] = [];
  const find = <E extends HTMLElement>(selector: string): E => {
    const found = element.querySelector<E>(selector);
    if (!found) throw new Error(`${selector} is not there.`);
    return found;
  };

  beforeEach(async () => {
    // jsdom knows the dialog element but cannot show it.
    HTMLDialogElement.prototype.showModal = function () {
      this.open = true;
    };
    HTMLDialogElement.prototype.close = function () {
      this.open = false;
      this.dispatchEvent(new Event('close'));
    };
    events.length = 0;
    const fixture = TestBed.createComponent(WorkingsDrawer);
    drawer = fixture.componentRef;
    element = fixture.nativeElement as HTMLElement;
    drawer.setInput('workings', workings);
    drawer.setInput('sourceHref', (cell: SourceCell) => `/timesheets/${cell.importId}?cell=${cell.cell}`);
    drawer.instance.opened.subscribe((ref: FigureRef) => events.push(ref.figure));
    drawer.instance.closed.subscribe(() => events.push('closed'));
    drawer.instance.moreWanted.subscribe(() => events.push('more'));
    drawer.instance.sourceFollowed.subscribe((cell) => events.push(cell.cell));
    await fixture.whenStable();
  });

  it('opens as a modal dialog named after the figure', () => {
    expect(find<HTMLDialogElement>('dialog').open).toBe(true);
    expect(element.querySelector('#workings-title')?.textContent).toBe('Earned back by Press 2');
  });

  it('says that the parts make the figure, and opens each of them', () => {
    expect(find('.check').textContent).toContain('The 2 parts add up to $40.08');
    find('button.part').click();
    expect(events).toEqual(['payback.earned']);
  });

  it('opens a row that is a figure itself, and says when a late one was posted', () => {
    const row = find('ol li');
    row.querySelector<HTMLElement>('button.part')?.click();
    expect(events).toEqual(['overtime.week']);
    expect(row.querySelector('.note')?.textContent).toBe('Posted Dec 1, 2026, late: its month was closed');
  });

  it('opens an input that is a figure itself', async () => {
    const input = {
      label: 'Earned back',
      value: '$40.08',
      validFrom: null,
      figure: { figure: 'payback.earnedBack' },
    };
    drawer.setInput('workings', { ...workings, inputs: [input] });
    await TestBed.inject(ApplicationRef).whenStable();
    find('details button.part').click();
    expect(events).toEqual(['payback.earnedBack']);
  });

  it('links a row to its cell, and follows it inside the application', () => {
    const link = find<HTMLAnchorElement>('.source a');
    expect(link.getAttribute('href')).toBe(`/timesheets/${source.importId}?cell=F7`);
    expect(link.textContent?.replace(/\s+/g, ' ').trim()).toBe('Week 47.xlsx · Hours · F7');
    link.click();
    expect(events).toEqual(['closed', 'F7']);
  });

  it('leaves a click with a modifier to the browser', () => {
    let wasTaken: boolean | undefined;
    element.addEventListener('click', (event) => {
      wasTaken = event.defaultPrevented;
      event.preventDefault();
    });
    find('.source a').dispatchEvent(
      new MouseEvent('click', { ctrlKey: true, bubbles: true, cancelable: true }),
    );
    expect(wasTaken).toBe(false);
    expect(events).toEqual([]);
  });

  it('asks for more rows while there are any', () => {
    find('section .button').click();
    expect(events).toEqual(['more']);
  });

  it('shows a failure with a way to try again', async () => {
    drawer.setInput('workings', null);
    drawer.setInput('problem', { title: 'The server cannot be reached', text: 'Nothing was changed.' });
    await TestBed.inject(ApplicationRef).whenStable();
    expect(find('[role=alert]').textContent).toContain('The server cannot be reached');
  });
});
