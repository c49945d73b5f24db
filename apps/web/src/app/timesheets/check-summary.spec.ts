import { render } from '../testing/rendered';
import { sampleCheck } from '../testing/sample-check';
import { CheckSummary } from './check-summary';

describe('CheckSummary', () => {
  const check = sampleCheck({
    rowsRead: 60,
    entriesReady: 47,
    alreadyThere: 4,
    refused: 9,
    hoursRead: '450.0000',
    hoursReady: '352.5000',
    hoursAlreadyThere: '30.0000',
    hoursRefused: '67.5000',
  });

  it('shows the hours read and where they go, in figures that add up', async () => {
    const page = await render(CheckSummary, { check });
    const hours = page.textsOf('dd:not(.rows)').map(Number);
    expect(hours).toEqual([450, 352.5, 30, 67.5]);
    expect(page.textsOf('dd.rows')).toEqual(['60 rows', '47 entries', '4 entries', '9 rows']);
  });

  it('does not call refused hours 0 when none of them could be read', async () => {
    const unread = { ...check, refused: 1, hoursRefused: '0.0000', refusedWithoutHours: 1 };
    const page = await render(CheckSummary, { check: unread });
    expect(page.textsOf('.refused dd')).toEqual(['–', '1 row, its hours cannot be read']);
    await page.set({ check: { ...check, refusedWithoutHours: 2 } });
    expect(page.textsOf('.refused dd')).toEqual(['67.50', '9 rows, the hours of 2 of them cannot be read']);
  });

  it('says whether the total of the sheet agrees, and by how much not', async () => {
    const controlTotal = { cell: 'E66', hours: '451.5000', agrees: false, difference: '1.5000' };
    const page = await render(CheckSummary, { check: { ...check, controlTotal } });
    expect(page.text).toContain('disagrees Total in cell E66: 451.50 differs from the rows by 1.50');
    await page.set({ check: { ...check, controlTotal: { ...controlTotal, agrees: true } } });
    expect(page.text).toContain('agrees Total in cell E66');
    expect(page.text).not.toContain('differs');
  });

  it('speaks of what was added once it is in', async () => {
    const page = await render(CheckSummary, { check, hoursAdded: '352.5000', entriesAdded: 47 });
    expect(page.textsOf('dt')).toEqual(['Hours read', 'Added', 'Already there', 'Refused']);
  });
});
