import { TestBed } from '@angular/core/testing';
import { type FigureRef } from '@brakeven/contract';
import { WORKINGS_OPENER } from '../workings-opener';
import { Figure } from './figure';

describe('Figure', () => {
  const opened: FigureRef[] = [];
  const ref: FigureRef = { figure: 'job.total', jobId: '0190c6e0-0000-7000-8000-000000000001' };

  const render = async (inputs: Record<string, unknown>): Promise<HTMLElement> => {
    const fixture = TestBed.createComponent(Figure);
    for (const [name, value] of Object.entries(inputs)) fixture.componentRef.setInput(name, value);
    await fixture.whenStable();
    return fixture.nativeElement as HTMLElement;
  };

  beforeEach(() => {
    opened.length = 0;
    TestBed.configureTestingModule({
      providers: [
        { provide: WORKINGS_OPENER, useValue: { open: (wanted: FigureRef) => opened.push(wanted) } },
      ],
    });
  });

  it('opens its workings when pressed', async () => {
    const element = await render({ value: '1204.00', ref });
    element.querySelector('button')?.click();
    expect(element.textContent?.trim()).toBe('$1,204.00');
    expect(opened).toEqual([ref]);
  });

  it('names itself with the words it is given, and holds the figure in that name', async () => {
    const element = await render({ value: '78', unit: 'hours', ref, label: 'Hours of Form' });
    expect(element.querySelector('button')?.getAttribute('aria-label')).toBe('Hours of Form: 78.00\u00a0h');
  });

  it('is plain text where there are no workings, and a dash where there is no figure', async () => {
    const plain = await render({ value: '5.00' });
    expect(plain.querySelector('button')).toBeNull();
    expect(plain.textContent?.trim()).toBe('$5.00');
    expect((await render({ value: null })).textContent?.trim()).toBe('–');
  });
});
