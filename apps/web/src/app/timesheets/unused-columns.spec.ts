import { render } from '../testing/rendered';
import { UnusedColumns } from './unused-columns';

const unusedColumns = ['F', 'G'].map((column) => ({
  column,
  text: 'Cell',
  samples: ['BR1'],
  message: `Column ${column} 'Cell' (BR1) is not used.`,
}));

describe('UnusedColumns', () => {
  it('tells of each column and asks for the one that is pressed', async () => {
    const asked: string[] = [];
    const check = { unusedColumns, mappingFrom: 'recognised' };
    const page = await render(UnusedColumns, { check }, { asked: (column: string) => asked.push(column) });
    expect(page.textsOf('li span')).toEqual(unusedColumns.map(({ message }) => message));
    await page.press('Say what column G is');
    expect(asked).toEqual(['G']);
  });

  it('is quieter only for columns as they were set at an earlier timesheet', async () => {
    const page = await render(UnusedColumns, { check: { unusedColumns, mappingFrom: 'chosen' } });
    expect(page.all('ul.known')).toHaveLength(0);
    await page.set({ check: { unusedColumns, mappingFrom: 'remembered' } });
    expect(page.all('ul.known')).toHaveLength(1);
  });
});
