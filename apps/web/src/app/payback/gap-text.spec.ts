import { toGapAdvice } from './gap-text';

describe('toGapAdvice', () => {
  it('says whose rate is missing, for how long, and where to put it', () => {
    const advice = toGapAdvice({
      category: 'labour',
      subject: 'Jon Reyes',
      entries: 1200,
      firstDay: '2026-03-02',
      lastDay: '2026-03-06',
    });
    expect(advice.text).toMatch(/^Jon Reyes has no wage for 1,200 entries from Mar 2, 2026 to Mar 6, 2026\./);
    expect(advice.text).toMatch(/not counted as 0/);
    expect(advice).toMatchObject({ advice: 'Add one valid from Mar 2, 2026', path: '/people' });
  });

  it('speaks of one day and one entry as such, and sends machine rates to the machines', () => {
    const day = '2026-03-02';
    const gap = { category: 'earned', subject: 'Press 2', entries: 1, firstDay: day, lastDay: day } as const;
    expect(toGapAdvice(gap).text).toMatch(/no charge-out rate for 1 entry on Mar 2, 2026\./);
    expect(toGapAdvice(gap).path).toBe('/machines');
    expect(toGapAdvice({ ...gap, category: 'overhead', subject: null }).text).toMatch(
      /^The shop has no overhead rate/,
    );
  });
});
