import { type Type } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { MAT_DIALOG_DATA, MatDialogRef } from '@angular/material/dialog';
import { type Job } from '@brakeven/contract';
import { EMPTY, firstValueFrom, type Observable, of } from 'rxjs';
import { JobsApi } from '../api/jobs-api';
import { MaterialsApi } from '../api/materials-api';
import { render } from '../testing/rendered';
import { IssueDialog } from './issue-dialog';
import { type IssueStart } from './issue-form';
import { LotDialog, type LotDialogData } from './lot-dialog';
import { MaterialDialog, type MaterialDialogData } from './material-dialog';
import { BAR, ISSUE, LOT, STEEL } from './sample-materials';
import { toIssueRow } from './to-issue-row';

const api = {
  list: jest.fn(),
  create: jest.fn(),
  update: jest.fn(),
  addLot: jest.fn(),
  correctLot: jest.fn(),
  addIssue: jest.fn(),
  correctIssue: jest.fn(),
};
const job = { jobId: 'job', number: '1042', title: 'Rack shelves', status: 'open' } as Job;

interface Saving {
  form: { patchValue(value: object): void; invalid: boolean; get(name: string): { errors: unknown } | null };
  save: () => Observable<unknown>;
}

/** Draws a dialog, fills fields, and saves. */
async function open<T>(type: Type<T>, data: unknown) {
  TestBed.configureTestingModule({
    providers: [
      { provide: MAT_DIALOG_DATA, useValue: data },
      { provide: MatDialogRef, useValue: { backdropClick: () => EMPTY, keydownEvents: () => EMPTY } },
      { provide: MaterialsApi, useValue: api },
      { provide: JobsApi, useValue: { listJobs: () => of({ items: [job] }) } },
    ],
  });
  const page = await render(type);
  const dialog = page.fixture.componentInstance as unknown as Saving;
  return {
    page,
    dialog,
    fill: async (value: object) => {
      dialog.form.patchValue(value);
      await page.settle();
    },
    save: () => firstValueFrom(dialog.save()),
  };
}

beforeEach(() => {
  for (const call of Object.values(api)) call.mockReset().mockReturnValue(of({}));
  api.list.mockReturnValue(of([STEEL, BAR]));
});

describe('a material', () => {
  const newOne: MaterialDialogData = { material: null, units: 'us' };

  it('takes density and strength from its metal, and reads a gauge by the metal’s own table', async () => {
    const { fill, save } = await open(MaterialDialog, newOne);
    await fill({
      name: 'Stainless 10 ga',
      metal: 'stainless-304',
      thicknessMm: '10 ga',
      recoveryPricePerKg: '0.10',
    });
    await save();
    expect(api.create).toHaveBeenCalledWith({
      name: 'Stainless 10 ga',
      grade: '',
      form: 'sheet',
      gauge: '10 ga',
      // 0.140625 in of the stainless table; the steel table has 0.1345 in.
      thicknessMm: '3.57188',
      densityKgM3: '8000',
      tensileStrengthMpa: '620.528',
      recoveryPricePerKg: '0.220462',
    });
  });

  it('does not guess what a gauge is of', async () => {
    const { fill, dialog } = await open(MaterialDialog, newOne);
    await fill({ name: 'Sheet 10 ga', thicknessMm: '10 ga' });
    expect(dialog.form.get('thicknessMm')?.errors).toMatchObject({
      parsed: expect.stringMatching(/another thickness/),
    });
    await fill({ grade: 'Galvanized G90' });
    expect(dialog.form.get('thicknessMm')?.errors).toBeNull();
    await fill({ thicknessMm: '0' });
    expect(dialog.form.get('thicknessMm')?.errors).toMatchObject({ parsed: 'Must be more than 0.' });
  });

  it('keeps what it was to the last digit when only its name changes', async () => {
    const { fill, save } = await open(MaterialDialog, { material: STEEL, units: 'us' });
    await fill({ name: 'MS 11 ga' });
    await save();
    const { materialId: _id, stockKg: _kg, stockValue: _v, averagePerKg: _a, lastLot: _l, ...facts } = STEEL;
    expect(api.update).toHaveBeenCalledWith('steel', { ...facts, name: 'MS 11 ga' });
  });
});

