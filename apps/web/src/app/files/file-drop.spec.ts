import { type ComponentFixture, TestBed } from '@angular/core/testing';
import { FileDrop } from './file-drop';

describe('FileDrop', () => {
  let fixture: ComponentFixture<FileDrop>;
  let chosen: string[];
  const element = () => fixture.nativeElement as HTMLElement;

  const drop = async (...files: File[]) => {
    const event = new Event('drop', { cancelable: true });
    Object.assign(event, { dataTransfer: { files } });
    element().querySelector('.zone')?.dispatchEvent(event);
    await fixture.whenStable();
    return event;
  };

  beforeEach(async () => {
    chosen = [];
    fixture = TestBed.createComponent(FileDrop);
    fixture.componentRef.setInput('rule', { endings: ['.xlsx', '.csv'], bytesMax: 10 * 1024 * 1024 });
    fixture.componentRef.setInput('lead', 'Drop the week’s timesheet here');
    fixture.componentInstance.chosen.subscribe((file) => chosen.push(file.name));
    await fixture.whenStable();
  });

  it('hands on a file that is dropped, and keeps the browser from opening it', async () => {
    const event = await drop(new File(['x'], 'week 48.xlsx'));
    expect(chosen).toEqual(['week 48.xlsx']);
    expect(event.defaultPrevented).toBe(true);
  });

  it('says why a file is not taken, and forgets that when one is', async () => {
    await drop(new File(['x'], 'week 48.xls'));
    expect(element().querySelector('[role=alert]')?.textContent).toContain('save it as .xlsx');
    await drop(new File(['x'], 'week 48.xlsx'));
    expect(element().querySelector('[role=alert]')?.textContent?.trim()).toBe('');
    expect(chosen).toEqual(['week 48.xlsx']);
  });

  it('takes one file at a time', async () => {
    await drop(new File(['x'], 'a.csv'), new File(['x'], 'b.csv'));
    expect(chosen).toEqual([]);
    expect(element().textContent).toContain('one file at a time');
  });

  it('states the limits before anything is dropped', () => {
    expect(element().querySelector('.limits')?.textContent).toBe('.xlsx or .csv, up to 10 MB');
  });
});
