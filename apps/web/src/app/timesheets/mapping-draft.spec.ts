import { toMappingDraft, withColumn, withHeaderAt } from './mapping-draft';

describe('toMappingDraft', () => {
  it('begins with what the check used', () => {
    const mapping = { sheet: 'Hours', headerRow: 4, columns: { date: 'A' } };
    expect(toMappingDraft({ mapping, sheets: [] })).toBe(mapping);
  });

  it('otherwise begins at the first row of the first sheet that is in sight and not empty', () => {
    const sheets = [
      { name: 'Lists', rows: 40, isHidden: true },
      { name: 'Cover', rows: 0, isHidden: false },
      { name: 'Week 48', rows: 60, isHidden: false },
    ];
    expect(toMappingDraft({ mapping: null, sheets })).toEqual({
      sheet: 'Week 48',
      headerRow: 1,
      columns: {},
    });
  });
});

describe('withColumn', () => {
  const mapping = { sheet: 'Hours', headerRow: 4, columns: { date: 'A', employee: 'B' } };

  it('moves a column from the field that had it', () => {
    expect(withColumn(mapping, 'job', 'B').columns).toEqual({ date: 'A', job: 'B' });
  });

  it('lets a field go without a column', () => {
    expect(withColumn(mapping, 'date', null).columns).toEqual({ employee: 'B' });
  });

  it('forgets the columns when the header is elsewhere, but not how dates are written', () => {
    const declared = { ...mapping, dateFormat: 'DD.MM.YYYY' } as const;
    expect(withHeaderAt(declared, 'Week 48', 2)).toEqual({
      sheet: 'Week 48',
      headerRow: 2,
      columns: {},
      dateFormat: 'DD.MM.YYYY',
    });
  });
});
