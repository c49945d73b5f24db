import { type EstimateInput, estimateInputSchema } from '@brakeven/contract';
import { D, toMoney } from '@brakeven/values';
import { previewEstimate, toMarginText } from './estimate-cost';
import { readEstimate, readLine, toEstimateForm, toLineForm } from './estimate-form';

const estimate: EstimateInput = {
  estimatedOn: '2026-05-01',
  scrapAllowancePercent: '5.00',
  marginPercent: '20.00',
  lines: [
    {
      kind: 'operation',
      operationId: '0190c6e0-0000-7000-8000-000000000001',
      machineId: '0190c6e0-0000-7000-8000-000000000002',
      setupHours: '0.5',
      minutesPerPiece: '7.5',
      pieces: 24,
      labourRate: '33.00',
      machineHourRate: '31.25',
      overheadRate: '18.00',
      description: '',
    },
    {
      kind: 'material',
      materialId: '0190c6e0-0000-7000-8000-000000000003',
      weightKg: '45.359237',
      pricePerKg: '1.366866',
      description: 'Guards',
    },
    { kind: 'outside', amount: '120.00', description: 'Powder coat' },
  ],
};

describe('the form of an estimate', () => {
  it.each(['us', 'metric'] as const)('gives back what it was given, in %s units', (units) => {
    const read = readEstimate(toEstimateForm(estimate, '2026-06-01', units), units);
    expect(read).toEqual({
      ...estimate,
      lines: [{ ...estimate.lines[0], setupHours: '0.5000' }, ...estimate.lines.slice(1)],
    });
    expect(estimateInputSchema.safeParse(read).success).toBe(true);
  });

  it('shows weights and prices in the unit of the shop', () => {
    const [, material] = toEstimateForm(estimate, '2026-06-01', 'us').controls.lines.controls;
    expect(material?.getRawValue()).toMatchObject({ weight: '100', price: '0.62' });
  });

  it('reads no line with a field that is empty, below 0 or senseless', () => {
    const operation = {
      operationId: 'o',
      setupHours: '0.5',
      pieces: '24',
      labourRate: '33',
      overheadRate: '18',
    };
    const read = (change: object) =>
      readLine(toLineForm('operation', { ...operation, ...change }, 'us'), 'us');
    expect(read({})).toMatchObject({ minutesPerPiece: '0', machineId: null, machineHourRate: null });
    for (const change of [
      { operationId: '' },
      { pieces: '' },
      { pieces: '0' },
      { setupHours: '-1' },
      { setupHours: '', minutesPerPiece: '' },
      { labourRate: '' },
      { labourRate: '-3' },
      { machineId: 'm' },
      { minutesPerPiece: 'three' },
    ])
      expect(read(change)).toBeNull();
    expect(
      readLine(toLineForm('material', { materialId: 'm', weight: '0', price: '1' }, 'us'), 'us'),
    ).toBeNull();
    expect(readLine(toLineForm('outside', { amount: '0' }, 'us'), 'us')).toBeNull();
  });

  it('refuses an allowance above 100 and a margin of 100 percent', () => {
    const form = toEstimateForm(estimate, '2026-06-01', 'us');
    form.patchValue({ scrapAllowancePercent: '101', marginPercent: '100' });
    expect(form.controls.scrapAllowancePercent.errors?.['parsed']).toMatch(/0 to 100/);
    expect(form.controls.marginPercent.errors?.['parsed']).toMatch(/below 100/);
    expect(readEstimate(form, 'us')).toBeNull();
  });
});

describe('what an estimate comes to while it is typed', () => {
  it('is what it will be when it is saved', () => {
    const preview = previewEstimate(estimate.lines, '5', '20');
    // 0.5 h + 24 × 7.5 min × 1.05 = 3.65 h at 33 + 31.25 + 18
    expect(preview.lines[0]).toEqual({ hours: '3.6500', cost: '300.21' });
    expect(preview.cost.total.toFixed(2)).toBe('485.31');
    expect(preview.price?.toFixed(2)).toBe('606.64');
    expect(preview.unread).toBe(0);
  });

  it('leaves lines that cannot be read out, and counts them', () => {
    const preview = previewEstimate([null, ...estimate.lines.slice(2)], '5', '20');
    expect(preview.lines).toEqual([null, { hours: null, cost: '120.00' }]);
    expect(preview.unread).toBe(1);
    const unread = previewEstimate(estimate.lines, 'much', '20');
    expect([unread.unread, unread.lines]).toEqual([3, [null, null, null]]);
    expect(previewEstimate(estimate.lines, '5', '100').price).toBeNull();
  });

  it('says what margin a price leaves', () => {
    expect(toMarginText('200.00', toMoney(150))).toBe('25.0 %');
    expect(toMarginText('100.00', toMoney(D('112.5')))).toBe('-12.5 %');
    expect(toMarginText(null, toMoney(1))).toBeNull();
  });
});