describe('a lot', () => {
  const data: LotDialogData = { material: STEEL, lot: null, today: '2026-03-12', units: 'us' };

  it('starts with vendor and sheets of the last, and says what it weighs and costs by the pound', async () => {
    const { page, fill, save } = await open(LotDialog, data);
    await fill({ sheets: '10', cost: '1,500', freight: '75.50' });
    // 886.185… kg = 1,953.70… lb; 1,575.50 ÷ that.
    expect(page.text).toContain('1,953.7 lb worked out from the sheets · $0.8064 per lb with freight');
    await save();
    expect(api.addLot).toHaveBeenCalledWith('steel', {
      receivedOn: '2026-03-12',
      number: null,
      vendor: 'Millbrook Metals',
      sheets: 10,
      sheetLengthMm: '3048',
      sheetWidthMm: '1219.2',
      weightKg: null,
      cost: '1500.00',
      freight: '75.50',
    });
  });

  it('goes by the scale ticket, and without sheets their size says nothing', async () => {
    const { page, fill, save } = await open(LotDialog, data);
    await fill({ weightKg: '35.2', cost: '40' });
    expect(page.text).toContain('35.2 lb · $1.1364 per lb');
    await save();
    expect(api.addLot.mock.lastCall?.[1]).toMatchObject({
      weightKg: '15.966451424',
      sheets: null,
      sheetLengthMm: null,
      freight: '0',
    });
  });

  it('is corrected with its own figures, the worked-out weight left to be worked out', async () => {
    const { fill, save } = await open(LotDialog, { ...data, lot: LOT });
    await fill({ cost: '1600' });
    await save();
    expect(api.correctLot).toHaveBeenCalledWith('lot', {
      receivedOn: '2026-03-02',
      number: 'L-7',
      vendor: 'Millbrook Metals',
      sheets: 10,
      sheetLengthMm: '3048',
      sheetWidthMm: '1219.2',
      weightKg: null,
      cost: '1600.00',
      freight: '75.50',
    });
  });

  it('of what cannot be weighed asks for the weight, and takes no cost of nothing', async () => {
    const { page, fill, dialog } = await open(LotDialog, { ...data, material: BAR });
    expect(page.text).toContain('no thickness or no density: write the weight');
    await fill({ cost: '0' });
    expect(dialog.form.get('cost')?.errors).toMatchObject({ parsed: 'Must be more than 0.' });
  });
});

describe('an issue', () => {
  const start: IssueStart = {
    issue: null,
    kind: 'issue',
    jobId: 'job',
    materialId: 'steel',
    today: '2026-03-12',
    units: 'us',
  };

  it('of blanks says what they weigh beside what is in stock', async () => {
    const { page, fill, save } = await open(IssueDialog, start);
    expect(page.text).toContain('1042 Rack shelves');
    await fill({ count: '24', blankLengthMm: '500 mm', blankWidthMm: '250 mm' });
    expect(page.text).toContain('157.72 lb 100 lb in stock now');
    await save();
    expect(api.addIssue).toHaveBeenCalledWith({
      jobId: 'job',
      materialId: 'steel',
      kind: 'issue',
      issuedOn: '2026-03-12',
      sheets: null,
      pieces: 24,
      blankLengthMm: '500',
      blankWidthMm: '250',
      weightKg: null,
      note: null,
    });
  });

  it('of whole sheets starts with the size of the last lot', async () => {
    const { fill, save } = await open(IssueDialog, start);
    await fill({ measure: 'sheets' });
    await fill({ count: '2' });
    await save();
    expect(api.addIssue.mock.lastCall?.[0]).toMatchObject({
      sheets: 2,
      pieces: null,
      blankLengthMm: '3048',
      blankWidthMm: '1219.2',
    });
  });

  it('by weight sends the weight alone', async () => {
    const { fill, save, page } = await open(IssueDialog, { ...start, kind: 'return', materialId: 'bar' });
    expect(page.text).toContain('It has no thickness or no density: measure it by weight.');
    await fill({ count: '3', measure: 'weight', weightKg: '12.5 kg' });
    await save();
    expect(api.addIssue.mock.lastCall?.[0]).toMatchObject({
      kind: 'return',
      weightKg: '12.5',
      pieces: null,
      blankLengthMm: null,
    });
  });

  it('is corrected from the ledger with its own figures', async () => {
    const { fill, save } = await open(IssueDialog, { ...start, issue: toIssueRow(ISSUE, 'steel') });
    await fill({ count: '20' });
    await save();
    expect(api.correctIssue).toHaveBeenCalledWith(
      'issue',
      expect.objectContaining({
        pieces: 20,
        blankLengthMm: '500',
        issuedOn: '2026-03-04',
        note: 'Remnant kept',
      }),
    );
  });
});
