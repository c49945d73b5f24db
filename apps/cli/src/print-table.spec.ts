import { printPairs, printTable } from './print-table';

describe('printTable', () => {
  it('puts texts to the left and figures to the right, as wide as the widest', () => {
    const rows = [
      { job: 'J-1', cost: '7.50' },
      { job: 'J-1000', cost: '12,345.00' },
    ];
    const text = printTable(rows, [
      { title: 'Job', of: ({ job }) => job },
      { title: 'Cost', of: ({ cost }) => cost, isFigure: true },
    ]);
    expect(text.split('\n')).toEqual([
      'Job          Cost', //
      'J-1          7.50',
      'J-1000  12,345.00',
    ]);
  });

  it('prints the titles alone when there is nothing', () => {
    expect(printTable([], [{ title: 'Job', of: String }])).toBe('Job');
  });
});

describe('printPairs', () => {
  it('aligns what belongs to the names', () => {
    expect(printPairs([['Job', 'J-1'] as const, ['Labour', '7.50'] as const])).toBe(
      'Job     J-1\nLabour  7.50',
    );
  });
});
