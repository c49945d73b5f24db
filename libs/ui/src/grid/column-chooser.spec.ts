import { TestBed } from '@angular/core/testing';
import { ColumnChooser } from './column-chooser';

describe('ColumnChooser', () => {
  const choices = [
    { id: 'number', header: 'Job', isFixed: true },
    { id: 'title', header: 'Title' },
    { id: 'labour', header: 'Labour' },
    { id: 'margin', header: 'Margin' },
  ];
  let emitted: string[] | undefined;

  const render = async (shown: string[]) => {
    emitted = undefined;
    const fixture = TestBed.createComponent(ColumnChooser);
    fixture.componentRef.setInput('choices', choices);
    fixture.componentRef.setInput('shown', shown);
    fixture.componentInstance.shownChange.subscribe((ids) => (emitted = ids));
    await fixture.whenStable();
    const element = fixture.nativeElement as HTMLElement;
    const opener = element.querySelector('button');
    opener?.click();
    await fixture.whenStable();
    const box = (header: string) =>
      [...element.querySelectorAll('label')]
        .find((label) => label.textContent?.trim() === header)
        ?.querySelector('input');
    return { fixture, element, opener, box };
  };

  it('ticks what is shown, and keeps what is always shown', async () => {
    const { box } = await render(['number', 'margin']);
    expect([box('Margin')?.checked, box('Labour')?.checked, box('Job')?.disabled]).toEqual([
      true,
      false,
      true,
    ]);
  });

  it('puts a column where it belongs among those shown, in whatever order these are', async () => {
    const { box } = await render(['number', 'margin', 'title']);
    box('Labour')?.click();
    expect(emitted).toEqual(['number', 'margin', 'title', 'labour']);
  });

  it('takes a column out', async () => {
    const { box } = await render(['number', 'title', 'margin']);
    box('Title')?.click();
    expect(emitted).toEqual(['number', 'margin']);
  });

  it('closes on Escape with the focus on its button, and on a press elsewhere', async () => {
    const { fixture, element, opener } = await render(['number']);
    document.body.append(element);
    element
      .querySelector('input')
      ?.dispatchEvent(new KeyboardEvent('keydown', { key: 'Escape', bubbles: true }));
    await fixture.whenStable();
    expect(element.querySelector('fieldset')).toBeNull();
    expect(document.activeElement).toBe(opener);
    opener?.click();
    await fixture.whenStable();
    document.body.dispatchEvent(new Event('pointerdown', { bubbles: true }));
    await fixture.whenStable();
    expect(element.querySelector('fieldset')).toBeNull();
    element.remove();
  });
});
