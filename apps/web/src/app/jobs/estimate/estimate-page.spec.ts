import { HttpErrorResponse } from '@angular/common/http';
import { TestBed } from '@angular/core/testing';
import { MatDialog } from '@angular/material/dialog';
import { provideRouter } from '@angular/router';
import { type Estimate, type EstimateChoices, type EstimateInput } from '@brakeven/contract';
import { WORKINGS_OPENER } from '@brakeven/ui';
import { firstValueFrom, isObservable, type Observable, of, throwError } from 'rxjs';
import { EstimatesApi, type VersionedEstimate } from '../../api/estimates-api';
import { JobsApi } from '../../api/jobs-api';
import { Notifier } from '../../shell/notifier';
import { Rendered } from '../../testing/rendered';
import { EstimatePage } from './estimate-page';

const jobId = '0190c6e0-0000-7000-8000-000000002231';
const choices: EstimateChoices = {
  on: '2026-05-01',
  operations: [{ id: 'form', name: 'Form', defaultMachineId: 'press' }],
  machines: [{ id: 'press', name: 'Press 2', machineHourRate: '31.25' }],
  materials: [{ id: 'steel', name: '11 ga mild steel', averagePerKg: '1.366866' }],
  labourRate: '33.00',
  overheadRate: '18.00',
};

const toEstimate = (input: EstimateInput | undefined) =>
  ({ ...input, cost: {}, priceForMargin: '0.00' }) as Estimate;

describe('EstimatePage', () => {
  let stored: VersionedEstimate;
  const saved: EstimateInput[] = [];
  let undo: (() => void) | undefined;
  let answer: () => Observable<unknown>;
  let isConfirmed = false;
  const versions: string[] = [];

  const render = async () => {
    const api = {
      getEstimate: () => of(stored),
      getChoices: () => of(choices),
      saveEstimate: (_: string, input: EstimateInput, version: string) => {
        saved.push(input);
        versions.push(version);
        return answer();
      },
    };
    const job = { jobId, number: '2231', title: 'Conveyor guards', quantity: 24, quotedPrice: '900.00' };
    TestBed.configureTestingModule({
      providers: [
        provideRouter([]),
        { provide: EstimatesApi, useValue: api },
        { provide: JobsApi, useValue: { getJob: () => of(job) } },
        { provide: WORKINGS_OPENER, useValue: { open: () => undefined } },
        {
          provide: Notifier,
          useValue: { say: (_: string, back?: () => void) => (undo = back), warn: () => undefined },
        },
        { provide: MatDialog, useValue: { open: () => ({ afterClosed: () => of(isConfirmed) }) } },
      ],
    });
    const fixture = TestBed.createComponent(EstimatePage);
    fixture.componentRef.setInput('jobId', jobId);
    const page = new Rendered(fixture);
    await page.settle();
    return page;
  };
  const fill = async (page: Rendered<EstimatePage>) => {
    await page.press('Add operation');
    await page.enter('[aria-label="Operation, line 1"]', 'form');
    await page.enter('[aria-label="Set-up h, line 1"]', '0:30');
    await page.enter('[aria-label="Min a piece, line 1"]', '7.5');
  };
  const valueOf = (page: Rendered<EstimatePage>, label: string) =>
    page.element.querySelector<HTMLInputElement>(`[aria-label="${label}"]`)?.value;

  beforeEach(() => {
    stored = { estimate: null, version: '"first"' };
    saved.length = 0;
    versions.length = 0;
    undo = undefined;
    isConfirmed = false;
    answer = () => of({ estimate: toEstimate(saved[0]), version: '"second"' });
  });

  it('begins a line with the rates of the day and the pieces of the job, and costs it as it is typed', async () => {
    const page = await render();
    await fill(page);
    expect(valueOf(page, 'Pieces, line 1')).toBe('24');
    expect(valueOf(page, 'Machine, line 1')).toBe('press');
    expect(valueOf(page, 'Machine /h, line 1')).toBe('31.25');
    // 0.5 h + 24 × 7.5 min = 3.5 h at 33 + 31.25 + 18, and a margin of 20 % on it
    expect(page.textsOf('.cost')).toEqual(['$287.88']);
    expect(page.text).toContain('$359.85');
    expect(page.text).toContain('leaves 68.0 % of it');
  });

  it('saves whole, and is clean then', async () => {
    const page = await render();
    await fill(page);
    expect(isObservable(page.fixture.componentInstance.canLeave())).toBe(true);
    await page.press('Save estimate');
    expect(saved).toMatchObject([
      { marginPercent: '20.00', lines: [{ operationId: 'form', machineId: 'press', setupHours: '0.5000' }] },
    ]);
    expect(page.fixture.componentInstance.canLeave()).toBe(true);
  });

  it('asks before what is not saved is left', async () => {
    const page = await render();
    expect(page.fixture.componentInstance.canLeave()).toBe(true);
    await page.press('Add outside work');
    const asked = page.fixture.componentInstance.canLeave() as Observable<boolean>;
    expect(await firstValueFrom(asked)).toBe(false);
  });

  it('refuses what cannot be read, naming the field, and sends nothing', async () => {
    const page = await render();
    await fill(page);
    await page.enter('[aria-label="Pieces, line 1"]', 'a dozen');
    await page.press('Save estimate');
    expect(saved).toEqual([]);
    expect(page.textsOf('.problems').join()).toMatch(/^Pieces: .*whole number/);
    expect(page.text).toContain('1 line is not complete');
  });

  it('refuses an estimate without lines', async () => {
    const page = await render();
    await page.press('Save estimate');
    expect(page.text).toContain('at least one line');
    expect(saved).toEqual([]);
  });

  it('keeps what was typed when the server refuses, with its words', async () => {
    const issues = [
      { field: 'lines.0.operationId', code: 'unknown', message: 'There is no such operation.' },
    ];
    const error = { code: 'invalid_input', detail: 'Some lines refer to nothing.', issues };
    answer = () => throwError(() => new HttpErrorResponse({ status: 400, error }));
    const page = await render();
    await fill(page);
    await page.press('Save estimate');
    expect(page.textsOf('.issues').join()).toContain('Line 1: There is no such operation.');
    expect(valueOf(page, 'Min a piece, line 1')).toBe('7.5');
  });

  it('saves each time on the version that it was made from', async () => {
    const page = await render();
    await fill(page);
    await page.press('Save estimate');
    await page.enter('[aria-label="Min a piece, line 1"]', '8');
    await page.press('Save estimate');
    expect(versions).toEqual(['"first"', '"second"']);
  });

  describe('when somebody else has saved meanwhile', () => {
    const theirs = { kind: 'outside' as const, amount: '310.00', description: 'Powder coat' };
    const refuse = async () => {
      const error = { code: 'changed_meanwhile', detail: 'Somebody else changed this estimate.', issues: [] };
      answer = () => throwError(() => new HttpErrorResponse({ status: 412, error }));
      const page = await render();
      await fill(page);
      await page.press('Save estimate');
      expect(page.textsOf('.issues').join()).toContain('Somebody else changed this estimate.');
      expect(valueOf(page, 'Min a piece, line 1')).toBe('7.5');
      return page;
    };

    it('saves over it only when told to', async () => {
      const page = await refuse();
      answer = () => of({ estimate: toEstimate(saved[0]), version: '"third"' });
      await page.press('Save mine over it');
      expect(versions).toEqual(['"first"', '*']);
      expect(page.textsOf('.issues')).toEqual([]);
    });

    it('shows what is saved, and brings back what was typed', async () => {
      const page = await refuse();
      const input = { estimatedOn: '2026-05-01', scrapAllowancePercent: '0', marginPercent: '20' };
      stored = { estimate: toEstimate({ ...input, lines: [theirs] }), version: '"theirs"' };
      await page.press('Show what is saved');
      expect(page.text).not.toContain('Somebody else changed');
      expect(valueOf(page, 'Min a piece, line 1')).toBeUndefined();
      undo?.();
      await page.settle();
      expect(valueOf(page, 'Min a piece, line 1')).toBe('7.5');
      await page.press('Save estimate');
      expect(versions.at(-1)).toBe('"theirs"');
    });
  });

  it('brings a removed line back where it was', async () => {
    const page = await render();
    await fill(page);
    await page.press('Add operation');
    await page.press('Remove line 1');
    expect(valueOf(page, 'Min a piece, line 1')).toBe('');
    undo?.();
    await page.settle();
    expect(valueOf(page, 'Min a piece, line 1')).toBe('7.5');
  });

  it('moves lines, by button and by Alt with an arrow', async () => {
    const page = await render();
    await fill(page);
    await page.press('Add operation');
    await page.press('Move line 2 up');
    expect(valueOf(page, 'Min a piece, line 2')).toBe('7.5');
    const field = page.element.querySelector('[aria-label="Pieces, line 2"]');
    field?.dispatchEvent(new KeyboardEvent('keydown', { key: 'ArrowUp', altKey: true, bubbles: true }));
    await page.settle();
    expect(valueOf(page, 'Min a piece, line 1')).toBe('7.5');
  });

  it('adds a line when Enter is pressed in the last', async () => {
    const page = await render();
    await fill(page);
    const field = page.element.querySelector('[aria-label="Pieces, line 1"]');
    field?.dispatchEvent(new KeyboardEvent('keydown', { key: 'Enter', bubbles: true }));
    await page.settle();
    expect(valueOf(page, 'Pieces, line 2')).toBe('24');
  });
});
